#pragma once

#include <string>
#include <vector>

#include "core/survey/interpretation.h"

namespace strikeplate {

/// What the sheet cannot know from the survey itself.
struct SheetOptions {
  int edits = -1;                    ///< edits of the history that are done, or -1 when there is no history
  std::string answer;                ///< the user's own answer in place of the drafted one; empty for the draft
  std::string answerTo;              ///< sheetDraft() when the answer was written; empty when that is not known
  std::string question;              ///< what the client wants to know; empty for the general question
  std::string signatory;             ///< printed name under the signature line
  std::vector<std::string> builtOn;  ///< names and versions of what the program is built on
  bool blackAndWhite = false;        ///< layers told apart by symbol, dashes and grey alone
  bool records = false;              ///< further pages: each shot's record with its picks
  bool tables = false;               ///< further pages: every table in full
  bool places = false;               ///< further pages: where every geophone and shot stood
};

/// The options as the survey keeps them; the others are at their defaults.
SheetOptions sheetOptionsOf(const Survey& survey);

/// What of the options a survey keeps.
SheetChoices sheetChoicesOf(const SheetOptions& options);

/// The answer that the program drafts, in metres whatever the survey's unit: what it says of depths and velocities,
/// by which a later reader knows whether an answer of the user's own was written for the same interpretation.
std::string sheetDraft(const Survey& survey, const Interpretation& interpretation);

/// Whether the answer of the user's own was written for another interpretation.
bool answerIsOld(const Survey& survey, const Interpretation& interpretation, const SheetOptions& options);

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

struct SheetDoubt {
  std::string says, restsOn, settles;  ///< whole sentences
  std::string answer;                  ///< what the user says to it; empty when nothing
};

/// Doubts of one kind, the strongest first; never empty.
struct SheetDoubtKind {
  std::string kind;
  std::vector<SheetDoubt> doubts;
};

struct SheetFile {
  std::string name;      ///< without folders
  std::string checksum;  ///< CRC-32 (IEEE 802.3) of the file when it was read, 8 hex digits; empty when not known
};

/// Everything the sheet says, as finished texts in the user's units. Screen, paper and tests take the words and
/// numbers from here, so that they agree.
struct SheetContent {
  std::string title;
  std::vector<SheetField> head;
  std::vector<std::string> missing;   ///< labels of the head that are not given
  std::vector<std::string> warnings;  ///< that the inversion has not settled, where depth is not determined
  std::string question;               ///< for the client
  std::string answer;                 ///< for the client
  std::string strongestDoubt;         ///< one sentence, empty when there is no doubt
  std::string strongestDoubtMore;     ///< what it rests on, what would settle it, how many others there are
  std::vector<std::string>
      boreholeMarks;  ///< what stands above each borehole in the section and before it in its table
  SheetTable layers, boreholes, opinions, reciprocals, shots;
  std::string materials;  ///< published materials of such velocities, marked as a hint
  SheetTable allDoubts, allFiles, geophonePlaces, shotPlaces;  ///< for the optional pages; always there
  std::vector<SheetDoubtKind> doubts;                          ///< the gravest kind first
  std::string noDoubts;                                        ///< stands in their place when there are none
  std::vector<std::string> picks;                              ///< how they came about
  std::vector<std::string> triggers;                           ///< corrections by the user and by the section itself
  std::vector<std::string> fit;                                ///< how well the section explains them
  std::vector<std::string> limitations;                        ///< what the line cannot see
  std::vector<std::string> methods;                            ///< by published name, with sources
  std::string cautionShort;                                    ///< for page 1
  std::vector<std::string> cautions;                           ///< in full
  std::string signatory;
  std::string program;               ///< name and version
  std::vector<std::string> builtOn;  ///< names and versions of what it is built on
  std::vector<SheetFile> files;      ///< input files, each once
  bool feet = false;
  bool blackAndWhite = false;
  bool recordPages = false;
  bool tablePages = false;
  bool placePages = false;
};

inline constexpr const char* kNotGiven = "not given";
inline constexpr const char* kNotDetermined = "not determined";

/// Writes the sheet's words. Nothing stands there that survey and interpretation do not hold.
SheetContent sheetContent(const Survey& survey, const Interpretation& interpretation, const SheetOptions& options);

/// The doubts as paragraphs: of each kind at most `mostOfAKind` (at least 1), the others counted; what they rest on
/// is left out unless `reasons`.
std::vector<std::string> doubtLines(const SheetContent& sheet, int mostOfAKind, bool reasons);

/// "1001.sg2 1a2b3c4d, 1002.sg2 and 7 more.": at most `most` files by name, with their checksums as far as known.
std::string filesLine(const std::vector<SheetFile>& files, int most);

}  // namespace strikeplate
