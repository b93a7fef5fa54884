#include "core/record/stack.h"

#include <algorithm>
#include <cassert>
#include <cmath>
#include <optional>

#include "core/base/numbers.h"
#include "core/record/interpolate.h"

namespace strikeplate {
namespace {

bool isUsable(const Trace& trace) {
  return trace.state != TraceState::Dead && trace.samples.size() > 1;
}

// Recorder time of the first sample of a blow, and of the last, as its usable traces have in common.
struct Span {
  double from = 0.0;
  double to = 0.0;
};

Span coveredBy(const ShotRecord& blow) {
  Span span{-1e300, 1e300};
  bool any = false;
  for (const Trace& trace : blow.traces) {
    if (isUsable(trace)) {
      any = true;
      span.from = std::max(span.from, trace.delay);
      span.to = std::min(span.to, trace.timeOf(static_cast<double>(trace.samples.size() - 1)));
    }
  }
  return any ? span : Span{0.0, 0.0};
}

const Trace& modelTrace(const ShotRecord& blow) {
  for (const Trace& trace : blow.traces) {
    if (isUsable(trace)) {
      return trace;
    }
  }
  return blow.traces.front();
}

// The axis: grid of the blow with the finest sampling, within what all blows cover once moved by their lags.
struct Axis {
  double start = 0.0;
  double interval = 0.0;
  std::size_t count = 0;
};

Axis commonAxis(const std::vector<const ShotRecord*>& blows, const std::vector<double>& lags) {
  const Trace* model = &modelTrace(*blows[0]);
  for (const ShotRecord* blow : blows) {
    if (modelTrace(*blow).sampleInterval < model->sampleInterval * (1.0 - 1e-9)) {
      model = &modelTrace(*blow);
    }
  }
  Span common{-1e300, 1e300};
  for (std::size_t b = 0; b < blows.size(); ++b) {
    const Span span = coveredBy(*blows[b]);
    if (span.to > span.from) {
      common.from = std::max(common.from, span.from - lags[b]);
      common.to = std::min(common.to, span.to - lags[b]);
    }
  }
  Axis axis;
  axis.interval = model->sampleInterval;
  constexpr double kSlack = 1e-6;  // of a sample
  const double first = std::ceil((common.from - model->delay) / axis.interval - kSlack);
  const double last = std::floor((common.to - model->delay) / axis.interval + kSlack);
  axis.start = first == 0.0 ? model->delay : model->delay + first * axis.interval;
  axis.count = last >= first ? static_cast<std::size_t>(last - first) + 1 : 0;
  return axis;
}

// Variance, in physical units, of what a trace recorded until 5 ms before the blow; nothing for less than 50 ms of
// that.
std::optional<double> noiseBeforeBlow(const Trace& trace) {
  constexpr double kUntil = -0.005;
  constexpr double kEnough = 0.050;
  const double samples =
      std::min((kUntil - trace.delay) / trace.sampleInterval, static_cast<double>(trace.samples.size()));
  if (!(samples * trace.sampleInterval >= kEnough)) {
    return std::nullopt;
  }
  const auto count = static_cast<std::size_t>(samples);
  double sum = 0.0;
  double squares = 0.0;
  for (std::size_t i = 0; i < count; ++i) {
    const auto value = static_cast<double>(trace.samples[i]);
    sum += value;
    squares += value * value;
  }
  const auto n = static_cast<double>(count);
  return (squares / n - sum * sum / (n * n)) * trace.descaling * trace.descaling;
}

// Weights of one trace's blows in the stack, 0 for a blow without it. All weigh the same unless the noise of all is
// known.
std::vector<double> weightsOf(const std::vector<const ShotRecord*>& blows, std::size_t trace) {
  constexpr double kMostUnequal = 20.0;
  std::vector<double> noise(blows.size(), 0.0);
  bool known = true;
  for (std::size_t b = 0; b < blows.size(); ++b) {
    if (isUsable(blows[b]->traces[trace])) {
      const auto own = noiseBeforeBlow(blows[b]->traces[trace]);
      known = known && own;
      noise[b] = own.value_or(0.0);
    }
  }
  const double largest = *std::max_element(noise.begin(), noise.end());
  std::vector<double> weights(blows.size(), 0.0);
  for (std::size_t b = 0; b < blows.size(); ++b) {
    if (isUsable(blows[b]->traces[trace])) {
      weights[b] = known && largest > 0.0 ? largest / std::max(noise[b], largest / kMostUnequal) : 1.0;
    }
  }
  return weights;
}

std::vector<float> stackOfTrace(const std::vector<const ShotRecord*>& blows, const std::vector<double>& lags,
                                std::size_t trace, const Axis& axis) {
  std::vector<double> sum(axis.count, 0.0);
  int used = 0;
  double weightSum = 0.0;
  const std::vector<double> weights = weightsOf(blows, trace);
  double unit = 0.0;
  std::vector<float> only;
  for (std::size_t b = 0; b < blows.size(); ++b) {
    const Trace& from = blows[b]->traces[trace];
    if (!isUsable(from)) {
      continue;
    }
    const double first = (axis.start + lags[b] - from.delay) / from.sampleInterval;
    only = interpolated(from.samples, first, axis.interval / from.sampleInterval, axis.count);
    unit = used == 0 ? from.descaling : unit;
    const double scale = from.descaling / unit;
    for (std::size_t i = 0; i < axis.count; ++i) {
      sum[i] += weights[b] * scale * static_cast<double>(only[i]);
    }
    ++used;
    weightSum += weights[b];
  }
  if (used == 1) {
    return only;
  }
  std::vector<float> mean(axis.count, 0.0F);
  for (std::size_t i = 0; used > 0 && i < axis.count; ++i) {
    mean[i] = static_cast<float>(sum[i] / weightSum);
  }
  return mean;
}

}  // namespace

Result<StackedTraces> stackBlows(const std::vector<const ShotRecord*>& blows, const std::vector<double>& lags) {
  assert(!blows.empty() && blows.size() == lags.size());
  double shortest = 1e300;
  for (const ShotRecord* blow : blows) {
    if (blow->traces.size() != blows[0]->traces.size()) {
      return Failure{blow->file + " has " + std::to_string(blow->traces.size()) + " traces but " + blows[0]->file +
                     " has " + std::to_string(blows[0]->traces.size()) +
                     ", so they cannot be stacked; leave one out."};
    }
    const Span span = coveredBy(*blow);
    if (span.to > span.from) {
      shortest = std::min(shortest, span.to - span.from);
    }
  }
  const Axis axis = commonAxis(blows, lags);
  if (shortest < 1e300 && !(static_cast<double>(axis.count) * axis.interval >= 0.5 * shortest)) {
    return Failure{
        "The blows " + blows[0]->file + " to " + blows.back()->file +
        " were recorded over different times and hardly overlap, so they cannot be stacked; leave some out."};
  }
  StackedTraces out;
  out.sampleInterval = axis.interval;
  out.start = axis.start;
  for (std::size_t t = 0; t < blows[0]->traces.size(); ++t) {
    out.traces.push_back(shortest < 1e300 ? stackOfTrace(blows, lags, t, axis) : std::vector<float>());
  }
  return out;
}

}  // namespace strikeplate
