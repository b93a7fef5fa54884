#pragma once

#include <string>
#include <vector>

#include "core/survey/interpretation.h"

namespace strikeplate {

/// What the sheet cannot know from the survey itself.
struct SheetOptions {
  int edits = -1;                       ///< edits of the history that are done, or -1 when there is no history
  std::string answer;                   ///< the user's own answer in place of the drafted one; empty for the draft
  std::string signatory;                ///< printed name under the signature line
  std::vector<std::string> inputFiles;  ///< besides the records' own files, such as a geometry table
};

struct SheetField {
  std::string label;
  std::string value;  ///< kNotGiven where the survey has nothing
};

/// A table of finished texts; every row has as many cells as there are columns.
struct SheetTable {
  std::string title;
  std::vector<std::string> columns;
  std::vector<std::vector<std::string>> rows;
  std::string note;     ///< what to know for reading it
  std::string summary;  ///< one sentence that stands for the rows where there is no room for all
};

/// Everything the sheet says, as finished texts in the user's units. Screen, paper and tests take the words and
/// numbers from here, so that they agree.
struct SheetContent {
  std::string title;
  std::vector<SheetField> head;
  std::vector<std::string> missing;  ///< labels of the head that are not given
  std::string answer;                ///< for the client
  std::string strongestDoubt;        ///< one sentence, empty when there is no doubt
  SheetTable layers, boreholes, opinions, reciprocals, shots, doubts;
  std::vector<std::string> picks;        ///< how they came about
  std::vector<std::string> fit;          ///< how well the section explains them
  std::vector<std::string> limitations;  ///< what the line cannot see
  std::vector<std::string> methods;      ///< by published name, with sources
  std::string cautionShort;              ///< for page 1
  std::vector<std::string> cautions;     ///< in full
  std::string signatory;
  std::string program;             ///< name and version
  std::vector<std::string> files;  ///< input files, each once
  bool feet = false;
};

inline constexpr const char* kNotGiven = "not given";
inline constexpr const char* kNotDetermined = "not determined";

/// Writes the sheet's words. Nothing stands there that survey and interpretation do not hold.
SheetContent sheetContent(const Survey& survey, const Interpretation& interpretation, const SheetOptions& options);

}  // namespace strikeplate
