#include "core/picking/trace_picker.h"

#include <algorithm>
#include <cassert>
#include <cmath>

#include "core/picking/onset_aic.h"

namespace strikeplate {
namespace {

// Common practice, no source: about a dominant period of a hammer blow, and the stretches that the refinement sees.
constexpr double kLeadingWindow = 0.008;
constexpr double kNoiseStretch = 0.030;
constexpr double kSignalStretch = 0.006;
constexpr double kLeastEnergyRatio = 6.0;
constexpr double kFastestGround = 7000.0;  // m/s
constexpr double kLeastSigma = 0.00015;
constexpr double kMostSigma = 0.003;

/// One trace on its own time axis.
struct Signal {
  std::span<const float> samples;
  double interval;
  double start;

  [[nodiscard]] double timeOf(std::size_t i) const { return start + static_cast<double>(i) * interval; }
  /// First sample at or after a time, within the trace.
  [[nodiscard]] std::size_t indexOf(double time) const {
    const double i = std::ceil((time - start) / interval - 1e-9);
    return static_cast<std::size_t>(std::clamp(i, 0.0, static_cast<double>(samples.size())));
  }
  [[nodiscard]] std::size_t count(double duration) const {
    return static_cast<std::size_t>(std::max(4.0, std::round(duration / interval)));
  }
};

bool allFinite(std::span<const float> samples) {
  return std::all_of(samples.begin(), samples.end(), [](float x) { return std::isfinite(x); });
}

/// Running sum of squares about the mean of the first tenth, where the ground is still quiet.
std::vector<double> runningEnergy(std::span<const float> samples) {
  const std::size_t quiet = std::max<std::size_t>(4, samples.size() / 10);
  double mean = 0.0;
  for (std::size_t i = 0; i < std::min(quiet, samples.size()); ++i)
    mean += samples[i];
  mean /= static_cast<double>(std::min(quiet, samples.size()));
  std::vector<double> energy(samples.size() + 1, 0.0);
  for (std::size_t i = 0; i < samples.size(); ++i) {
    const double x = samples[i] - mean;
    energy[i + 1] = energy[i] + x * x;
  }
  return energy;
}

struct Rise {
  std::size_t index = 0;
  double ratio = 0.0;
};

/// Where the energy of a leading window most exceeds the mean energy of all before it. The floor under the earlier
/// energy, a millionth of the whole, keeps an exactly silent start from counting as an onset.
Rise steepestRise(const Signal& signal, std::size_t from, std::size_t to) {
  const std::vector<double> energy = runningEnergy(signal.samples);
  const std::size_t n = signal.samples.size();
  const std::size_t lead = signal.count(kLeadingWindow);
  const double floor = 1e-6 * energy[n] / static_cast<double>(n);
  Rise best;
  for (std::size_t i = std::max<std::size_t>(from, 8); i + lead <= std::min(to + lead, n); ++i) {
    const std::size_t first = std::min(i - 1, from > 4 * lead ? from - 4 * lead : 0);
    const double before = (energy[i] - energy[first]) / static_cast<double>(i - first) + floor;
    const double after = (energy[i + lead] - energy[i]) / static_cast<double>(lead);
    const double ratio = after / before;
    if (ratio > best.ratio)
      best = {i, ratio};
  }
  return best;
}

double rms(std::span<const float> samples, double mean) {
  double square = 0.0;
  for (const float x : samples)
    square += (x - mean) * (x - mean);
  return samples.empty() ? 0.0 : std::sqrt(square / static_cast<double>(samples.size()));
}

/// Standard deviation of an onset: half the time for which a wave that grows as the square of time stays below twice
/// the noise, given the noise before the onset and the largest swing of the leading window after it.
double sigmaOf(const Signal& signal, double onset) {
  const std::size_t at = signal.indexOf(onset);
  const std::size_t first = at - std::min(at, signal.count(kNoiseStretch));
  const auto noise = signal.samples.subspan(first, at - first);
  double mean = 0.0;
  for (const float x : noise)
    mean += x;
  mean /= std::max<double>(1.0, static_cast<double>(noise.size()));
  std::size_t peak = at;
  double swing = 0.0;
  for (std::size_t i = at; i < std::min(signal.samples.size(), at + signal.count(kLeadingWindow)); ++i) {
    if (std::abs(signal.samples[i] - mean) <= swing)
      continue;
    swing = std::abs(signal.samples[i] - mean);
    peak = i;
  }
  if (!(swing > 0.0))
    return kMostSigma;
  const double rise = std::max(signal.interval, signal.timeOf(peak) - onset);
  const double hidden = rise * std::sqrt(2.0 * rms(noise, mean) / swing);
  return std::clamp(std::hypot(0.5 * hidden, 0.5 * signal.interval), kLeastSigma, kMostSigma);
}

/// 0 for no change at all, towards 1 as the energy rises a hundredfold.
double confidenceOf(double ratio) {
  return ratio <= 1.0 ? 0.0 : 1.0 - std::exp(-std::log(ratio) / 2.0);
}

std::optional<Onset> refine(const Signal& signal, std::size_t from, std::size_t to) {
  const auto step = leastAic(signal.samples.subspan(from, to - from));
  if (!step || !(step->ratio > 1.0))
    return std::nullopt;
  const double time = signal.timeOf(from + step->index - 1);
  return Onset{time, sigmaOf(signal, time), confidenceOf(step->ratio)};
}

Signal signalOf(const Gather& gather, std::size_t trace) {
  assert(trace < gather.traces.size());
  return {gather.traces[trace], gather.sampleInterval, gather.start};
}

}  // namespace

std::optional<Onset> pickOnset(std::span<const float> samples, double interval, double start, OnsetWindow window) {
  assert(interval > 0.0);
  const Signal signal{samples, interval, start};
  const std::size_t from = signal.indexOf(window.from), to = signal.indexOf(window.to);
  if (to < from + 16 || !allFinite(samples))
    return std::nullopt;
  const Rise rise = steepestRise(signal, from, to);
  if (!(rise.ratio >= kLeastEnergyRatio))
    return std::nullopt;
  const std::size_t noise = signal.count(kNoiseStretch);
  const std::size_t first = rise.index > noise ? rise.index - noise : 0;
  const std::size_t last = std::min(samples.size(), rise.index + signal.count(kSignalStretch));
  return refine(signal, first, last);
}

std::vector<std::optional<Onset>> pickGather(const Gather& gather) {
  std::vector<std::optional<Onset>> onsets(gather.traces.size());
  for (std::size_t i = 0; i < onsets.size(); ++i) {
    if (gather.states[i] == TraceState::Dead)
      continue;
    const OnsetWindow window{gather.offset(i) / kFastestGround, std::numeric_limits<double>::infinity()};
    onsets[i] = pickOnset(gather.traces[i], gather.sampleInterval, gather.start, window);
  }
  return onsets;
}

std::optional<Onset> snapOnset(const Gather& gather, std::size_t trace, double near, double halfWidth) {
  assert(halfWidth > 0.0);
  const Signal signal = signalOf(gather, trace);
  const std::size_t from = signal.indexOf(near - halfWidth), to = signal.indexOf(near + halfWidth);
  if (to <= from || !allFinite(signal.samples.subspan(from, to - from)))
    return std::nullopt;
  return refine(signal, from, to);
}

double sigmaAt(const Gather& gather, std::size_t trace, double time) {
  return sigmaOf(signalOf(gather, trace), time);
}

}  // namespace strikeplate
