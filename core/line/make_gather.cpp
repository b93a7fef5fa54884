#include "core/line/make_gather.h"

#include <algorithm>
#include <cassert>
#include <iterator>
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

bool oneTimeAxis(const ShotRecord& record) {
  const Trace& first = record.traces.front();
  return std::all_of(record.traces.begin(), record.traces.end(), [&first](const Trace& trace) {
    return trace.sampleInterval == first.sampleInterval && trace.delay == first.delay &&
           trace.samples.size() == first.samples.size() && trace.state != TraceState::Dead;
  });
}

}  // namespace

std::optional<Gather> gatherOfOneBlow(const RecordPtr& blow, const ShotPoint& shot,
                                      const std::vector<Geophone>& geophones) {
  assert(geophones.size() == blow->traces.size());
  if (!oneTimeAxis(*blow)) {
    return std::nullopt;
  }
  Gather gather;
  gather.shot = shot;
  gather.geophones = geophones;
  gather.sampleInterval = blow->traces.front().sampleInterval;
  gather.start = blow->traces.front().delay;
  for (std::size_t i = 0; i < blow->traces.size(); ++i) {
    gather.traces.push_back(SharedSamples::of(blow, i));
    gather.states.push_back(blow->traces[i].state);
  }
  return gather;
}

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
  gather.traces.assign(std::make_move_iterator(stack->traces.begin()), std::make_move_iterator(stack->traces.end()));
  for (std::size_t i = 0; i < gather.traces.size(); ++i) {
    gather.states.push_back(stateOver(blows, i));
  }
  return gather;
}

}  // namespace strikeplate
