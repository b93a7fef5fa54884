#pragma once

#include "core/base/progress.h"
#include "core/picking/line_work.h"
#include "core/picking/pulse_bank.h"

namespace strikeplate {

/// Sharpens every belief: likelihood of the onset over all pulses from 6 ms before to 4 ms after it, joined along
/// offset. Replaces posterior, belief and beliefSigma of usable traces; false when asked to stop.
bool finePass(LineWork& work, const std::vector<PulseBank>& banks, const Progress& progress);

/// Judges which beliefs can be built upon: sureness of every usable trace, from its support and from what its noise
/// alone can pretend. Needs the traces whitened as for the last finePass.
void judgeSureness(LineWork& work, const std::vector<PulseBank>& banks);

/// Ends each usable trace's noise 2.5 ms, or three times its uncertainty, before its present belief.
void updateNoise(LineWork& work);

}  // namespace strikeplate
