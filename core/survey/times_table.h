#pragma once

#include <optional>
#include <string>
#include <vector>

#include "core/base/csv.h"
#include "core/base/result.h"
#include "core/survey/survey.h"

namespace strikeplate {

/// What a column of a table of travel times can hold.
enum class TimesField {
  ShotX,
  GeophoneX,
  Offset,  ///< of the geophone from its shot, positive towards larger x; in place of GeophoneX
  Time,
  Sigma,
  Layer,
  ShotElevation,
  GeophoneElevation,
  ShotDepth,
  TriggerCorrection,
  Origin  ///< automatic, hand or imported, as in the table of picks that this program writes
};

/// Which column holds what, and in which units.
struct TimesColumns {
  std::vector<std::optional<TimesField>> fields;  ///< one for each column; nothing where it is passed over
  bool feet = false;                              ///< lengths
  bool milliseconds = false;                      ///< times

  /// Number of the column that holds this.
  [[nodiscard]] std::optional<std::size_t> of(TimesField field) const;
};

/// Reads a table of travel times. One with a geophone's position in its first column and a column of times for each
/// shot, whose name is the shot's position, is turned into one row for each time, with the columns "shot", "geophone"
/// and "time". Fails as readCsv does.
Result<CsvTable> readTimesTable(const std::string& path);
/// The same from text.
Result<CsvTable> parseTimesTable(std::string_view text, const std::string& name);

/// What the columns' names and numbers suggest. Lengths are in feet where names end in _ft or say feet; times are in
/// milliseconds where their name says ms, or, where it says nothing, when the largest is above 5.
TimesColumns guessTimesColumns(const CsvTable& table);

/// A line of these times, without records: rows of one shot position (and depth) are one shot, of one geophone
/// position one geophone. Offsets without a column of shots are of one shot at 0 m. Picks are Imported where no
/// origin is given, with 1 ms where no sigma is; an empty time is a trace without a pick. Several times for one trace
/// are averaged, and a row that cannot be used is passed over; both are said in Survey::remarks, a sentence each.
/// Fails, in one sentence that says what to do, when a column that is needed (shot, geophone or offset, time) is not
/// named, two columns hold the same, or no row can be used.
Result<Survey> surveyFromTimes(const CsvTable& table, const TimesColumns& columns);

}  // namespace strikeplate
