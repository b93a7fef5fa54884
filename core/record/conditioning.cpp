#include "core/record/conditioning.h"

#include <algorithm>
#include <cmath>

#include "core/record/hum.h"

namespace strikeplate {
namespace {

std::vector<float> scaledBy(std::span<const float> samples, double factor) {
  std::vector<float> out(samples.size());
  std::transform(samples.begin(), samples.end(), out.begin(),
                 [factor](float s) { return static_cast<float>(static_cast<double>(s) * factor); });
  return out;
}

std::size_t samplesBefore(double time, double start, double interval, std::size_t count) {
  return static_cast<std::size_t>(std::clamp((time - start) / interval, 0.0, static_cast<double>(count)));
}

}  // namespace

std::vector<float> withoutDc(std::span<const float> samples) {
  double sum = 0.0;
  for (const float s : samples) {
    sum += static_cast<double>(s);
  }
  const double mean = samples.empty() ? 0.0 : sum / static_cast<double>(samples.size());
  std::vector<float> out(samples.size());
  std::transform(samples.begin(), samples.end(), out.begin(),
                 [mean](float s) { return static_cast<float>(static_cast<double>(s) - mean); });
  return out;
}

std::vector<float> normalised(std::span<const float> samples) {
  float largest = 0.0F;
  for (const float s : samples) {
    largest = std::max(largest, std::abs(s));
  }
  return scaledBy(samples, largest > 0.0F ? 1.0 / static_cast<double>(largest) : 1.0);
}

std::vector<float> withTimeGain(std::span<const float> samples, double sampleInterval, double start, double power) {
  constexpr double kReference = 0.1;
  constexpr double kLeast = 0.001;
  std::vector<float> out(samples.size());
  for (std::size_t i = 0; i < samples.size(); ++i) {
    const double time = std::max(start + static_cast<double>(i) * sampleInterval, kLeast);
    out[i] = static_cast<float>(static_cast<double>(samples[i]) * std::pow(time / kReference, power));
  }
  return out;
}

std::vector<float> withAutomaticGain(std::span<const float> samples, double sampleInterval, double window) {
  const std::size_t n = samples.size();
  std::vector<double> sums(n + 1, 0.0);
  for (std::size_t i = 0; i < n; ++i) {
    sums[i + 1] = sums[i] + static_cast<double>(samples[i]) * static_cast<double>(samples[i]);
  }
  if (n == 0 || !(sums[n] > 0.0)) {
    return {samples.begin(), samples.end()};
  }
  constexpr double kLeastShare = 0.01;
  const double least = kLeastShare * std::sqrt(sums[n] / static_cast<double>(n));
  const auto half = static_cast<std::size_t>(std::max(0.5 * window / sampleInterval, 1.0));
  std::vector<float> out(n);
  for (std::size_t i = 0; i < n; ++i) {
    const std::size_t low = i > half ? i - half : 0;
    const std::size_t high = std::min(n, i + half + 1);
    const double rms = std::sqrt(std::max(sums[high] - sums[low], 0.0) / static_cast<double>(high - low));
    out[i] = static_cast<float>(static_cast<double>(samples[i]) / std::max(rms, least));
  }
  return out;
}

std::vector<float> conditioned(std::span<const float> samples, double sampleInterval, double start,
                               const Conditioning& settings) {
  std::vector<float> out(samples.begin(), samples.end());
  if (settings.removeDc) {
    out = withoutDc(out);
  }
  if (settings.humFrequency > 0.0) {
    const std::size_t noise = samplesBefore(settings.noiseUntil, start, sampleInterval, out.size());
    constexpr double kEnoughPeriods = 2.0;
    const bool enough = static_cast<double>(noise) * sampleInterval * settings.humFrequency >= kEnoughPeriods;
    out = withoutHum(out, sampleInterval,
                     enough ? fitHum(out, sampleInterval, noise, settings.humFrequency)
                            : fitHumThroughout(out, sampleInterval, settings.humFrequency));
  }
  out = zeroPhase(out, sampleInterval, settings.band);
  if (settings.reversePolarity) {
    out = scaledBy(out, -1.0);
  }
  if (settings.gainPower != 0.0) {
    out = withTimeGain(out, sampleInterval, start, settings.gainPower);
  }
  if (settings.agcWindow > 0.0) {
    out = withAutomaticGain(out, sampleInterval, settings.agcWindow);
  }
  if (settings.normalise) {
    out = normalised(out);
  }
  return out;
}

}  // namespace strikeplate
