#pragma once

#include "core/picking/line_work.h"

namespace strikeplate {

/// Marks traces without ground motion as not usable: those that stay below 3 % of both neighbours' rms while their
/// own largest sample is under 6 of their rms, so that nothing stands out;
/// and all traces of a geophone that is so for most shots. Own rule. Needs `traces` of one gather to
/// follow each other; the outermost traces are compared with their one neighbour.
void markDeadTraces(std::vector<LineTrace>& traces);

}  // namespace strikeplate
