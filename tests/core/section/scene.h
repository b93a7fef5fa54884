#pragma once

#include <functional>
#include <random>
#include <vector>

#include "core/section/section.h"
#include "core/traveltime/arrivals.h"

namespace strikeplate::testing {

/// Ground of known make-up: elevations (m) and velocities (m/s) as functions of x (m).
struct Scene {
  std::function<double(double)> ground = [](double) { return 0.0; };
  std::vector<std::function<double(double)>> interfaces;  ///< elevation, from the top
  std::vector<std::function<double(double)>> velocities;  ///< one more

  [[nodiscard]] double depth(int layer, double x) const { return ground(x) - interfaces[layer - 2](x); }
};

/// Level ground with plane interfaces: depth at x = 0 and slope (downwards positive).
Scene planeScene(const std::vector<double>& velocities, const std::vector<double>& depths,
                 const std::vector<double>& slopes);

/// Where a survey stands.
struct Spread {
  std::vector<double> geophones;
  std::vector<double> shots;
};
Spread evenSpread(int geophones, double spacing, const std::vector<double>& shots);

/// Exact times, and the layer that each came through.
struct TrueTimes {
  TravelTimes times;
  std::vector<int> layers;
};

/// First arrivals by a shortest-way network, independent of core/section: every way from shot to geophone runs
/// over points of the interfaces `spacing` m apart, straight between them; along a refractor from point to point as
/// far as one can see the other from below. Nothing is interpolated. All picks get `sigma` (s).
TrueTimes networkTimes(const Scene& scene, const Spread& spread, double spacing, double sigma);

/// Times of flat or plane dipping two layers and of flat layers in closed form (Ewing, Woollard & Vine 1939).
TrueTimes flatTimes(const std::vector<double>& velocities, const std::vector<double>& thicknesses,
                    const Spread& spread, double sigma);

/// The same times with normal errors of `sigma` (s) times `factor`, and a share of gross mispicks.
TravelTimes withNoise(const TravelTimes& times, std::mt19937& random, double factor = 1.0, double gross = 0.0);

/// Root mean square over the section's positions between the outermost geophones of (depth - truth) / truth.
double depthError(const Section& section, const Scene& scene, const Spread& spread, int layer);

/// Share of those positions whose band holds the truth.
struct Coverage {
  double share68 = 0.0;
  double share95 = 0.0;
};
Coverage coverageOf(const Section& section, const Scene& scene, const Spread& spread, int layer);

}  // namespace strikeplate::testing
