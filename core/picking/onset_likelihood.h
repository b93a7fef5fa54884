#pragma once

#include <cstddef>
#include <span>
#include <vector>

#include "core/picking/pulse_bank.h"

namespace strikeplate {

/// How well each onset position explains one fixed stretch of a trace, against noise alone.
struct OnsetLikelihood {
  std::size_t first = 0;         ///< sample that comes right after the first onset position
  std::vector<double> up, down;  ///< log likelihood ratio for a first swing in either direction, by position
  std::vector<double> byPulse;   ///< log likelihood ratio of each pulse of the bank, summed over positions
};

/// Log likelihood ratios for onsets just before samples `first` to `last` - 1 of a whitened trace of unit noise,
/// given its samples up to `last` + `beyond` (exclusive; cut at the trace's end).
///
/// Closed form: an arrival is amplitude x pulse + deviation, Gaussian about +-scale x pulse with the covariance S of
/// PulseFilter, so that
///   ln p(e | arrival) - ln p(e | noise) = (|e|^2 - |L^-1 (e -+ scale m)|^2) / 2 - sum ln L_ii. Summed over
/// pulses (with their weights) and over the scales near `loudness`, the largest swing in noise rms. Common Gaussian
/// algebra; own arrangement. Needs first < last.
OnsetLikelihood onsetLikelihood(const PulseBank& bank, std::span<const float> white, std::size_t first,
                                std::size_t last, std::size_t beyond, double loudness);

/// ln(e^a + e^b), also when both are very small.
double logAdd(double a, double b);

}  // namespace strikeplate
