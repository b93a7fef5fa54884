#pragma once

#include <vector>

#include "core/traveltime/arrivals.h"
#include "core/traveltime/branch.h"

namespace strikeplate {

/// The branches of all shots: the arrivals of one shot, on one side, through one layer, each with its fitted line. In
/// the order of shot, side (+1 first), layer. Arrivals without a layer and those at the shot itself belong to none.
/// The direct branch is held to zero time at the shot unless the shot is buried.
std::vector<Branch> findBranches(const TravelTimes& times);

/// The branch of a shot's side and layer, or nullptr.
const Branch* findBranch(const std::vector<Branch>& branches, int shot, int side, int layer);

/// Where two lines of one shot's side cross.
struct Crossover {
  Estimate offset;    ///< m
  double time = 0.0;  ///< s
};

/// Offset at which two fitted lines cross, x = (a2 - a1) / (b1 - b2), with its sigma to first order from both lines'
/// covariances. Not determined when the second line is not the flatter one, or they cross at a negative offset.
Crossover crossover(const LineFit& nearer, const LineFit& farther);

}  // namespace strikeplate
