#pragma once

#include "core/line/gather.h"
#include "core/survey/interpretation.h"
#include "widgets/record_axes.h"

namespace strikeplate {

/// The part of a shot that matters first: times from a little before the blow to about 1.6 times its latest pick or
/// predicted time, all traces. With fewer than half of the live traces picked the program's own look at each trace
/// fills in. Reduced times get their own span. `interpretation` may be null.
RecordRange homeRange(const Gather& gather, const Shot& shot, int shotIndex, const Interpretation* interpretation,
                      const RecordDisplay& display);

/// All that there is to see: the record from end to end and every trace.
RecordRange fullRange(const Gather& gather, const Shot& shot, const RecordDisplay& display);

/// Places of the outermost traces with half a spacing beyond, in the axis' terms.
void placeLimits(const Gather& gather, bool truePosition, double& left, double& right);

}  // namespace strikeplate
