#pragma once

#include <optional>
#include <span>
#include <string>
#include <vector>

#include "core/base/estimate.h"
#include "core/traveltime/branch.h"

namespace strikeplate {

/// N level plane layers under one shot.
struct FlatLayers {
  bool determined = false;
  std::string reason;                ///< why not
  std::vector<Estimate> velocities;  ///< m/s, N of them, intervals from slowness
  std::vector<Estimate> thickness;   ///< m, N - 1
  std::vector<Estimate> depths;      ///< m below the shot, to the top of layer 2, 3, ... N
};

/// Thicknesses (m) of N - 1 layers from N slownesses (s/m, falling) and the N - 1 intercept times (s) of layers 2 to
/// N:
///
///   h(n-1) = (ti(n) - 2 sum_{k<n-1} h(k) c(k,n)) / (2 c(n-1,n)),  c(i,j) = sqrt(s(i)^2 - s(j)^2)
///
/// Nothing unless the slownesses fall and every thickness is positive.
/// Source: Ewing, Woollard and Vine, GSA Bulletin 50 (1939) 257-296.
std::optional<std::vector<double>> thicknessesFromIntercepts(std::span<const double> slowness,
                                                             std::span<const double> intercepts);

/// Intercept times (s) of layers 2 to N from the crossover distances (m) between neighbouring branches:
/// ti(n) = ti(n-1) + xc(n) (s(n-1) - s(n)), ti(1) = 0. Exact for level layers. Source: Redpath (1973); own algebra.
std::vector<double> interceptsFromCrossovers(std::span<const double> slowness, std::span<const double> crossovers);

/// The layers from the fitted lines of one shot's side, direct first, by intercept times or by the crossovers of
/// neighbouring lines. sigma to first order with each line's covariance of slope and intercept. By crossovers the
/// direct line may be a free one: a late trigger then moves no depth.
FlatLayers flatLayersFromIntercepts(std::span<const LineFit> lines);
FlatLayers flatLayersFromCrossovers(std::span<const LineFit> lines);

}  // namespace strikeplate
