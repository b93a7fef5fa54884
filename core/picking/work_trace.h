#pragma once

#include <span>
#include <vector>

#include "core/line/gather.h"

namespace strikeplate {

/// Samples on the axis that the line picker works on: every kWorkInterval, the first at recorder time `start` (s).
struct WorkTrace {
  double start = 0.0;
  std::vector<float> samples;
};

/// s between the samples that the line picker works on. Hammer blows reach to a few hundred hertz.
inline constexpr double kWorkInterval = 0.00025;

/// A trace brought to kWorkInterval: smoothed and thinned out when it is denser (triangular weights, no phase shift),
/// interpolated (four-point cubic, Catmull & Rom 1974) when it is sparser. The work axis holds recorder time
/// gather.start. Samples that are not finite count as 0.
WorkTrace workTrace(const Gather& gather, std::size_t trace);

}  // namespace strikeplate
