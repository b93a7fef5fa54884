#include "core/survey/times.h"

#include <algorithm>
#include <cmath>

namespace strikeplate {
namespace {

bool usable(const ShotTrace& trace, double time) {
  return trace.pick && trace.state != TraceState::Dead && std::isfinite(time) && time > 0.0 &&
         trace.pick->sigma > 0.0 && std::isfinite(trace.pick->sigma);
}

}  // namespace

TravelTimes travelTimes(const Survey& survey) {
  TravelTimes times;
  times.geophones = survey.geophones;
  for (std::size_t s = 0; s < survey.shots.size(); ++s) {
    const Shot& shot = survey.shots[s];
    times.shots.push_back(shot.point);
    const std::size_t first = times.arrivals.size();
    for (std::size_t t = 0; t < shot.traces.size(); ++t) {
      const ShotTrace& trace = shot.traces[t];
      const double time = trace.pick ? trace.pick->time + shot.triggerCorrection : 0.0;
      if (usable(trace, time)) {
        times.arrivals.push_back({static_cast<int>(s), static_cast<int>(t), trace.geophone, time, trace.pick->sigma,
                                  trace.pick->layer, trace.pick->layer > 0});
      }
    }
    std::stable_sort(times.arrivals.begin() + static_cast<std::ptrdiff_t>(first), times.arrivals.end(),
                     [](const Arrival& a, const Arrival& b) { return a.geophone < b.geophone; });
  }
  times.ground = Ground(times.geophones, times.shots);
  return times;
}

int arrivalIndex(const TravelTimes& times, int shot, int trace) {
  const auto first = std::lower_bound(times.arrivals.begin(), times.arrivals.end(), shot,
                                      [](const Arrival& a, int s) { return a.shot < s; });
  for (auto a = first; a != times.arrivals.end() && a->shot == shot; ++a) {
    if (a->trace == trace) {
      return static_cast<int>(a - times.arrivals.begin());
    }
  }
  return -1;
}

}  // namespace strikeplate
