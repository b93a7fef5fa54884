#pragma once

#include "core/picking/line_work.h"

namespace strikeplate {

/// Silences what the trigger leaves on the traces right after time zero.
///
/// A burst counts as crosstalk when it stands at the same time, within 10 ms of time zero, on traces that no ground
/// wave can have reached (3000 m/s), with a mean whitened energy over twice the noise's in a bin of 1 ms. It is set
/// to zero on every trace of the gather that a wave of 600 m/s has not reached. Own rule.
void silenceCrosstalk(LineWork& work);

}  // namespace strikeplate
