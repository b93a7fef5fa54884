#pragma once

#include <optional>
#include <vector>

#include "core/base/result.h"
#include "core/line/gather.h"

namespace strikeplate {

/// Builds one shot point's gather: the stack of its blows (see stackBlows), each moved by its lag (s).
///
/// Trace i of every blow belongs to geophones[i]. A trace's state is the worst that any blow's header says, Dead only
/// when it is dead in all of them. The samples are the stack, untouched otherwise.
/// Fails as stackBlows does. Needs at least one blow, one lag for each, and one geophone for each trace.
Result<Gather> makeGather(const std::vector<const ShotRecord*>& blows, const std::vector<double>& lags,
                          const ShotPoint& shot, const std::vector<Geophone>& geophones);

/// The same for a single blow, whose samples are shared and not copied; nothing when its traces have to be brought to
/// one time axis first, or one of them is dead. Needs one geophone for each trace, and a trace.
std::optional<Gather> gatherOfOneBlow(const RecordPtr& blow, const ShotPoint& shot,
                                      const std::vector<Geophone>& geophones);

}  // namespace strikeplate
