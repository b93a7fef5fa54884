#pragma once

#include "core/picking/line_work.h"

namespace strikeplate {

/// What the other shots say about each first break: times as a smooth function of offset and midpoint, which by
/// reciprocity is the same whichever way a path is travelled, plus one constant per shot for its trigger.
///
/// Sets priorMean and priorScale of every usable trace from the beliefs of the traces of other shots nearby in offset
/// and midpoint (locally linear, Cleveland 1979, J. Am. Stat. Assoc. 74, 829-836; Student weights against gross
/// errors); scale 0 where fewer than the equivalent of four traces are near.
void findLinePrior(LineWork& work);

}  // namespace strikeplate
