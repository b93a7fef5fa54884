#pragma once

#include <vector>

#include "core/base/estimate.h"
#include "core/traveltime/arrivals.h"
#include "core/traveltime/branch.h"
#include "core/traveltime/reciprocity.h"

namespace strikeplate {

/// What each shot's times still seem to lack (s, to be added): least squares over the reciprocal pairs,
/// c_A - c_B = t_BA - t_AB, and the direct branches, c = -(time their free line has at the shot), each with its own
/// sigma, under the expectation that triggers are right to about 3 ms. One estimate for each shot; not determined for
/// a shot that neither speaks about. Positive after a late trigger.
///
/// The free line of a direct branch also bends for ground that is faster below; its sigma has a floor of 1 ms for
/// that, reciprocal times one of 0.3 ms. Common practice, no source.
std::vector<Estimate> suggestedTriggerCorrections(const TravelTimes& times, const std::vector<Branch>& branches,
                                                  const std::vector<ReciprocalPair>& pairs);

}  // namespace strikeplate
