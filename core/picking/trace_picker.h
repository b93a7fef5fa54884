#pragma once

#include <limits>
#include <optional>
#include <span>
#include <vector>

#include "core/line/gather.h"
#include "core/picking/onset.h"

namespace strikeplate {

/// Recorder times between which an onset is looked for, s.
struct OnsetWindow {
  double from = -std::numeric_limits<double>::infinity();
  double to = std::numeric_limits<double>::infinity();
};

/// First break of one trace, looked at alone: where the energy ratio rises most in the window, then the onset before
/// that by Akaike's criterion.
///
/// `interval` is the time between samples in s (> 0), `start` the recorder time of the first sample in s. None when
/// the window holds fewer than 16 samples, the trace holds no signal or a value that is not finite, or nothing in
/// it rises clearly above what comes before. Accuracy is a sample at best: a wave that leaves zero slowly is picked
/// late by the time it takes to leave the noise, and sigma allows for that.
/// Energy ratio: Coppens 1985, Geophys. Prosp. 33, 1212-1231, with a floor under the earlier energy.
/// Refinement: Maeda 1985, Zisin 38, 365-379 (onset_aic.h).
std::optional<Onset> pickOnset(std::span<const float> samples, double interval, double start,
                               OnsetWindow window = {});

/// pickOnset for every trace of a gather, after the blow and not faster than 7000 m/s; dead traces get none.
std::vector<std::optional<Onset>> pickGather(const Gather& gather);

/// The onset nearest to where a hand points: Akaike's criterion within `halfWidth` (s) of `near` (s, recorder time).
/// None when the trace does not get livelier anywhere in there. Needs a valid `trace` and halfWidth > 0.
std::optional<Onset> snapOnset(const Gather& gather, std::size_t trace, double near, double halfWidth);

/// Sigma in s that an onset at `time` (s, recorder time) on this trace deserves: how long the wave takes to leave the
/// noise before it. Between half a sample interval (or 0.15 ms) and 3 ms. Needs a valid `trace`.
double sigmaAt(const Gather& gather, std::size_t trace, double time);

}  // namespace strikeplate
