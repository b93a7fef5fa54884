#include "core/survey/merge.h"

#include <algorithm>
#include <cmath>

#include "core/survey/assemble.h"

namespace strikeplate {
namespace {

int findGeophone(const std::vector<Geophone>& geophones, double x) {
  for (std::size_t i = 0; i < geophones.size(); ++i) {
    if (std::abs(geophones[i].x - x) <= kSamePlace) {
      return static_cast<int>(i);
    }
  }
  return -1;
}

/// Adds the geophones of `more` that are not there yet and renumbers the traces of `survey` to the new order.
void mergeGeophones(Survey& survey, const Survey& more) {
  const std::vector<Geophone> old = survey.geophones;
  for (const Geophone& geophone : more.geophones) {
    if (findGeophone(survey.geophones, geophone.x) < 0) {
      survey.geophones.push_back(geophone);
    }
  }
  std::stable_sort(survey.geophones.begin(), survey.geophones.end(),
                   [](const Geophone& a, const Geophone& b) { return a.x < b.x; });
  for (Shot& shot : survey.shots) {
    for (ShotTrace& trace : shot.traces) {
      trace.geophone = findGeophone(survey.geophones, old[static_cast<std::size_t>(trace.geophone)].x);
    }
  }
}

bool sameSpread(const Shot& a, const Shot& b) {
  return std::abs(a.point.x - b.point.x) <= kSamePlace && a.traces.size() == b.traces.size() &&
         std::equal(a.traces.begin(), a.traces.end(), b.traces.begin(),
                    [](const ShotTrace& p, const ShotTrace& q) { return p.geophone == q.geophone; });
}

bool sameSampling(const Survey& survey, const Shot& a, const Shot& b) {
  if (a.blows.empty() || b.blows.empty()) {
    return false;
  }
  const auto interval = [&](const Shot& shot) {
    return survey.records[static_cast<std::size_t>(shot.blows[0].record)]->traces[0].sampleInterval;
  };
  return std::abs(interval(a) - interval(b)) <= 1e-6 * interval(a);
}

}  // namespace

Survey merged(Survey survey, const Survey& more) {
  const int firstNewRecord = static_cast<int>(survey.records.size());
  survey.records.insert(survey.records.end(), more.records.begin(), more.records.end());
  survey.remarks.insert(survey.remarks.end(), more.remarks.begin(), more.remarks.end());
  mergeGeophones(survey, more);
  for (Shot shot : more.shots) {
    for (Blow& blow : shot.blows) {
      blow.record += firstNewRecord;
    }
    for (ShotTrace& trace : shot.traces) {
      trace.geophone = findGeophone(survey.geophones, more.geophones[static_cast<std::size_t>(trace.geophone)].x);
    }
    const auto known = std::find_if(survey.shots.begin(), survey.shots.end(), [&](const Shot& s) {
      return sameSpread(s, shot) && sameSampling(survey, s, shot);
    });
    if (known != survey.shots.end()) {
      known->blows.insert(known->blows.end(), shot.blows.begin(), shot.blows.end());
    } else {
      survey.shots.push_back(std::move(shot));
    }
  }
  std::stable_sort(survey.shots.begin(), survey.shots.end(),
                   [](const Shot& a, const Shot& b) { return a.point.x < b.point.x; });
  return survey;
}

}  // namespace strikeplate
