#include "core/picking/line_work.h"

#include <algorithm>
#include <cmath>
#include <map>

#include "core/picking/dead_traces.h"
#include "core/picking/hum.h"
#include "core/picking/onset_aic.h"
#include "core/picking/work_trace.h"

namespace strikeplate {
namespace {

constexpr double kFastestGround = 6000.0;  // m/s
constexpr double kFastGround = 3500.0;     // m/s
constexpr double kUsualIntercept = 0.002;  // s
constexpr double kRecorderShare = 2e-4;    // of the loudest swing
constexpr double kFirstShare = 4e-3;       // of the first swing
constexpr double kFirstSwing = 12.0;       // work samples
constexpr double kSound = 340.0;           // m/s, in air
constexpr double kNearShare = 0.03;        // of the swing soon after the sound wave's time
constexpr double kNearSwing = 32.0;        // work samples
constexpr double kClear = 0.0025;          // s between the end of the noise and an onset
constexpr double kEarlyTrigger = 0.004;    // s by which recorder time may run ahead of the blow
constexpr double kShrink = 3.0;            // samples that the other traces' level counts for

std::optional<Onset> given(const std::vector<std::vector<std::optional<Onset>>>& table, std::size_t g,
                           std::size_t i) {
  return g < table.size() && i < table[g].size() ? table[g][i] : std::nullopt;
}

bool silent(const std::vector<float>& samples) {
  const auto [low, high] = std::minmax_element(samples.begin(), samples.end());
  return samples.size() < 32 || !(*high > *low);
}

LineTrace lineTrace(const std::vector<Gather>& gathers, const LinePickOptions& options, std::size_t g,
                    std::size_t i) {
  const Gather& gather = gathers[g];
  LineTrace t;
  t.gather = g;
  t.trace = i;
  t.shotX = gather.shot.x;
  t.x = gather.geophones[i].x;
  WorkTrace work = workTrace(gather, i);
  t.start = work.start;
  t.samples = std::move(work.samples);
  t.usable = gather.states[i] != TraceState::Dead && !silent(t.samples);
  t.trusted = given(options.trusted, g, i);
  t.predicted = given(options.predicted, g, i);
  return t;
}

std::vector<std::size_t> sideOf(const LineWork& work, std::size_t gather, bool right) {
  std::vector<std::size_t> side;
  for (std::size_t i = 0; i < work.traces.size(); ++i) {
    const LineTrace& t = work.traces[i];
    if (t.gather == gather && t.usable && (t.x >= t.shotX) == right)
      side.push_back(i);
  }
  std::stable_sort(side.begin(), side.end(),
                   [&](std::size_t a, std::size_t b) { return work.traces[a].offset() < work.traces[b].offset(); });
  return side;
}

/// Brings the whitened noise to unit variance: a trace's noise may sound unlike the survey's, but
/// it is not below `least`.
void levelWhite(LineTrace& t, std::size_t first, double least) {
  const std::size_t from = std::min(t.noiseEnd, first + 14);
  const NoiseLevel level = noiseLevel({t.white.data() + from, t.noiseEnd - from});
  const auto count = static_cast<double>(t.noiseEnd - from);
  const double factor = std::max(std::sqrt((count * (level.rms * level.rms) + 10.0) / (count + 10.0)), least / t.rms);
  t.rms *= factor;
  for (float& e : t.white)
    e = static_cast<float>(e / factor);
}

/// Noise that is assumed at the least: what a recorder leaves beside its loudest swing, and, once there is an idea of
/// the first break, a small share of the swing there. Keeps a start without quiet from being taken for silence. Where
/// the sound wave in air may come first, it is a small share of the ground's swing and counts as noise.
double leastNoise(const LineTrace& t) {
  double loudest = 0.0, first = 0.0, near = 0.0;
  const double sound = (t.offset() / kSound - t.start) / kWorkInterval;
  const double from = t.posterior.empty() ? 0.0 : (t.belief - t.start) / kWorkInterval;
  for (std::size_t i = 0; i < t.samples.size(); ++i) {
    const double swing = std::abs(static_cast<double>(t.samples[i]));
    const double at = static_cast<double>(i);
    if (at >= sound && at < sound + kNearSwing)
      near = std::max(near, swing);
    loudest = std::max(loudest, swing);
    if (!t.posterior.empty() && at >= from && at < from + kFirstSwing)
      first = std::max(first, swing);
  }
  const bool soundFirst = !t.posterior.empty() && from + kNearSwing > sound;
  return std::max({kRecorderShare * loudest, kFirstShare * first, soundFirst ? kNearShare * near : 0.0});
}

NoiseModel modelOf(const LineWork& work, std::size_t setting, double floor) {
  std::vector<std::vector<float>> samples;
  std::vector<std::size_t> ends;
  for (const LineTrace& t : work.traces) {
    if (!t.usable || t.setting != setting)
      continue;
    samples.push_back(t.samples);
    ends.push_back(t.noiseEnd);
  }
  return fitNoise(samples, ends, floor);
}

/// Numbers the different sample intervals: the settings of the recorder.
std::map<double, std::size_t> settingsOf(const std::vector<Gather>& gathers) {
  std::map<double, std::size_t> settings;
  for (const Gather& gather : gathers)
    settings.try_emplace(gather.sampleInterval, settings.size());
  return settings;
}

double median(std::vector<double> values) {
  if (values.empty())
    return 0.0;
  const auto middle = values.begin() + static_cast<std::ptrdiff_t>(values.size() / 2);
  std::nth_element(values.begin(), middle, values.end());
  return *middle;
}

}  // namespace

double LineTrace::onsetTime(double i) const {
  return start + (i - 0.5) * kWorkInterval;
}

std::size_t noiseEndOf(const LineTrace& trace) {
  const auto n = trace.samples.size();
  const auto largest = std::max_element(trace.samples.begin(), trace.samples.end(),
                                        [](float a, float b) { return std::abs(a) < std::abs(b); });
  const auto to = static_cast<std::size_t>(largest - trace.samples.begin()) + 1;
  const auto step = leastAic(std::span<const float>(trace.samples.data(), to));
  const double aic = step ? static_cast<double>(step->index) - kClear / kWorkInterval : 0.0;
  // Where a later, stronger wave hides the first one, the criterion is late: it is not trusted beyond a fast wave.
  const double fast = (trace.offset() / kFastGround + kUsualIntercept - trace.start) / kWorkInterval;
  const double surely = (trace.offset() / kFastestGround - kEarlyTrigger - trace.start) / kWorkInterval;
  return static_cast<std::size_t>(std::clamp(std::max(std::min(aic, fast), surely), 0.0, static_cast<double>(n)));
}

LineWork makeLineWork(const std::vector<Gather>& gathers, const LinePickOptions& options) {
  LineWork work;
  const auto settings = settingsOf(gathers);
  work.settings = settings.size();
  for (std::size_t g = 0; g < gathers.size(); ++g) {
    for (std::size_t i = 0; i < gathers[g].traces.size(); ++i) {
      work.traces.push_back(lineTrace(gathers, options, g, i));
      work.traces.back().setting = settings.at(gathers[g].sampleInterval);
      work.traces.back().noiseEnd = work.traces.back().usable ? noiseEndOf(work.traces.back()) : 0;
    }
  }
  markDeadTraces(work.traces);
  for (std::size_t g = 0; g < gathers.size(); ++g) {
    for (const bool right : {false, true})
      work.sides.push_back(sideOf(work, g, right));
  }
  return work;
}

void removeHumAll(LineWork& work) {
  std::vector<std::vector<float>> samples;
  std::vector<std::size_t> ends;
  for (const LineTrace& t : work.traces) {
    if (!t.usable)
      continue;
    samples.push_back(t.samples);
    ends.push_back(t.noiseEnd);
  }
  const double frequency = humFrequency(samples, ends);
  if (!(frequency > 0.0))
    return;
  for (LineTrace& t : work.traces) {
    if (t.usable)
      removeHum(t.samples, t.noiseEnd, frequency);
  }
}

std::vector<NoiseModel> whitenAll(LineWork& work, double floor) {
  std::vector<double> levels;
  for (const LineTrace& t : work.traces) {
    if (t.usable && t.noiseEnd >= 20)
      levels.push_back(noiseLevel({t.samples.data(), t.noiseEnd}).rms);
  }
  std::vector<NoiseModel> models;
  for (std::size_t setting = 0; setting < work.settings; ++setting)
    models.push_back(modelOf(work, setting, floor));
  const double common = median(levels);
  for (LineTrace& t : work.traces) {
    if (!t.usable)
      continue;
    const std::size_t first = t.noiseEnd > 800 ? t.noiseEnd - 800 : 0;
    const NoiseLevel level = noiseLevel({t.samples.data() + first, t.noiseEnd - first});
    const double count = 0.25 * static_cast<double>(t.noiseEnd - first);  // samples are not independent
    t.rms = std::sqrt((count * level.rms * level.rms + kShrink * common * common) / (count + kShrink));
    const double least = leastNoise(t);
    t.rms = std::max(t.rms, least);
    std::vector<float> unit(t.samples.size());
    for (std::size_t i = 0; i < unit.size(); ++i) {
      unit[i] = static_cast<float>((t.samples[i] - (count > 5.0 ? level.mean : 0.0)) / t.rms);
    }
    t.white = whitened(models[t.setting], unit);
    levelWhite(t, first, least);
  }
  return models;
}

}  // namespace strikeplate
