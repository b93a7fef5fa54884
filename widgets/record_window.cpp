#include "widgets/record_window.h"

#include <algorithm>
#include <cmath>
#include <vector>

#include "core/picking/trace_picker.h"

namespace strikeplate {
namespace {

constexpr double kSlowGround = 400.0;   // m/s; what comes slower is surface waves or sound
constexpr double kCommonGround = 1300;  // m/s, an everyday mean to the farthest trace
constexpr double kLate = 0.015;         // s, for delays near the shot
constexpr double kLeastWindow = 0.020;  // s
constexpr double kRoomAfter = 0.6;      // of the latest time

/// Times in s after the blow with the offsets they belong to.
struct Known {
  std::vector<double> time, offset;
};

bool halfPicked(const Shot& shot) {
  std::size_t live = 0, picked = 0;
  for (const ShotTrace& trace : shot.traces) {
    live += trace.state != TraceState::Dead ? 1U : 0U;
    picked += trace.state != TraceState::Dead && trace.pick ? 1U : 0U;
  }
  return picked > 0 && 2 * picked >= live;
}

double farthest(const Gather& gather) {
  double offset = 0.0;
  for (std::size_t t = 0; t < gather.geophones.size(); ++t) {
    offset = std::max(offset, gather.offset(t));
  }
  return offset;
}

/// What each trace shows by itself, without what comes too late for a first break and without the latest tenth, which
/// may be surface waves or noise.
Known guessedTimes(const Gather& gather, double triggerCorrection) {
  const auto onsets = pickGather(gather);
  std::vector<std::pair<double, double>> guesses;  // time, offset
  for (std::size_t t = 0; t < onsets.size(); ++t) {
    const double time = onsets[t] ? onsets[t]->time + triggerCorrection : -1.0;
    if (time > 0.0 && time <= kLate + gather.offset(t) / kSlowGround) {
      guesses.emplace_back(time, gather.offset(t));
    }
  }
  std::sort(guesses.begin(), guesses.end());
  guesses.resize(guesses.size() - guesses.size() / 10);
  // Weak far traces show nothing by themselves; room is left for them all the same.
  Known known{{farthest(gather) / kCommonGround}, {farthest(gather)}};
  for (const auto& [time, offset] : guesses) {
    known.time.push_back(time);
    known.offset.push_back(offset);
  }
  return known;
}

Known knownTimes(const Gather& gather, const Shot& shot, int shotIndex, const Interpretation* interpretation) {
  Known known = halfPicked(shot) ? Known{} : guessedTimes(gather, shot.triggerCorrection);
  const auto add = [&](std::size_t trace, double time) {
    if (std::isfinite(time) && time > 0.0) {
      known.time.push_back(time);
      known.offset.push_back(gather.offset(trace));
    }
  };
  for (std::size_t t = 0; t < shot.traces.size(); ++t) {
    if (shot.traces[t].pick && shot.traces[t].state != TraceState::Dead) {
      add(t, shot.traces[t].pick->time + shot.triggerCorrection);
    }
    const int a = interpretation ? interpretation->arrivalOf(shotIndex, static_cast<int>(t)) : -1;
    if (a >= 0 && static_cast<std::size_t>(a) < interpretation->section.predicted.size()) {
      add(t, interpretation->section.predicted[static_cast<std::size_t>(a)]);
    }
  }
  return known;
}

}  // namespace

void placeLimits(const Gather& gather, bool truePosition, double& left, double& right) {
  const auto n = static_cast<double>(gather.geophones.size());
  left = 0.5;
  right = std::max(1.5, n + 0.5);
  if (truePosition && !gather.geophones.empty()) {
    const auto [low, high] = std::minmax_element(gather.geophones.begin(), gather.geophones.end(),
                                                 [](const Geophone& a, const Geophone& b) { return a.x < b.x; });
    const double edge = std::max(0.5 * (high->x - low->x) / std::max(1.0, n - 1.0), 0.5);
    left = low->x - edge;
    right = high->x + edge;
  }
}

RecordRange homeRange(const Gather& gather, const Shot& shot, int shotIndex, const Interpretation* interpretation,
                      const RecordDisplay& display) {
  const Known known = knownTimes(gather, shot, shotIndex, interpretation);
  RecordRange range;
  placeLimits(gather, display.truePosition, range.left, range.right);
  double low = 0.0, high = 0.0;
  for (std::size_t i = 0; i < known.time.size(); ++i) {
    const double reduced =
        known.time[i] - (display.reducingVelocity > 0.0 ? known.offset[i] / display.reducingVelocity : 0.0);
    low = std::min(low, reduced);
    high = std::max(high, reduced);
  }
  const double span = std::max((1.0 + kRoomAfter) * (high - low), kLeastWindow);
  range.first = low - 0.06 * span;
  range.last = low + span;
  return range;
}

RecordRange fullRange(const Gather& gather, const Shot& shot, const RecordDisplay& display) {
  RecordRange range;
  placeLimits(gather, display.truePosition, range.left, range.right);
  const std::size_t count = gather.traces.empty() ? 0 : gather.traces.front().size();
  const double reduction = display.reducingVelocity > 0.0 ? farthest(gather) / display.reducingVelocity : 0.0;
  range.first = std::min(gather.start + shot.triggerCorrection - reduction, -0.01 - reduction);
  range.last = std::max(gather.timeOf(static_cast<double>(count)) + shot.triggerCorrection, 0.1);
  for (const ShotTrace& trace : shot.traces) {
    range.last = trace.pick ? std::max(range.last, 1.2 * (trace.pick->time + shot.triggerCorrection)) : range.last;
  }
  return range;
}

}  // namespace strikeplate
