#pragma once

#include <optional>

#include "core/picking/line_work.h"
#include "core/picking/onset.h"

namespace strikeplate {

/// The pick that a trace's posterior justifies: its median, with a sigma from its width and the known limits of the
/// method. None when less than 0.7 of the probability lies within 2 ms, when it and its neighbours are hardly
/// likelier with an arrival than without (a weak trace passes where neighbours and other shots leave less than 0.9 ms
/// open), or when sigma exceeds 1.5 ms. Thresholds own, tuned on wave-equation records with known truth and on a real
/// line.
std::optional<Onset> decide(const LineTrace& trace);

}  // namespace strikeplate
