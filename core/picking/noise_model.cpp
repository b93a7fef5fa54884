#include "core/picking/noise_model.h"

#include <algorithm>
#include <cmath>

namespace strikeplate {
namespace {

constexpr std::size_t kOrder = 14;
constexpr std::size_t kLeastStretch = 40;
constexpr std::size_t kLongestStretch = 1200;

/// Levinson's recursion: prediction error filter and error variance from autocorrelation r.
std::vector<double> predictionFilter(const std::vector<double>& r, double& error) {
  std::vector<double> a{1.0};
  error = r[0];
  for (std::size_t m = 1; m < r.size(); ++m) {
    double sum = 0.0;
    for (std::size_t i = 0; i < m; ++i)
      sum += a[i] * r[m - i];
    const double reflection = -sum / error;
    std::vector<double> next = a;
    next.push_back(0.0);
    for (std::size_t i = 1; i <= m; ++i)
      next[i] += reflection * (m - i < a.size() ? a[m - i] : 0.0);
    a = std::move(next);
    error *= 1.0 - reflection * reflection;
  }
  return a;
}

}  // namespace

NoiseLevel noiseLevel(std::span<const float> noise) {
  NoiseLevel level;
  if (noise.empty())
    return level;
  for (const float x : noise)
    level.mean += x;
  level.mean /= static_cast<double>(noise.size());
  for (const float x : noise)
    level.rms += (x - level.mean) * (x - level.mean);
  level.rms = std::sqrt(level.rms / static_cast<double>(noise.size()));
  return level;
}

NoiseModel fitNoise(const std::vector<std::vector<float>>& traces, const std::vector<std::size_t>& noiseEnds,
                    double floor) {
  std::vector<double> r(kOrder + 1, 0.0);
  double weights = 0.0;
  for (std::size_t t = 0; t < traces.size(); ++t) {
    if (noiseEnds[t] < kLeastStretch)
      continue;
    const std::size_t first = noiseEnds[t] > kLongestStretch ? noiseEnds[t] - kLongestStretch : 0;
    const std::span<const float> noise(traces[t].data() + first, noiseEnds[t] - first);
    const NoiseLevel level = noiseLevel(noise);
    if (!(level.rms > 0.0))
      continue;
    for (std::size_t lag = 0; lag <= kOrder; ++lag) {
      double sum = 0.0;
      for (std::size_t i = lag; i < noise.size(); ++i)
        sum += (noise[i] - level.mean) * (noise[i - lag] - level.mean);
      r[lag] += sum / (level.rms * level.rms);
    }
    weights += static_cast<double>(noise.size());
  }
  if (!(weights > 0.0))
    return {{1.0}};
  for (std::size_t lag = 0; lag <= kOrder; ++lag) {
    const double taper = std::exp(-0.5 * std::pow(static_cast<double>(lag) / 120.0, 2.0));
    r[lag] *= taper / weights;
  }
  r[0] += floor;
  double error = 1.0;
  NoiseModel model;
  model.whitener = predictionFilter(r, error);
  for (double& a : model.whitener)
    a /= std::sqrt(error);
  return model;
}

std::vector<float> whitened(const NoiseModel& model, std::span<const float> samples) {
  std::vector<float> out(samples.size());
  for (std::size_t i = 0; i < samples.size(); ++i) {
    double sum = 0.0;
    for (std::size_t k = 0; k < model.whitener.size(); ++k)
      sum += model.whitener[k] * samples[i >= k ? i - k : 0];
    out[i] = static_cast<float>(sum);
  }
  return out;
}

}  // namespace strikeplate
