#pragma once

#include <span>
#include <vector>

namespace strikeplate {

/// Evidence, for every sample of a whitened trace of unit noise, that the noise ends right before it: the sum over
/// all later samples of ln p(energy | signal) / p(energy | noise), energy taken over 1 ms, signal a mixture of
/// levels.
///
/// What is quiet counts against an onset before it, so a burst of crosstalk followed by noise is no onset; what is
/// loud counts for it, by no more than a bound, so that a strong later wave does not outshine the first. Own rule.
std::vector<double> noiseEndEvidence(std::span<const float> white);

}  // namespace strikeplate
