#pragma once

#include <memory>
#include <optional>
#include <string>
#include <vector>

#include "core/line/line.h"
#include "core/line/line_on_map.h"
#include "core/picking/pick.h"
#include "core/record/record.h"

namespace strikeplate {

/// Which record belongs to a shot, and how it sits in the stack.
struct Blow {
  int record = 0;           ///< index into Survey::records
  double lag = 0.0;         ///< s by which this blow's arrivals come later than the stack's
  double similarity = 1.0;  ///< mean correlation with the stack, -1 to 1
  bool used = true;         ///< part of the stack
  bool operator==(const Blow&) const = default;
};

/// One trace of a shot: the geophone it stands at, its state, and its first break.
struct ShotTrace {
  int geophone = 0;  ///< index into Survey::geophones
  TraceState state = TraceState::Live;
  std::string stateReason;  ///< why it is not live, in words
  std::optional<Pick> pick;
  bool operator==(const ShotTrace&) const = default;
};

/// What the user read off a shot's records or times besides first breaks.
enum class MarkKind {
  CriticalDistance,  ///< m, offset from which the head wave of layer 2 exists
  ReflectionTime,    ///< s, two-way, at zero offset, from the top of layer 2
};
struct ShotMark {
  MarkKind kind = MarkKind::CriticalDistance;
  double value = 0.0;
  double sigma = 0.0;  ///< one standard deviation, > 0
  bool operator==(const ShotMark&) const = default;
};

/// One shot point with its blows and its traces.
struct Shot {
  ShotPoint point;
  std::vector<Blow> blows;         ///< empty when the times came from a table without records
  double triggerCorrection = 0.0;  ///< s, added to recorder time to give time after the blow
  std::vector<ShotTrace> traces;   ///< in the order of the record's traces
  std::vector<ShotMark> marks;     ///< at most one of each kind
  bool operator==(const Shot&) const = default;
};

/// What the user decided about the sheet.
struct SheetChoices {
  std::string question;   ///< what the client wants to know; empty for the general question
  std::string answer;     ///< the user's own answer in place of the drafted one; empty for the draft
  std::string answerTo;   ///< the draft, in metres, that the answer was written in place of
  std::string signatory;  ///< printed name under the signature line
  bool records = false;   ///< further pages: each shot's record with its picks
  bool tables = false;    ///< further pages: every table in full
  bool places = false;    ///< further pages: where every geophone and shot stood
  bool operator==(const SheetChoices&) const = default;
};

/// A table that was laid over the records or brought picks, as it was when it was read.
struct TableRead {
  std::string file;      ///< as named by the user
  std::string checksum;  ///< see fileChecksum()
  bool operator==(const TableRead&) const = default;
};

/// Who, where, when and how: what the sheet's head says, free text as the user typed it; what the sheet is to hold;
/// where the line lies on the map.
struct SurveyInfo {
  std::string title, client, site, line, date, crew, observer, source, geophoneType, recorder, weather, datum, notes;
  SheetChoices sheet = {};
  std::optional<LineOnMap> map = std::nullopt;
  std::vector<TableRead> tables = {};  ///< in the order of reading
  bool operator==(const SurveyInfo&) const = default;
};

struct SurveySettings {
  int layers = 0;     ///< 2 to 6, 0 = by evidence
  bool feet = false;  ///< lengths on screen and paper
  bool solveTriggerDelays = false;
  bool operator==(const SurveySettings&) const = default;
};

/// What the user has to say to a doubt. It belongs to the doubt of this kind and place, and is kept when that doubt
/// goes, for when it comes back.
struct DoubtAnswer {
  std::string kind, where;  ///< as Doubt has them
  std::string note;         ///< never empty
  bool operator==(const DoubtAnswer&) const = default;
};

struct Survey;

/// Another line of the same job. Shared and immutable, so a copy is cheap; equal when the lines are.
struct OtherLine {
  std::shared_ptr<const Survey> line;  ///< never null; has no other lines of its own
  bool operator==(const OtherLine& other) const;
};

/// The document: the line at hand as plain data with value semantics, and the job's other lines (see lines.h).
/// Records are shared and immutable, so a copy is cheap.
struct Survey {
  SurveyInfo info;
  SurveySettings settings;
  std::vector<RecordPtr> records;
  std::vector<Geophone> geophones;  ///< rising x, each position once
  std::vector<Shot> shots;          ///< rising x
  std::vector<Borehole> boreholes;
  std::vector<DoubtAnswer> doubtAnswers;           ///< at most one for a kind and place
  std::vector<std::string> remarks;                ///< what was odd on loading, one sentence each
  std::vector<OtherLine> otherLines;               ///< in their order, without this one
  int lineAtHand = 0;                              ///< place of this line among all of them, from 0
  bool operator==(const Survey&) const = default;  ///< records are the same when they are the same objects
};

}  // namespace strikeplate
