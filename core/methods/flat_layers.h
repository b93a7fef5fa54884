#pragma once

#include <span>
#include <string>
#include <vector>

#include "core/base/estimate.h"
#include "core/methods/two_layers.h"
#include "core/traveltime/branch.h"

namespace strikeplate {

/// Plane level layers under a shot. With n velocities there are n - 1 thicknesses and n - 1 depths, the latter to the
/// tops of layers 2, 3, ...
struct FlatLayers {
  bool determined = false;
  std::string reason;                 ///< when not determined
  std::vector<Estimate> velocities;   ///< m/s
  std::vector<Estimate> thicknesses;  ///< m
  std::vector<Estimate> depths;       ///< m
};

/// From the fitted lines of the branches, the direct one first, by stripping intercept times:
///
///   h_(n-1) = (ti_n - 2 sum_(k<n-1) h_k c(k, n)) / (2 c(n-1, n)),  c(i, j) = sqrt(s_i^2 - s_j^2)
///
/// with slownesses s and intercept times ti of the lines. sigma to first order with each line's full
/// slope-intercept covariance. Not determined unless there are two lines or more, velocities grow with depth, and
/// every thickness comes out positive. Source: Ewing, Woollard & Vine, GSA Bull. 50 (1939) 257-296.
FlatLayers layersFromIntercepts(std::span<const LineFit> branches);

/// Depth (m) to the second layer from the offset where the first two lines cross, xc = (a2 - a1)/(s1 - s2) and
/// h = (xc/2) sqrt((s1 - s2)/(s1 + s2)), sigma to first order with both lines' covariances. Not determined where
/// they do not cross at a positive offset. Source: Redpath, AD-768 710 (1973); derivatives own.
Estimate depthWhereLinesCross(const LineFit& nearer, const LineFit& farther);

/// From crossover distances (m, between branches n - 1 and n) and velocities (m/s), one more:
///
///   ti_n = ti_(n-1) + xc_n (s_(n-1) - s_n),  ti_1 = 0,
///
/// then as from intercepts; no approximation. Data independent. Source: Redpath, AD-768 710 (1973); algebra own.
FlatLayers layersFromCrossovers(std::span<const Datum> crossovers, std::span<const Datum> velocities);

/// Intercept times (s) of the head waves of layers 2, 3, ... under level layers: ti_n = 2 sum h_k c(k, n). Needs
/// velocities that grow with depth, one more than thicknesses. Source as layersFromIntercepts.
std::vector<double> interceptTimes(std::span<const double> velocities, std::span<const double> thicknesses);

}  // namespace strikeplate
