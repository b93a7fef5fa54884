#include <algorithm>
#include <cassert>
#include <cstddef>
#include <numeric>
#include <utility>

#include "core/base/checksum.h"
#include "core/base/file_names.h"
#include "core/base/numbers.h"
#include "core/base/units.h"
#include "core/survey/edit.h"

namespace strikeplate::edits {
namespace {

std::size_t at(int index) {
  return static_cast<std::size_t>(index);
}

const Shot& shotOf(const Survey& survey, int shot) {
  assert(shot >= 0 && at(shot) < survey.shots.size());
  return survey.shots[at(shot)];
}

const ShotTrace& traceOf(const Survey& survey, int shot, int trace) {
  const Shot& of = shotOf(survey, shot);
  assert(trace >= 0 && at(trace) < of.traces.size());
  return of.traces[at(trace)];
}

std::string shotName(int shot) {
  return "shot " + std::to_string(shot + 1);
}

std::string lengthText(const Survey& survey, double metres) {
  return Units{survey.settings.feet}.length(metres, survey.settings.feet ? 1 : 2);
}

const char* stateName(TraceState state) {
  switch (state) {
    case TraceState::Dead:
      return "dead";
    case TraceState::Reversed:
      return "reversed";
    case TraceState::Noisy:
      return "noisy";
    case TraceState::Live:
      break;
  }
  return "live";
}

const char* markName(MarkKind kind) {
  return kind == MarkKind::CriticalDistance ? "critical distance" : "reflection time";
}

// A shot as its change stores it: the picks are not part of the change, so they are not kept twice.
Shot withoutPicks(Shot shot) {
  for (ShotTrace& trace : shot.traces) {
    trace.pick.reset();
  }
  return shot;
}

Change shotChange(const Survey& survey, int shot, Shot after) {
  return ShotChange{shot, withoutPicks(shotOf(survey, shot)), withoutPicks(std::move(after))};
}

bool rising(const std::vector<Shot>& shots) {
  return std::is_sorted(shots.begin(), shots.end(),
                        [](const Shot& a, const Shot& b) { return a.point.x < b.point.x; });
}

// A shot that passes its neighbour changes the order of all, which only a change of the whole content can say.
Change reordered(const Survey& survey, int shot, const ShotPoint& point) {
  Survey after = survey;
  after.shots[at(shot)].point = point;
  std::stable_sort(after.shots.begin(), after.shots.end(),
                   [](const Shot& a, const Shot& b) { return a.point.x < b.point.x; });
  return ContentChange{survey, std::move(after)};
}

}  // namespace

Edit setPick(const Survey& survey, int shot, int trace, std::optional<Pick> pick, std::string text) {
  return {std::move(text), {PickChange{shot, trace, traceOf(survey, shot, trace).pick, pick}}};
}

Edit setPicks(const Survey& survey, const std::vector<PickChange>& picks, std::string text) {
  Edit edit{std::move(text), {}};
  edit.changes.reserve(picks.size());
  for (PickChange change : picks) {
    change.before = traceOf(survey, change.shot, change.trace).pick;
    edit.changes.emplace_back(change);
  }
  return edit;
}

Edit assignLayer(const Survey& survey, int shot, const std::vector<int>& traces, int layer) {
  assert(layer >= 0);
  Edit edit;
  for (const int trace : traces) {
    const std::optional<Pick>& before = traceOf(survey, shot, trace).pick;
    if (before) {
      Pick after = *before;
      after.layer = layer;
      edit.changes.emplace_back(PickChange{shot, trace, before, after});
    }
  }
  const std::size_t count = edit.changes.size();
  edit.text = (layer > 0 ? "Assign layer " + std::to_string(layer) : std::string("Leave the layer to the program")) +
              ", " + shotName(shot) + ", " + std::to_string(count) + (count == 1 ? " pick" : " picks");
  return edit;
}

Edit setTriggerCorrection(const Survey& survey, int shot, double correction) {
  Shot after = shotOf(survey, shot);
  after.triggerCorrection = correction;
  return {"Set trigger correction, " + shotName(shot) + ": " + fixed(correction * 1e3, 2) + " ms",
          {shotChange(survey, shot, std::move(after))}};
}

Edit setShotPoint(const Survey& survey, int shot, const ShotPoint& point) {
  const Shot& before = shotOf(survey, shot);
  const std::string text = before.point.x != point.x ? "Move " + shotName(shot) + " to " + lengthText(survey, point.x)
                                                     : "Set elevation and depth, " + shotName(shot);
  std::vector<Shot> shots = survey.shots;
  shots[at(shot)].point = point;
  if (rising(survey.shots) && !rising(shots)) {
    return {text, {reordered(survey, shot, point)}};
  }
  return {text, {shotChange(survey, shot, shots[at(shot)])}};
}

Edit setTraceState(const Survey& survey, int shot, int trace, TraceState state) {
  assert(trace >= 0 && at(trace) < shotOf(survey, shot).traces.size());
  Shot after = shotOf(survey, shot);
  after.traces[at(trace)].state = state;
  after.traces[at(trace)].stateReason = state == TraceState::Live ? "" : "set by hand";
  return {"Mark " + shotName(shot) + ", trace " + std::to_string(trace + 1) + " as " + stateName(state),
          {shotChange(survey, shot, std::move(after))}};
}

Edit useBlows(const Survey& survey, const std::vector<std::vector<bool>>& used) {
  assert(used.size() == survey.shots.size());
  Edit edit;
  int changed = 0;
  std::string last;
  for (int s = 0; s < static_cast<int>(survey.shots.size()); ++s) {
    Shot after = shotOf(survey, s);
    assert(used[at(s)].size() == after.blows.size());
    for (std::size_t b = 0; b < after.blows.size(); ++b) {
      Blow& blow = after.blows[b];
      if (blow.used != used[at(s)][b]) {
        blow.used = used[at(s)][b];
        ++changed;
        last = (blow.used ? "Stack blow " : "Leave out blow ") + lastPart(survey.records[at(blow.record)]->file);
      }
    }
    if (after.blows != survey.shots[at(s)].blows) {
      edit.changes.emplace_back(shotChange(survey, s, std::move(after)));
    }
  }
  edit.text = changed == 1 ? last : "Choose the blows of the stacks, " + std::to_string(changed) + " changed";
  return edit;
}

Edit setInfo(const Survey& survey, const SurveyInfo& info) {
  return {"Change the survey's particulars", {InfoChange{survey.info, info}}};
}

Edit setSheet(const Survey& survey, const SheetChoices& sheet) {
  SurveyInfo info = survey.info;
  info.sheet = sheet;
  return {"Change the sheet's words and pages", {InfoChange{survey.info, info}}};
}

Change noteTable(const Survey& survey, const std::string& path) {
  SurveyInfo info = survey.info;
  info.tables.push_back({path, fileChecksum(path).value_or("")});
  return InfoChange{survey.info, info};
}

Edit setSettings(const Survey& survey, const SurveySettings& settings, std::string text) {
  return {std::move(text), {SettingsChange{survey.settings, settings}}};
}

Edit setMark(const Survey& survey, int shot, const ShotMark& mark) {
  assert(mark.value > 0.0 && mark.sigma > 0.0);
  const Shot before = withoutPicks(shotOf(survey, shot));
  Shot after = before;
  std::erase_if(after.marks, [&mark](const ShotMark& m) { return m.kind == mark.kind; });
  after.marks.push_back(mark);
  return {"Mark " + std::string(markName(mark.kind)) + " of " + shotName(shot), {ShotChange{shot, before, after}}};
}

Edit removeMark(const Survey& survey, int shot, MarkKind kind) {
  const Shot before = withoutPicks(shotOf(survey, shot));
  Shot after = before;
  if (std::erase_if(after.marks, [kind](const ShotMark& m) { return m.kind == kind; }) == 0) {
    return {};
  }
  return {"Remove " + std::string(markName(kind)) + " of " + shotName(shot), {ShotChange{shot, before, after}}};
}

Edit answerDoubt(const Survey& survey, const std::string& kind, const std::string& where, const std::string& note) {
  std::vector<DoubtAnswer> after = survey.doubtAnswers;
  std::erase_if(after, [&](const DoubtAnswer& a) { return a.kind == kind && a.where == where; });
  if (!note.empty()) {
    after.push_back({kind, where, note});
  }
  return {(note.empty() ? "Take back the answer to a doubt: " : "Answer a doubt: ") + kind +
              (where.empty() ? "" : ", " + where),
          {DoubtAnswersChange{survey.doubtAnswers, after}}};
}

Edit setBoreholes(const Survey& survey, const std::vector<Borehole>& boreholes, std::string text) {
  return {std::move(text), {BoreholesChange{survey.boreholes, boreholes}}};
}

}  // namespace strikeplate::edits
