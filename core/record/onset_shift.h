#pragma once

#include "core/record/butterworth.h"

namespace strikeplate {

/// By how much the zero-phase filter moves a first break that is read off a filtered trace, s; below zero when the
/// break seems early. Measured, on each call, on a pulse that leaves zero as the square of time and peaks after 4 ms
/// (dominant frequency near 60 Hz): the time at which it passes 5 % of its first peak, filtered less unfiltered.
/// Sharper pulses move less, blunter ones more. Common practice, no source.
double onsetShift(const PassBand& band);

}  // namespace strikeplate
