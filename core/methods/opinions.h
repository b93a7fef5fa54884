#pragma once

#include <vector>

#include "core/methods/opinion.h"
#include "core/traveltime/arrivals.h"
#include "core/traveltime/branch.h"

namespace strikeplate {

/// The depths by every route for which the picks hold the data; a route without data is absent.
std::vector<Opinion> secondOpinions(const TravelTimes& times, const std::vector<Branch>& branches);

}  // namespace strikeplate
