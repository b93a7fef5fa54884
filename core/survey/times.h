#pragma once

#include "core/survey/survey.h"
#include "core/traveltime/arrivals.h"

namespace strikeplate {

/// The survey's usable picks as travel times: trigger corrections applied, dead traces and picks at times not after
/// the blow left out. Shots keep the survey's numbering; a pick's hand assignment comes along, others have layer 0.
TravelTimes travelTimes(const Survey& survey);

/// Index of a shot's trace in `times`, or -1 when it has no usable pick.
int arrivalIndex(const TravelTimes& times, int shot, int trace);

}  // namespace strikeplate
