#pragma once

#include <optional>
#include <string>
#include <variant>
#include <vector>

#include "core/survey/survey.h"

namespace strikeplate {

/// The smallest changes a survey knows. Each carries what was there before, so that it can be taken back.
struct PickChange {
  int shot = 0;
  int trace = 0;
  std::optional<Pick> before, after;
};
struct ShotChange {  ///< everything of a shot but its picks: place, blows, trigger correction, trace states
  int shot = 0;
  Shot before, after;
};
struct GeophonesChange {
  std::vector<Geophone> before, after;  ///< same count
};
struct InfoChange {
  SurveyInfo before, after;
};
struct SettingsChange {
  SurveySettings before, after;
};
struct BoreholesChange {
  std::vector<Borehole> before, after;
};
struct DoubtAnswersChange {
  std::vector<DoubtAnswer> before, after;
};
/// A new set of records with the geometry that goes with it (loading, adding, removing records).
struct ContentChange {
  Survey before, after;
};
/// Another line of the job comes to hand.
struct LineChange {
  int before = 0, after = 0;  ///< Survey::lineAtHand
};

using Change = std::variant<PickChange, ShotChange, GeophonesChange, InfoChange, SettingsChange, BoreholesChange,
                            ContentChange, LineChange, DoubtAnswersChange>;

/// One step of the history: what undo and redo name, and one transaction of the survey file.
struct Edit {
  std::string text;  ///< such as "Move pick, shot 3, trace 17"
  std::vector<Change> changes;
};

/// Carries the edit out on the survey itself. Needs every index to be valid.
void apply(Survey& survey, const Edit& edit);

/// `survey` with the edit carried out. Needs every index to be valid.
[[nodiscard]] Survey applied(const Survey& survey, const Edit& edit);

/// The edit that takes `edit` back.
[[nodiscard]] Edit inverted(const Edit& edit);

/// Makers of the usual edits; each reads the present state from `survey` for the way back.
namespace edits {
Edit setPick(const Survey& survey, int shot, int trace, std::optional<Pick> pick, std::string text);
Edit setPicks(const Survey& survey, const std::vector<PickChange>& picks,
              std::string text);  ///< `before` is filled in
/// Assigns the layer of many picks; traces without a pick are passed over.
Edit assignLayer(const Survey& survey, int shot, const std::vector<int>& traces, int layer);
Edit setTriggerCorrection(const Survey& survey, int shot, double correction);
Edit setShotPoint(const Survey& survey, int shot, const ShotPoint& point);
Edit setTraceState(const Survey& survey, int shot, int trace, TraceState state);
/// Which blows of each shot are part of its stack; names the one that was left out or taken back when it is one.
/// Needs a row for each shot with a value for each of its blows. Without changes when nothing changes.
Edit useBlows(const Survey& survey, const std::vector<std::vector<bool>>& used);
Edit setInfo(const Survey& survey, const SurveyInfo& info);
/// What the sheet is to hold.
Edit setSheet(const Survey& survey, const SheetChoices& sheet);
/// Notes that a table was read, with its checksum as it is now; for an edit that uses the table.
Change noteTable(const Survey& survey, const std::string& path);
Edit setSettings(const Survey& survey, const SurveySettings& settings, std::string text);
/// Sets what the user read off a shot, in place of an earlier mark of its kind. Needs a value and sigma > 0.
Edit setMark(const Survey& survey, int shot, const ShotMark& mark);
/// Without changes when there is no such mark.
Edit removeMark(const Survey& survey, int shot, MarkKind kind);
/// Answers the doubt of this kind and place; an empty note takes the answer back.
Edit answerDoubt(const Survey& survey, const std::string& kind, const std::string& where, const std::string& note);
Edit setBoreholes(const Survey& survey, const std::vector<Borehole>& boreholes, std::string text);
}  // namespace edits

}  // namespace strikeplate
