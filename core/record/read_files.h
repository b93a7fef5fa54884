#pragma once

#include <string>
#include <vector>

#include "core/base/progress.h"
#include "core/record/record.h"

namespace strikeplate {

/// What came of reading several files.
struct FilesRead {
  std::vector<RecordPtr> records;     ///< in the order of the files, and of the shots in each
  std::vector<std::string> failures;  ///< one sentence for each file that could not be read
  bool unfinished = false;            ///< stopped early on request; the records read until then are there
};

/// Reads all shot records of these files (see readRecords), one file after the other, so that besides the samples no
/// more than a part of one file is in memory. Progress is asked before each file.
FilesRead readFiles(const std::vector<std::string>& paths, const Progress& progress = {});

}  // namespace strikeplate
