#pragma once

#include <vector>

#include "core/record/record.h"

namespace strikeplate {

/// A channel whose polarity is the opposite of its neighbours'.
struct ReversedChannel {
  std::size_t trace = 0;   ///< from 0
  double agreement = 0.0;  ///< with its neighbours, -1 to 1, below zero
};

/// Finds channels that are reversed on all records of a spread, from the whole wave train and before anything is
/// picked.
///
/// Each trace is compared with the next two on the same side of the shot, between the times of 6000 and 100 m/s, at 3
/// to 80 Hz without the mains. Where the envelope of their cross-correlation is highest the waves of both lie on each
/// other; there the correlation itself is positive for equal and negative for opposite polarity, and stays so under
/// the dispersion of surface waves, whose effects from the left and the right cancel. The agreement of a channel is
/// the mean over its pairs and records; the least agreeing channel is turned as long as its agreement is below -0.25.
/// Nothing is said with fewer than five shot points (three still gave false finds, at down to -0.42), or where
/// channels do not agree with each other at all (median below 0.1). `dead` marks channels that are left out, one for
/// each trace; all records have that many traces. A method of our own; on three practice lines of seven shot points
/// with faults the reversed channels come to -0.43 to -0.63, all others, and those of nine lines without faults, to
/// no less than -0.13.
std::vector<ReversedChannel> reversedChannels(const std::vector<const ShotRecord*>& records,
                                              const std::vector<bool>& dead);

}  // namespace strikeplate
