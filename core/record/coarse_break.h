#pragma once

#include <optional>
#include <span>

namespace strikeplate {

/// Where on a trace to look, before anything is picked: about when the first wave comes, s of recorder time, good to
/// a few milliseconds on most traces and late on weak ones; nothing when no wave rises above the noise.
///
/// The energy of the trace's differences over 2 ms, smoothed over 2 ms, first passes four times the 98 % quantile of
/// its values before any wave can have come (6000 m/s), within the times that 6000 to 150 m/s plus 30 ms allow.
/// start: recorder time of the first sample, s; offset: m, >= 0. Common practice, no source; constants from trials.
std::optional<double> coarseBreak(std::span<const float> samples, double sampleInterval, double start, double offset);

}  // namespace strikeplate
