#pragma once

#include <vector>

#include "core/methods/opinion.h"
#include "core/traveltime/arrivals.h"
#include "core/traveltime/branch.h"

namespace strikeplate {

/// Depths under each shot by stripping the intercept times of the branches on one side of it, for as many layers as
/// have branches without a gap (flat_layers.h).
void addInterceptOpinions(const TravelTimes& times, const std::vector<Branch>& branches,
                          std::vector<Opinion>& opinions);

/// Depth to layer 2 under each shot from the offset where its first two lines cross.
void addCrossoverOpinions(const TravelTimes& times, const std::vector<Branch>& branches,
                          std::vector<Opinion>& opinions);

/// Depths under both shots of reversed profiles (dipping_layers.h): each shot with the farthest one at larger x that
/// has the same branches towards it, for as many layers as both have. Where the deepest one makes no sense, one
/// layer fewer is taken.
void addDippingOpinions(const TravelTimes& times, const std::vector<Branch>& branches,
                        std::vector<Opinion>& opinions);

}  // namespace strikeplate
