#pragma once

#include <cstdint>
#include <map>
#include <string>
#include <vector>

#include "core/base/result.h"
#include "core/survey/history.h"
#include "core/survey/survey_file_database.h"

namespace strikeplate {

/// The rows of a survey file (FORMAT.md): writes a history into them and reads it back. Remembers which records and
/// how many edits the file holds.
class SurveyStore {
 public:
  /// Makes the tables and writes everything, in one transaction. Needs an empty database and a new store.
  Outcome writeNew(Database& database, const History& history);

  /// Reads everything and checks every digest. Needs a new store. `path` is for messages.
  Result<History> readAll(Database& database, const std::string& path);

  /// Writes these entries of the history (rising indices) with the records that they name and the file does not hold
  /// yet, in one transaction. On failure the file and this object are as before.
  Outcome write(Database& database, const History& history, const std::vector<std::size_t>& entries);

 private:
  struct Known {
    RecordPtr record;
    std::int64_t id;
    std::int64_t digest;
  };

  std::int64_t idOf(Database& database, const RecordPtr& record);
  [[nodiscard]] RecordPtr recordOf(std::int64_t id) const;
  bool writeStart(Database& database, const Survey& start);
  bool writeEntry(Database& database, const HistoryEntry& entry, std::size_t index);
  Outcome readRecords(Database& database, const std::string& path);
  Result<History> readStart(Database& database, const std::string& path) const;
  Outcome readEdits(Database& database, const std::string& path, History& history);
  void forgetFrom(std::size_t knownCount);

  std::vector<Known> known_;  // in the order of their ids
  std::map<const ShotRecord*, std::int64_t> ids_;
  std::size_t edits_ = 0;       // rows in the table
  bool recordsWritten_ = true;  // false when a record met on the way could not be written
};

}  // namespace strikeplate
