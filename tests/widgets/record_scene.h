#pragma once

#include "core/survey/survey.h"
#include "widgets/scene.h"

namespace strikeplate::testing {

inline constexpr double kInterval = 2.5e-4;  // s
inline constexpr double kStart = -0.02;      // s

/// When the wave arrives at a geophone `offset` m away, s.
double onsetAt(double offset);

/// A line with a shot at -5 m and one at the other end, geophones 2 m apart from 0 m, a sharp onset at onsetAt() on
/// every trace over weak noise of a fixed seed, 120 ms long; nothing picked.
Survey sharpLine(int geophones);

/// The same with every trace picked automatically where its wave arrives, sigma 0.5 ms.
Survey pickedLine(int geophones);

/// A survey as a scene in which the first shot is selected.
Scene sceneOf(const Survey& survey);

}  // namespace strikeplate::testing
