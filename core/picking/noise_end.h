#pragma once

#include <span>
#include <vector>

namespace strikeplate {

/// Evidence, for every sample of a whitened trace of unit noise, that the noise ends right before it: what follows
/// sounds like signal (faded over 7 ms), what went before did not (faded over 17 ms).
///
/// Each sample contributes ln p(energy | signal) / p(energy | noise), energy taken over 1 ms, signal a mixture of
/// levels. It counts for a signal by no more than a bound, so that a strong later wave does not outshine the first;
/// quiet after a burst of crosstalk counts against an onset at the burst. Own rule.
std::vector<double> noiseEndEvidence(std::span<const float> white);

}  // namespace strikeplate
