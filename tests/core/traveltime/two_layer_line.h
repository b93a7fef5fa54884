#pragma once

#include <algorithm>
#include <cmath>
#include <initializer_list>

#include "core/traveltime/arrivals.h"

namespace strikeplate {

/// Exact first arrivals over 500 m/s, `depth` m thick, on 2000 m/s: 24 geophones from 2 m, 4 m apart.
inline TravelTimes twoLayerLine(std::initializer_list<double> shots, double depth = 5.0, double sigma = 0.5e-3) {
  TravelTimes times;
  for (int i = 0; i < 24; ++i) {
    times.geophones.push_back({2.0 + 4.0 * i, 0.0});
  }
  const double c = std::sqrt(1.0 / (500.0 * 500.0) - 1.0 / (2000.0 * 2000.0));
  for (const double x : shots) {
    const int shot = static_cast<int>(times.shots.size());
    times.shots.push_back({x, 0.0, 0.0});
    for (int g = 0; g < 24; ++g) {
      const double offset = std::abs(times.geophones[static_cast<std::size_t>(g)].x - x);
      const double direct = offset / 500.0, head = offset / 2000.0 + 2.0 * depth * c;
      Arrival a;
      a.shot = shot;
      a.trace = g;
      a.geophone = g;
      a.time = std::min(direct, head);
      a.sigma = sigma;
      a.layer = direct < head ? 1 : 2;
      times.arrivals.push_back(a);
    }
  }
  return times;
}

}  // namespace strikeplate
