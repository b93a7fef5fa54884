#pragma once

#include <string>
#include <vector>

#include "core/base/result.h"
#include "core/record/record.h"

namespace strikeplate {

/// How one blow sits against the others at its shot point.
struct BlowLag {
  double lag = 0.0;         ///< s by which its arrivals come later than the stack's on the recorder's clock
  double similarity = 0.0;  ///< median correlation with the stack of the others around the first break, -1 to 1
  bool found = false;       ///< false: too few traces correlate, the lag is taken as 0
};

/// What aligning the blows of a shot point found out.
struct BlowAlignment {
  std::vector<BlowLag> blows;        ///< one for each blow
  std::vector<std::string> remarks;  ///< late triggers and blows that fit nowhere, one sentence each
};

/// Finds the lags between repeated blows at one shot point.
///
/// Traces with the same number are compared in a window of 8 ms either side of the coarse first break, by normalised
/// cross-correlation with a parabola through its peak; of the peaks above 0.6 the median over the traces is the lag
/// of a pair of blows, and a blow's lag is the median over its pairs, shifted so that the lags of all have median
/// zero. (Over the whole record surface waves dominate and the lag is wrong by 1 to 2 ms: measured on a real line.)
/// A trigger that fires late makes arrivals come early: lag below zero. Beyond 1.5 ms a blow is named in the remarks.
/// A single blow has lag 0 and similarity 1. Blows may differ in sample interval and delay; dead traces are passed
/// over. Needs at least one blow; each with at least one trace with samples. Common practice, no source.
BlowAlignment alignBlows(const std::vector<const ShotRecord*>& blows);

/// Traces of one shot point, all on one time axis.
struct StackedTraces {
  double sampleInterval = 0.0;             ///< s
  double start = 0.0;                      ///< s, recorder time of the first sample
  std::vector<std::vector<float>> traces;  ///< equal lengths; zeros where no blow has a live trace
};

/// Mean of the blows, each moved earlier by its lag (s), over the time that all of them cover. Each trace is weighted
/// by one over the variance of what it recorded until 5 ms before the blow, at most 20 to 1; all weigh the same where
/// a blow has less than 50 ms of that.
///
/// The axis has the smallest sample interval among the blows and times on the grid of the first such blow, so that a
/// single blow, and blows without lag, come out as they are; others are interpolated (see interpolated()). Where
/// descaling factors of a trace differ between blows, samples are brought to the first blow's. A trace dead in one
/// blow is taken from the others.
/// Fails when the blows do not overlap for at least half of the shortest one's time, or have different numbers of
/// traces. Needs at least one blow and one lag for each.
Result<StackedTraces> stackBlows(const std::vector<const ShotRecord*>& blows, const std::vector<double>& lags);

}  // namespace strikeplate
