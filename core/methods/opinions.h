#pragma once

#include <vector>

#include "core/methods/opinion.h"
#include "core/traveltime/arrivals.h"
#include "core/traveltime/branch.h"

namespace strikeplate {

/// Depth to layer 2 by intercept time, for each shot and side with a direct branch and one through layer 2. The
/// covariance of intercept and slope enters the sigma. Source: Sheriff and Geldart, Exploration Seismology (1995).
std::vector<Opinion> secondOpinions(const TravelTimes& times, const std::vector<Branch>& branches);

}  // namespace strikeplate
