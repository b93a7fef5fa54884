#pragma once

#include <vector>

#include "core/picking/line_work.h"

namespace strikeplate {

/// Adds to the log evidence of equally spaced onset times (the first at `origin`, `step` apart, s) what is known
/// apart from the samples: a trusted pick, the speed of the fastest ground, a predicted time, the other shots' prior
/// (Student t, three degrees of freedom).
void addTracePrior(const LineTrace& trace, double origin, double step, std::vector<double>& logEvidence);

}  // namespace strikeplate
