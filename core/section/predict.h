#pragma once

#include <vector>

#include "core/section/section.h"
#include "core/section/solve.h"
#include "core/traveltime/arrivals.h"

namespace strikeplate {

/// First-arrival times (s, with the trigger delays that the section found) through a finished section, for every
/// arrival of `wanted`, whose own times and layers are not looked at. `wanted` has the geophones and shots that the
/// section was solved for with `options`. Empty when the section is not determined or belongs to other places.
std::vector<double> predictedTimes(const TravelTimes& wanted, const Section& section, const SectionOptions& options);

}  // namespace strikeplate
