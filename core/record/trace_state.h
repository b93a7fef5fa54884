#pragma once

#include <string>
#include <vector>

#include "core/record/record.h"

namespace strikeplate {

/// What a trace was found to be good for, and why in words (empty for a live one).
struct TraceVerdict {
  TraceState state = TraceState::Live;
  std::string reason;
  bool operator==(const TraceVerdict&) const = default;
};

/// Judges the traces of one record, each against the two or three nearest live ones on either side:
/// dead when flat, when 30 times weaker than they are, or when nothing rises after the blow where they rise tenfold;
/// noisy when its noise before the first arrival is 8 times theirs and drowns its own wave. What the file's header
/// says stands before all that. A weak far trace is weak beside weak ones and so stays live. One verdict for each
/// trace. Common practice, no source; on the practice and real records known here live traces come no closer than a
/// factor 2.5 to their neighbours, dead ones are 250 to 30 000 times weaker.
std::vector<TraceVerdict> judgeTraces(const ShotRecord& record);

/// Judges all records of a line, records with equally many traces together: a channel that is dead on more than half
/// of them is dead on all, for a broken geophone does not mend between two shots; a channel whose wave runs against
/// its neighbours' on nearly every record is reversed on all. One row for each record, one verdict for each trace of
/// it.
std::vector<std::vector<TraceVerdict>> judgeLine(const std::vector<const ShotRecord*>& records);

}  // namespace strikeplate
