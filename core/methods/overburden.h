#pragma once

#include <vector>

#include "core/base/estimate.h"
#include "core/methods/two_layers.h"

namespace strikeplate {

/// What lies above a refractor at one place: slowness (s/m) of layers 1 to m, and thickness (m) of layers 1 to m - 1.
struct Overburden {
  std::vector<Datum> slowness;
  std::vector<Datum> thickness;
};

/// A delay time (s) and the refractor's slowness (s/m), with the covariance of both.
struct Delay {
  Datum time;
  Datum refractor;
  double covariance = 0.0;  ///< s * s/m
};

/// Depth (m) of a refractor from the delay time at a place:
///
///   z = sum_{k<m} h(k) + (D - sum_{k<m} h(k) c(k)) / c(m),  c(k) = sqrt(s(k)^2 - s^2)
///
/// sigma to first order. Exact for level layers; under a plane dip it is the perpendicular depth. Not determined,
/// with a reason, when the refractor is not the fastest or the layers above use up the delay. Source: Gardner,
/// Geophysics 4 (1939) 247; Barry (1967); derivatives own.
Estimate depthFromDelay(const Delay& delay, const Overburden& above);

}  // namespace strikeplate
