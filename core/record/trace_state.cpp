#include "core/record/trace_state.h"

#include <algorithm>
#include <cmath>
#include <limits>
#include <map>
#include <optional>

#include "core/base/numbers.h"
#include "core/record/channel_polarity.h"

namespace strikeplate {
namespace {

constexpr double kWeaker = 30.0;       // times weaker than the neighbours: dead
constexpr double kRises = 10.0;        // neighbours rise this much after the blow
constexpr double kRisesNot = 1.5;      // a dead trace does not
constexpr double kNoisier = 8.0;       // times the neighbours' noise: noisy, if
constexpr double kDrowned = 4.0;       // its own wave rises less than this
constexpr double kFastest = 6000.0;    // m/s, no wave comes before
constexpr double kLeastNoise = 0.008;  // s of noise that tell anything

double median(std::vector<double> values) {
  const auto half = values.begin() + static_cast<std::ptrdiff_t>(values.size() / 2);
  std::nth_element(values.begin(), half, values.end());
  return *half;
}

// Rms about the mean of samples [from, to), in physical units.
double rms(const Trace& trace, std::size_t from, std::size_t to) {
  double sum = 0.0;
  double squares = 0.0;
  for (std::size_t i = from; i < to; ++i) {
    const auto value = static_cast<double>(trace.samples[i]);
    sum += value;
    squares += value * value;
  }
  const auto n = static_cast<double>(std::max<std::size_t>(to - from, 1));
  return std::sqrt(std::max(squares / n - sum * sum / (n * n), 0.0)) * std::abs(trace.descaling);
}

// How loud a trace is: over all, before any wave, and after that.
struct Loudness {
  bool flat = false;
  double all = 0.0;
  std::optional<double> before;
  double rise = 1.0;  // after over before
};

Loudness loudnessOf(const ShotRecord& record, const Trace& trace) {
  Loudness loud;
  const std::size_t n = trace.samples.size();
  const auto [low, high] = std::minmax_element(trace.samples.begin(), trace.samples.end());
  loud.flat = n < 2 || *low == *high;
  if (loud.flat) {
    return loud;
  }
  loud.all = rms(trace, 0, n);
  const double offset = record.source && trace.receiver ? std::abs(trace.receiver->x - record.source->x) : 0.0;
  const double until = (offset / kFastest - trace.delay) / trace.sampleInterval;
  const auto split = static_cast<std::size_t>(std::clamp(until, 0.0, static_cast<double>(n)));
  if (static_cast<double>(split) * trace.sampleInterval >= kLeastNoise && split < n) {
    loud.before = rms(trace, 0, split);
    loud.rise = rms(trace, split, n) / std::max(*loud.before, 1e-30);
  }
  return loud;
}

// Values of the nearest usable traces, up to `each` on either side.
template <class Value>
std::vector<double> around(const std::vector<Loudness>& all, std::size_t i, std::size_t each, Value value) {
  std::vector<double> out;
  const auto take = [&](std::size_t j, std::size_t& left) {
    const std::optional<double> v = all[j].flat ? std::nullopt : value(all[j]);
    if (v) {
      out.push_back(*v);
      --left;
    }
  };
  std::size_t left = each;
  for (std::size_t j = i; j-- > 0 && left > 0;) {
    take(j, left);
  }
  left = each;
  for (std::size_t j = i + 1; j < all.size() && left > 0; ++j) {
    take(j, left);
  }
  return out;
}

std::string times(double factor) {
  return fixed(factor, factor < 9.5 ? 1 : 0) + " times";
}

TraceVerdict judge(const std::vector<Loudness>& all, std::size_t i) {
  const Loudness& own = all[i];
  if (own.flat) {
    return {TraceState::Dead, "flat, all its samples are the same"};
  }
  const auto loud = around(all, i, 2, [](const Loudness& l) { return std::optional(l.all); });
  if (loud.size() >= 2 && own.all * kWeaker < median(loud)) {
    return {TraceState::Dead, times(median(loud) / std::max(own.all, 1e-30)) + " weaker than the traces beside it"};
  }
  if (!own.before) {
    return {};
  }
  const auto rises =
      around(all, i, 3, [](const Loudness& l) { return l.before ? std::optional(l.rise) : std::nullopt; });
  if (rises.size() < 2) {
    return {};
  }
  if (own.rise < kRisesNot && median(rises) > kRises) {
    return {TraceState::Dead, "no wave in it: after the blow it is " + times(own.rise) +
                                  " as strong as before, the traces beside it " + times(median(rises))};
  }
  const double noise = median(around(all, i, 3, [](const Loudness& l) { return l.before; }));
  if (*own.before > kNoisier * noise && own.rise < kDrowned && own.rise * kDrowned < median(rises)) {
    return {TraceState::Noisy,
            "its noise is " + times(*own.before / std::max(noise, 1e-30)) + " that of the traces beside it"};
  }
  return {};
}

using Verdicts = std::vector<std::vector<TraceVerdict>>;

// A channel that is dead on more than half of the records is dead on all. Tells which channels are.
std::vector<bool> spreadDead(const std::vector<std::size_t>& members, std::size_t traces, Verdicts& verdicts) {
  std::vector<bool> all(traces, false);
  for (std::size_t t = 0; t < traces; ++t) {
    const auto dead = static_cast<std::size_t>(std::count_if(
        members.begin(), members.end(), [&](std::size_t r) { return verdicts[r][t].state == TraceState::Dead; }));
    all[t] = 2 * dead > members.size();
    for (const std::size_t r : members) {
      if (all[t] && verdicts[r][t].state != TraceState::Dead) {
        verdicts[r][t] = {TraceState::Dead, "dead on " + std::to_string(dead) + " of " +
                                                std::to_string(members.size()) + " records of this spread"};
      }
    }
  }
  return all;
}

void markReversed(const std::vector<const ShotRecord*>& records, const std::vector<std::size_t>& members,
                  const std::vector<bool>& dead, Verdicts& verdicts) {
  std::vector<const ShotRecord*> spread;
  for (const std::size_t r : members) {
    spread.push_back(records[r]);
  }
  for (const ReversedChannel& channel : reversedChannels(spread, dead)) {
    for (const std::size_t r : members) {
      if (verdicts[r][channel.trace].state == TraceState::Live) {
        verdicts[r][channel.trace] = {TraceState::Reversed,
                                      "its waves run against those of the traces beside it (agreement " +
                                          fixed(channel.agreement, 2) + " over " + std::to_string(members.size()) +
                                          " records)"};
      }
    }
  }
}

}  // namespace

std::vector<TraceVerdict> judgeTraces(const ShotRecord& record) {
  std::vector<Loudness> loud;
  for (const Trace& trace : record.traces) {
    loud.push_back(loudnessOf(record, trace));
    loud.back().flat = loud.back().flat || trace.state == TraceState::Dead;
  }
  std::vector<TraceVerdict> verdicts;
  for (std::size_t i = 0; i < record.traces.size(); ++i) {
    const TraceState said = record.traces[i].state;
    verdicts.push_back(said != TraceState::Live ? TraceVerdict{said, "according to the file's header"}
                                                : judge(loud, i));
  }
  return verdicts;
}

std::vector<std::vector<TraceVerdict>> judgeLine(const std::vector<const ShotRecord*>& records) {
  Verdicts verdicts;
  std::map<std::size_t, std::vector<std::size_t>> ofSpread;  // records with equally many traces
  for (std::size_t r = 0; r < records.size(); ++r) {
    verdicts.push_back(judgeTraces(*records[r]));
    ofSpread[records[r]->traces.size()].push_back(r);
  }
  for (const auto& [traces, members] : ofSpread) {
    const std::vector<bool> dead = spreadDead(members, traces, verdicts);
    markReversed(records, members, dead, verdicts);
  }
  return verdicts;
}

}  // namespace strikeplate
