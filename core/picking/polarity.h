#pragma once

#include "core/picking/line_work.h"

namespace strikeplate {

/// Settles which way first breaks swing: one sign for the line from all traces' upness, the other one for channels
/// whose traces, over the shots, plainly say so. Sets `polarity` and `reversed` of every usable trace; polarity stays
/// 0 where the line's own sign is not plain.
void findPolarity(LineWork& work);

}  // namespace strikeplate
