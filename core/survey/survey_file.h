#pragma once

#include <memory>
#include <string>

#include "core/base/result.h"
#include "core/survey/history.h"

namespace strikeplate {

enum class Access { Write, Read };

/// A survey on disk with its history: one SQLite database, NAME.splate, laid out as FORMAT.md says.
///
/// Every append, undo and redo is one transaction, on the disk when the call returns Done. When it returns a Failure
/// (disk full, read-only, file moved away) the survey in memory has changed all the same, nothing on the disk has,
/// and what is missing there is written together with the next change, by flush(), or by saveAs(). One program at a
/// time can have a file open for writing. Not for use from two threads at once.
class SurveyFile {
 public:
  /// Writes a new file with this history and keeps it open. A file of the same name is replaced in one step, unless
  /// another program has it open.
  static Result<SurveyFile> create(const std::string& path, const History& history);
  static Result<SurveyFile> create(const std::string& path, const Survey& survey);

  /// Opens a file after checking its structure and the digest of everything in it. Fails with one sentence, and
  /// without changing the file, when it is missing, empty, something else, damaged, newer than this program, or open
  /// in another program. A file that may not be written opens all the same and is readOnly(). With Access::Read the
  /// file is not locked and nothing is ever written.
  static Result<SurveyFile> open(const std::string& path, Access access = Access::Write);

  SurveyFile(SurveyFile&& other) noexcept;
  SurveyFile& operator=(SurveyFile&& other) noexcept;
  SurveyFile(const SurveyFile&) = delete;
  SurveyFile& operator=(const SurveyFile&) = delete;
  ~SurveyFile();

  [[nodiscard]] const std::string& path() const;
  [[nodiscard]] bool readOnly() const;
  [[nodiscard]] const History& history() const;
  [[nodiscard]] const Survey& survey() const { return history().survey(); }

  /// Who makes the edits from now on; at first nobody.
  void setAuthor(std::string author);

  /// Carries the edit out and writes it. Needs an edit that fits the survey (see editFits).
  Outcome append(const Edit& edit);
  /// Take back and carry out again; without anything to do they are Done and write nothing.
  Outcome undo();
  Outcome redo();

  /// Whether something in memory is not on the disk, because a write failed.
  [[nodiscard]] bool unsaved() const;
  /// Tries again to write what is not on the disk.
  Outcome flush();

  /// Writes everything to a file of this name and goes on with that; on failure goes on with the present one.
  Outcome saveAs(const std::string& path);
  /// Writes everything to a file of this name and goes on with the present one.
  [[nodiscard]] Outcome copyTo(const std::string& path) const;

 private:
  struct Body;
  explicit SurveyFile(std::unique_ptr<Body> body);
  std::unique_ptr<Body> body_;
};

}  // namespace strikeplate
