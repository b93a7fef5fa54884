#pragma once

#include <vector>

#include "core/line/gather.h"
#include "core/survey/survey.h"

namespace strikeplate {

/// The traces of one shot as they are picked: the aligned stack of its used blows. A shot without records has traces
/// without samples.
Gather gatherOf(const Survey& survey, int shot);

std::vector<Gather> gathersOf(const Survey& survey);

/// True when `shot` of both surveys has the same stack (the same records, lags and use), whatever its picks or place.
bool sameStack(const Survey& a, const Survey& b, int shot);

}  // namespace strikeplate
