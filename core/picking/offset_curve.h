#pragma once

#include "core/picking/line_work.h"

namespace strikeplate {

/// One curve of first breaks over offset for the whole line, from the evidence of all shots and both directions
/// together: a wide prior that tells a far, noisy trace which of its waves the line's first one can be.
///
/// Traces are pooled by offset, each one's bounded evidence blurred by what depth and triggers may differ; the curve
/// is the most probable path through the pools (offset_path.h). By reciprocity the direction of travel does not
/// matter, and far offsets share their midpoints, so that a slope of the ground hardly does. Sets curveMean and
/// curveScale of every usable trace that has evidence; the scale covers how far sure traces lie from the curve.
/// Stacking over offset is common practice; own arrangement.
void findOffsetCurve(LineWork& work);

}  // namespace strikeplate
