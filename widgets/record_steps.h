#pragma once

#include <optional>

#include "widgets/scene.h"

namespace strikeplate {

/// Where the keys lead from a selection. Traces count in the order of the record, shots along the line; what is
/// looked for is looked for to the end of the line and then from its beginning. None when there is nothing to go to.

/// `by` traces on, no further than the outermost; from no trace at all the first or the last.
std::optional<Selection> steppedTrace(const Survey& survey, const Selection& from, int by);
/// `by` shots on; the trace stays the same geophone's where the other shot has it.
std::optional<Selection> steppedShot(const Survey& survey, const Selection& from, int by);
/// The next trace without a pick that is not dead.
std::optional<Selection> nextUnpicked(const Survey& survey, const Selection& from);
/// The next trace on which a doubt hangs.
std::optional<Selection> nextDoubtful(const Survey& survey, const Interpretation* interpretation,
                                      const Selection& from);
/// True when a doubt hangs on this trace.
bool isDoubtful(const Interpretation* interpretation, int shot, int trace);

}  // namespace strikeplate
