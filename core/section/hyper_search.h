#pragma once

#include <vector>

#include "core/section/posterior.h"

namespace strikeplate {

/// What a search may touch.
struct HyperLimits {
  int leastNoise = 0;
  bool all = true;  ///< correlation lengths and deviations of the deepest layer's velocity too
};

/// The choice of hyperparameters with the greatest evidence found by searching one coordinate of the grid after the
/// other from `start`, `sweeps` times over, within limits.
HyperChoice searchHyper(const LinearisedPosterior& posterior, HyperChoice start, const HyperLimits& limits,
                        int sweeps);

/// A posterior under one choice of hyperparameters, and how much it counts.
struct WeightedFit {
  SectionFit fit;
  double weight = 0.0;
};

/// The choices around the best one that matter, all hyperparameters jointly: the grid is explored from `mode`
/// outwards, the likeliest unexplored neighbour first, until no neighbour has a share worth having or `most` are
/// found. Weights add up to 1, the heaviest first.
std::vector<WeightedFit> exploreHyper(const LinearisedPosterior& posterior, const HyperChoice& mode, int most);

/// ln of the sum over all choices found, relative to the best.
double logSpread(const std::vector<WeightedFit>& fits);

}  // namespace strikeplate
