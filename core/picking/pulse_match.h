#pragma once

#include <span>
#include <vector>

#include "core/picking/noise_model.h"

namespace strikeplate {

/// Evidence, for every sample of a whitened trace of unit noise, that the first arrival starts right before it, by
/// matched filters: pulses of four widths seen through the whitener, either sign, amplitude unknown (log sum over a
/// grid), what the pulse leaves unexplained counting as noise. Bounded above, so that no wave outshines another by
/// much; less what earlier arrivals there seem to be (faded over 40 ms). Matched filter: North 1943, RCA report
/// PTR-6C; the rest own rule.
std::vector<double> pulseMatchEvidence(const NoiseModel& noise, std::span<const float> white);

}  // namespace strikeplate
