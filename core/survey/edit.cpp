#include "core/survey/edit.h"

#include <algorithm>
#include <cassert>
#include <cstddef>
#include <type_traits>
#include <utility>

#include "core/survey/lines.h"

namespace strikeplate {
namespace {

std::size_t at(int index) {
  return static_cast<std::size_t>(index);
}

[[maybe_unused]] bool has(const std::vector<Shot>& shots, int shot) {
  return shot >= 0 && at(shot) < shots.size();
}

[[maybe_unused]] bool has(const Survey& survey, int shot, int trace) {
  return has(survey.shots, shot) && trace >= 0 && at(trace) < survey.shots[at(shot)].traces.size();
}

void carryOut(Survey& survey, const PickChange& change) {
  assert(has(survey, change.shot, change.trace));
  survey.shots[at(change.shot)].traces[at(change.trace)].pick = change.after;
}

// The picks are not part of this change: those of the survey stay where they are.
void carryOut(Survey& survey, const ShotChange& change) {
  assert(has(survey.shots, change.shot));
  Shot& shot = survey.shots[at(change.shot)];
  assert(change.after.traces.size() == shot.traces.size());
  Shot next = change.after;
  for (std::size_t i = 0; i < next.traces.size(); ++i) {
    next.traces[i].pick = shot.traces[i].pick;
  }
  shot = std::move(next);
}

void carryOut(Survey& survey, const GeophonesChange& change) {
  assert(change.after.size() == survey.geophones.size());
  survey.geophones = change.after;
}

void carryOut(Survey& survey, const InfoChange& change) {
  survey.info = change.after;
}

void carryOut(Survey& survey, const SettingsChange& change) {
  survey.settings = change.after;
}

void carryOut(Survey& survey, const BoreholesChange& change) {
  survey.boreholes = change.after;
}

void carryOut(Survey& survey, const DoubtAnswersChange& change) {
  survey.doubtAnswers = change.after;
}

void carryOut(Survey& survey, const ContentChange& change) {
  survey = change.after;
}

void carryOut(Survey& survey, const LineChange& change) {
  survey = withLineAtHand(std::move(survey), change.after);
}

}  // namespace

void apply(Survey& survey, const Edit& edit) {
  for (const Change& change : edit.changes) {
    std::visit([&survey](const auto& one) { carryOut(survey, one); }, change);
  }
}

Survey applied(const Survey& survey, const Edit& edit) {
  Survey next = survey;
  apply(next, edit);
  return next;
}

Edit inverted(const Edit& edit) {
  Edit back{edit.text, {}};
  back.changes.reserve(edit.changes.size());
  for (auto change = edit.changes.rbegin(); change != edit.changes.rend(); ++change) {
    back.changes.push_back(*change);
    std::visit([](auto& one) { std::swap(one.before, one.after); }, back.changes.back());
  }
  return back;
}

}  // namespace strikeplate
