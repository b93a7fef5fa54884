#include "core/picking/noise_end.h"

#include <algorithm>
#include <array>
#include <cmath>

namespace strikeplate {
namespace {

constexpr std::size_t kKernel = 4;  // samples, 1 ms
constexpr double kMostPerSample = 0.8;
struct Level {
  double variance, weight;
};
constexpr std::array<Level, 7> kLevels{
    {{1.0, 0.12}, {1.6, 0.2}, {2.5, 0.2}, {5.0, 0.16}, {15.0, 0.12}, {100.0, 0.1}, {1e4, 0.1}}};

double ratioOf(double energy) {
  double sum = 0.0;
  for (const Level& level : kLevels) {
    sum += level.weight * std::exp(std::min(600.0, 0.5 * energy * (1.0 - 1.0 / level.variance))) *
           std::pow(level.variance, -0.5 * kKernel);
  }
  return std::min(kMostPerSample, std::log(sum) / kKernel);
}

}  // namespace

std::vector<double> noiseEndEvidence(std::span<const float> white) {
  const std::size_t n = white.size();
  std::vector<double> evidence(n + 1, 0.0);
  double energy = 0.0;
  for (std::size_t i = n; i-- > 0;) {
    energy += static_cast<double>(white[i]) * white[i];
    if (i + kKernel < n)
      energy -= static_cast<double>(white[i + kKernel]) * white[i + kKernel];
    evidence[i] = evidence[i + 1] + (i + kKernel <= n ? ratioOf(std::max(0.0, energy)) : 0.0);
  }
  evidence.resize(n);
  return evidence;
}

}  // namespace strikeplate
