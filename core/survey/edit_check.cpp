#include "core/survey/edit_check.h"

#include <algorithm>
#include <cmath>
#include <cstddef>
#include <initializer_list>

namespace strikeplate {
namespace {

bool within(int index, std::size_t count) {
  return index >= 0 && static_cast<std::size_t>(index) < count;
}

bool finite(std::initializer_list<double> values) {
  return std::all_of(values.begin(), values.end(), [](double v) { return std::isfinite(v); });
}

bool sound(const std::optional<Pick>& pick) {
  return !pick || (finite({pick->time, pick->sigma}) && pick->sigma > 0.0 && pick->layer >= 0);
}

bool sound(const Geophone& geophone) {
  return finite({geophone.x, geophone.elevation});
}

bool sound(const Borehole& borehole) {
  return finite({borehole.x, borehole.depth, borehole.sigma}) && borehole.layer >= 2;
}

bool sound(const Shot& shot, std::size_t records, std::size_t geophones) {
  const auto blowSound = [records](const Blow& b) {
    return within(b.record, records) && finite({b.lag, b.similarity});
  };
  const auto traceSound = [geophones](const ShotTrace& t) { return within(t.geophone, geophones) && sound(t.pick); };
  const auto markSound = [](const ShotMark& m) {
    return finite({m.value, m.sigma}) && m.value > 0.0 && m.sigma > 0.0;
  };
  return finite({shot.point.x, shot.point.elevation, shot.point.depth, shot.triggerCorrection}) &&
         std::all_of(shot.marks.begin(), shot.marks.end(), markSound) &&
         std::all_of(shot.blows.begin(), shot.blows.end(), blowSound) &&
         std::all_of(shot.traces.begin(), shot.traces.end(), traceSound);
}

template <class Item>
bool allSound(const std::vector<Item>& items) {
  return std::all_of(items.begin(), items.end(), [](const Item& item) { return sound(item); });
}

bool fits(const Survey& survey, const PickChange& change) {
  return within(change.shot, survey.shots.size()) &&
         within(change.trace, survey.shots[static_cast<std::size_t>(change.shot)].traces.size()) &&
         sound(change.before) && sound(change.after);
}

bool fits(const Survey& survey, const ShotChange& change) {
  if (!within(change.shot, survey.shots.size())) {
    return false;
  }
  const std::size_t traces = survey.shots[static_cast<std::size_t>(change.shot)].traces.size();
  const auto shotFits = [&](const Shot& shot) {
    return shot.traces.size() == traces && sound(shot, survey.records.size(), survey.geophones.size());
  };
  return shotFits(change.before) && shotFits(change.after);
}

bool fits(const Survey& survey, const GeophonesChange& change) {
  const std::size_t count = survey.geophones.size();
  return change.before.size() == count && change.after.size() == count && allSound(change.before) &&
         allSound(change.after);
}

bool sound(const SurveyInfo& info) {
  return !info.map || (isPlace(info.map->first) && isPlace(info.map->second));
}

bool fits(const Survey& /*survey*/, const InfoChange& change) {
  return sound(change.before) && sound(change.after);
}

bool fits(const Survey& /*survey*/, const SettingsChange& change) {
  const auto settingsSound = [](const SurveySettings& s) { return s.layers >= 0 && s.layers <= 6; };
  return settingsSound(change.before) && settingsSound(change.after);
}

bool fits(const Survey& /*survey*/, const BoreholesChange& change) {
  return allSound(change.before) && allSound(change.after);
}

bool fits(const Survey& /*survey*/, const DoubtAnswersChange& /*change*/) {
  return true;
}

bool fits(const Survey& /*survey*/, const ContentChange& change) {
  return surveyIsSound(change.before) && surveyIsSound(change.after);
}

bool fits(const Survey& survey, const LineChange& change) {
  const std::size_t count = survey.otherLines.size() + 1;
  return within(change.before, count) && within(change.after, count);
}

bool otherLinesSound(const Survey& survey) {
  return within(survey.lineAtHand, survey.otherLines.size() + 1) &&
         std::all_of(survey.otherLines.begin(), survey.otherLines.end(), [](const OtherLine& other) {
           return other.line && other.line->otherLines.empty() && surveyIsSound(*other.line);
         });
}

}  // namespace

bool surveyIsSound(const Survey& survey) {
  const auto recordSound = [](const RecordPtr& record) { return record != nullptr; };
  const auto shotSound = [&survey](const Shot& shot) {
    return sound(shot, survey.records.size(), survey.geophones.size());
  };
  return sound(survey.info) && std::all_of(survey.records.begin(), survey.records.end(), recordSound) &&
         allSound(survey.geophones) && std::all_of(survey.shots.begin(), survey.shots.end(), shotSound) &&
         allSound(survey.boreholes) && otherLinesSound(survey);
}

bool editFits(const Survey& survey, const Edit& edit) {
  // A change of content or line alters what the later changes of the same edit are measured against.
  if (edit.changes.size() == 1) {
    return std::visit([&survey](const auto& change) { return fits(survey, change); }, edit.changes.front());
  }
  Survey now = survey;
  for (const Change& change : edit.changes) {
    if (!std::visit([&now](const auto& one) { return fits(now, one); }, change)) {
      return false;
    }
    if (std::holds_alternative<ContentChange>(change) || std::holds_alternative<LineChange>(change)) {
      apply(now, {"", {change}});
    }
  }
  return true;
}

}  // namespace strikeplate
