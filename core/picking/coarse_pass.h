#pragma once

#include "core/base/progress.h"
#include "core/picking/line_work.h"

namespace strikeplate {

/// First idea of every first break: evidence that noise ends (noise_end.h) and that a
/// pulse starts (pulse_match.h), joined along offset (offset_path.h) on a
/// 0.5 ms raster. Sets posterior, belief and beliefSigma of usable traces; false when asked to stop.
bool coarsePass(LineWork& work, const std::vector<NoiseModel>& noise, const Progress& progress);

/// Median and half of the 16-84 % width of a trace's posterior become its belief.
void beliefFromPosterior(LineTrace& trace);

}  // namespace strikeplate
