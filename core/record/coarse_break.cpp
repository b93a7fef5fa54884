#include "core/record/coarse_break.h"

#include <algorithm>
#include <cmath>
#include <vector>

namespace strikeplate {
namespace {

constexpr double kFastest = 6000.0;   // m/s
constexpr double kSlowest = 150.0;    // m/s
constexpr double kAllowance = 0.030;  // s beyond the slowest
constexpr double kGap = 0.002;        // s, difference and smoothing
constexpr double kPresmooth = 0.001;  // s

std::size_t samplesIn(double seconds, double interval) {
  return static_cast<std::size_t>(std::max(1L, std::lround(seconds / interval)));
}

// Mean over `width` samples, the middle one at its place; fewer at the ends.
std::vector<double> smoothed(const std::vector<double>& values, std::size_t width) {
  const std::size_t n = values.size();
  std::vector<double> sums(n + 1, 0.0);
  for (std::size_t i = 0; i < n; ++i) {
    sums[i + 1] = sums[i] + values[i];
  }
  std::vector<double> out(n);
  for (std::size_t i = 0; i < n; ++i) {
    const std::size_t low = i > width / 2 ? i - width / 2 : 0;
    const std::size_t high = std::min(n, i + (width - 1) / 2 + 1);
    out[i] = (sums[high] - sums[low]) / static_cast<double>(high - low);
  }
  return out;
}

std::vector<double> energyOfDifferences(std::span<const float> samples, double interval) {
  const std::vector<double> smooth =
      smoothed(std::vector<double>(samples.begin(), samples.end()), samplesIn(kPresmooth, interval));
  const std::size_t gap = samplesIn(kGap, interval);
  std::vector<double> energy(smooth.size(), 0.0);
  for (std::size_t i = gap; i < smooth.size(); ++i) {
    const double difference = smooth[i] - smooth[i - gap];
    energy[i] = difference * difference;
  }
  return smoothed(energy, samplesIn(kGap, interval));
}

double quantile(std::vector<double> values, double share) {
  const auto k = static_cast<std::ptrdiff_t>(share * static_cast<double>(values.size() - 1));
  std::nth_element(values.begin(), values.begin() + k, values.end());
  return values[static_cast<std::size_t>(k)];
}

}  // namespace

std::optional<double> coarseBreak(std::span<const float> samples, double sampleInterval, double start,
                                  double offset) {
  const std::vector<double> energy = energyOfDifferences(samples, sampleInterval);
  const auto index = [&](double time) {
    const double at = std::clamp((time - start) / sampleInterval, 0.0, static_cast<double>(energy.size()));
    return static_cast<std::size_t>(at);
  };
  const std::size_t from = std::min(index(offset / kFastest), energy.size());
  const std::size_t to = index(offset / kSlowest + kAllowance);
  // Differences and smoothing spoil the first 5 ms.
  const std::size_t noiseFrom = 2 * samplesIn(kGap, sampleInterval) + samplesIn(kPresmooth, sampleInterval);
  const std::size_t noiseTo = std::min(index(offset / kFastest - kGap), energy.size());
  constexpr std::size_t kEnoughNoise = 16;
  double level = 0.0;
  if (noiseTo >= noiseFrom + kEnoughNoise) {
    const auto begin = energy.begin();
    level = quantile(std::vector<double>(begin + static_cast<std::ptrdiff_t>(noiseFrom),
                                         begin + static_cast<std::ptrdiff_t>(noiseTo)),
                     0.98);
  } else if (to > from) {
    // No noise was recorded before the blow: the quietest part of the time when waves may come stands for it.
    const auto begin = energy.begin();
    level = quantile(
        std::vector<double>(begin + static_cast<std::ptrdiff_t>(from), begin + static_cast<std::ptrdiff_t>(to)), 0.1);
  }
  constexpr double kAbove = 4.0;
  for (std::size_t i = std::max(from, noiseFrom); i < to; ++i) {
    if (energy[i] > kAbove * level) {
      return start + static_cast<double>(i) * sampleInterval;
    }
  }
  return std::nullopt;
}

}  // namespace strikeplate
