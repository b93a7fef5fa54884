#include "core/line/make_gather.h"

#include <algorithm>
#include <cassert>
#include <utility>

#include "core/record/stack.h"

namespace strikeplate {
namespace {

TraceState stateOver(const std::vector<const ShotRecord*>& blows, std::size_t trace) {
  TraceState state = TraceState::Dead;
  for (const ShotRecord* blow : blows) {
    const TraceState own = blow->traces[trace].state;
    if (own != TraceState::Dead && (state == TraceState::Dead || state == TraceState::Live)) {
      state = own;
    }
  }
  return state;
}

}  // namespace

Result<Gather> makeGather(const std::vector<const ShotRecord*>& blows, const std::vector<double>& lags,
                          const ShotPoint& shot, const std::vector<Geophone>& geophones) {
  auto stack = stackBlows(blows, lags);
  if (!stack) {
    return stack.failure();
  }
  assert(geophones.size() == stack->traces.size());
  Gather gather;
  gather.shot = shot;
  gather.geophones = geophones;
  gather.sampleInterval = stack->sampleInterval;
  gather.start = stack->start;
  gather.traces = std::move(stack->traces);
  for (std::size_t i = 0; i < gather.traces.size(); ++i) {
    gather.states.push_back(stateOver(blows, i));
  }
  return gather;
}

}  // namespace strikeplate
