#pragma once

#include <vector>

#include "core/methods/opinion.h"
#include "core/traveltime/arrivals.h"
#include "core/traveltime/branch.h"

namespace strikeplate {

/// Every hand method's depths, for each layer and place where the picks hold what it needs; a route without data is
/// absent, one whose data contradict its assumptions is there with the reason. Below the shots: "intercept time",
/// "crossover distance" (from a free direct line, so that no trigger delay enters) and "dipping layers". Below the
/// geophones: "plus-minus", "reciprocal" and "time terms". Where several pairs of shots speak about one place, the
/// surest one. Sources: flat_layers.h, dipping_layers.h, reversed_pair.h, time_terms.h.
std::vector<Opinion> secondOpinions(const TravelTimes& times, const std::vector<Branch>& branches);

}  // namespace strikeplate
