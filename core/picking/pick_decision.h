#pragma once

#include <optional>

#include "core/picking/line_work.h"
#include "core/picking/onset.h"

namespace strikeplate {

/// The pick that a trace's posterior justifies: its median, with a sigma from its width and the known limits of the
/// method. None when less than 0.75 of the probability lies within 2 ms, or sigma exceeds 1.3 ms. Thresholds own,
/// tuned on wave-equation records with known truth and on a real line.
std::optional<Onset> decide(const LineTrace& trace);

}  // namespace strikeplate
