#include "widgets/record_steps.h"

#include <algorithm>

namespace strikeplate {
namespace {

const Shot* shotOf(const Survey& survey, int shot) {
  return shot >= 0 && shot < static_cast<int>(survey.shots.size()) ? &survey.shots[static_cast<std::size_t>(shot)]
                                                                   : nullptr;
}

/// The first trace after `from`, all round the line, for which `wanted` holds.
template <class Wanted>
std::optional<Selection> nextWhere(const Survey& survey, const Selection& from, Wanted wanted) {
  const int shots = static_cast<int>(survey.shots.size());
  const int start = std::max(0, from.shot);
  for (int k = 0; k <= shots && shots > 0; ++k) {
    const int s = (start + k) % shots;
    const int traces = static_cast<int>(shotOf(survey, s)->traces.size());
    const int first = k == 0 ? from.trace + 1 : 0;
    const int end = k == shots ? std::min(traces, from.trace + 1) : traces;
    for (int t = first; t < end; ++t) {
      if (wanted(s, t)) {
        return Selection{s, t, 0};
      }
    }
  }
  return std::nullopt;
}

}  // namespace

std::optional<Selection> steppedTrace(const Survey& survey, const Selection& from, int by) {
  const Shot* shot = shotOf(survey, from.shot);
  if (shot == nullptr || shot->traces.empty()) {
    return std::nullopt;
  }
  const int last = static_cast<int>(shot->traces.size()) - 1;
  const int start = from.trace < 0 ? (by > 0 ? -1 : last + 1) : from.trace;
  return Selection{from.shot, std::clamp(start + by, 0, last), 0};
}

std::optional<Selection> steppedShot(const Survey& survey, const Selection& from, int by) {
  const int to = from.shot + by;
  const Shot *here = shotOf(survey, from.shot), *there = shotOf(survey, to);
  if (there == nullptr) {
    return std::nullopt;
  }
  Selection selection{to, -1, 0};
  if (here != nullptr && from.trace >= 0 && from.trace < static_cast<int>(here->traces.size())) {
    const int geophone = here->traces[static_cast<std::size_t>(from.trace)].geophone;
    const auto same = std::find_if(there->traces.begin(), there->traces.end(),
                                   [geophone](const ShotTrace& trace) { return trace.geophone == geophone; });
    selection.trace = same == there->traces.end() ? -1 : static_cast<int>(same - there->traces.begin());
  }
  return selection;
}

std::optional<Selection> nextUnpicked(const Survey& survey, const Selection& from) {
  return nextWhere(survey, from, [&](int shot, int trace) {
    const ShotTrace& each = shotOf(survey, shot)->traces[static_cast<std::size_t>(trace)];
    return !each.pick && each.state != TraceState::Dead;
  });
}

std::optional<Selection> nextDoubtful(const Survey& survey, const Interpretation* interpretation,
                                      const Selection& from) {
  return nextWhere(survey, from, [&](int shot, int trace) { return isDoubtful(interpretation, shot, trace); });
}

bool isDoubtful(const Interpretation* interpretation, int shot, int trace) {
  return interpretation != nullptr &&
         std::any_of(interpretation->doubts.begin(), interpretation->doubts.end(),
                     [&](const Doubt& doubt) { return doubt.shot == shot && doubt.trace == trace; });
}

}  // namespace strikeplate
