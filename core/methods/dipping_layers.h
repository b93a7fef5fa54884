#pragma once

#include <span>
#include <string>
#include <vector>

#include "core/base/estimate.h"
#include "core/traveltime/branch.h"

namespace strikeplate {

/// Reversed times of one refractor: A shoots toward larger x, B back. Slopes in s/m, intercepts in s.
struct ReversedTimes {
  double slopeA = 0.0, interceptA = 0.0, slopeB = 0.0, interceptB = 0.0;
};

/// N plane dipping layers of one strike. Interface i separates velocity i and i + 1.
struct DippingPlanes {
  bool determined = false;
  std::string reason;                          ///< why not
  std::vector<double> velocity;                ///< m/s, N
  std::vector<double> dip;                     ///< rad, N - 1, positive when deeper toward B
  std::vector<double> thicknessA, thicknessB;  ///< m, vertical, N - 1, below A and below B
};

/// The layers from v1 (m/s) and the reversed times of refractors 2 to N, layer by layer: the angles at the surface
/// are asin(v1 slope), each known interface refracts them, and at the refractor theta = (d + e)/2, dip = (e - d)/2,
/// v = v_above / sin theta, thickness = (intercept - time spent above) v_above / (cos d + cos e).
///
/// Not determined, with a reason, when |v1 slope| > 1, a ray cannot reach the refractor, the velocity does not grow
/// or a thickness is not positive. Source: Adachi, Kumamoto J. Sci. A 2 (1954) 18; Mota, Geophysics 19 (1954) 242;
/// Johnson, Geophysics 41 (1976) 418; the recursion in this form is our own derivation.
DippingPlanes dippingPlanes(double v1, std::span<const ReversedTimes> refractors);

/// Fitted lines of one refractor from A and from B.
struct ReversedLines {
  LineFit fromA, fromB;
};

/// The same with sigmas, depths being vertical below the two shots.
struct DippingLayers {
  bool determined = false;
  std::string reason;
  std::vector<Estimate> velocities;        ///< m/s, N
  std::vector<Estimate> dips;              ///< rad, N - 1, positive when deeper toward B
  std::vector<Estimate> depthsA, depthsB;  ///< m, to the tops of layers 2 to N below A and B
};

/// v1 from both direct lines together (weighted mean slowness; only `fromA` or `fromB` may be determined); sigma to
/// first order with each line's covariance of slope and intercept, intervals of velocities from slowness.
DippingLayers dippingLayers(const ReversedLines& direct, std::span<const ReversedLines> refractors);

/// What the times from A to B and from B to A differ by on one refractor (s), extrapolated over the distance (m)
/// between the shots; zero where the branches belong together.
Estimate reciprocityGap(const ReversedLines& refractor, double distance);

}  // namespace strikeplate
