#pragma once

#include "widgets/scene.h"

namespace strikeplate::testing {

/// A survey of times alone, without records: 24 geophones 2 m apart, shots at both ends and in the middle, exact
/// times of 400 over 2000 m/s under 4 m, sigma 0.3 ms (Ewing, Woollard & Vine 1939).
Survey twoLayerSurvey();

/// The survey with its interpretation, as a view is shown it.
Scene sceneOfTimes(const Survey& survey);

}  // namespace strikeplate::testing
