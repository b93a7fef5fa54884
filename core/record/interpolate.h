#pragma once

#include <cstddef>
#include <span>
#include <vector>

namespace strikeplate {

/// Values of a band-limited signal between its samples, by a sinc of 2 x 12 samples under a Kaiser window (beta 9).
///
/// out[i] is the signal at sample position `first` + i x `step` (in samples of the input, any real numbers); the
/// input goes on level beyond its ends. Whole positions give the sample itself; a constant stays exactly that
/// constant. Error below 1e-4 of the amplitude for frequencies up to 0.35 of the sampling frequency
/// (tests/core/record). Frequencies above half the new sampling frequency are not removed: `step` should not be
/// above 1. Sources: Shannon, Proc. IRE 37 (1949) 10-21; Kaiser and Schafer, IEEE Trans. ASSP 28 (1980) 105-107
/// (window). Needs a non-empty input.
std::vector<float> interpolated(std::span<const float> samples, double first, double step, std::size_t count);

}  // namespace strikeplate
