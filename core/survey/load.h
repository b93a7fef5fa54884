#pragma once

#include <string>
#include <vector>

#include "core/base/progress.h"
#include "core/survey/survey.h"

namespace strikeplate {

/// What came of reading files as one line.
struct LoadedLine {
  Survey survey;
  std::vector<std::string> problems;  ///< one sentence for each file, or part of one, that could not be used
  int filesRead = 0;
  bool finished = true;  ///< false when it was asked to stop early
};

/// Whether a path names a table of travel times (.csv, .txt, .tsv in any case).
bool isTimesTable(const std::string& path);

/// Reads SEG-2, SEG-Y, tables of travel times (their columns by name, see times_table.h) and survey files, in any
/// mix, into one line: geometry table (may be empty) laid over the headers, blows at one shot point put together and
/// aligned, dead traces found. Nothing is picked. A file that cannot be read adds a problem and the others are still
/// used.
LoadedLine loadLine(const std::vector<std::string>& paths, const std::string& geometryTable,
                    const Progress& progress = {});

}  // namespace strikeplate
