#include "core/picking/noise_end.h"

#include <algorithm>
#include <array>
#include <cmath>

#include "core/picking/tune.h"

namespace strikeplate {
namespace {

constexpr std::size_t kKernel = 4;  // samples, 1 ms
static const double kMostPerSample = tune("MP", 0.8);
static const double kFadeAfter = std::exp(-0.25 / tune("LA", 7));
static const double kFadeBefore = std::exp(-0.25 / tune("LB", 17));
static const double kPlainlyLoud = tune("PL", 0.2);
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
  std::vector<double> ratio(n, 0.0), evidence(n, 0.0);
  double energy = 0.0;
  for (std::size_t i = 0; i < n; ++i) {
    energy += static_cast<double>(white[i]) * white[i];
    if (i >= kKernel)
      energy -= static_cast<double>(white[i - kKernel]) * white[i - kKernel];
    if (i + 1 >= kKernel)
      ratio[i + 1 - kKernel / 2 - 1] = ratioOf(std::max(0.0, energy));
  }
  double after = 0.0;
  for (std::size_t i = n; i-- > 0;)
    evidence[i] = after = ratio[i] + kFadeAfter * after;
  double before = 0.0;
  for (std::size_t i = 0; i < n; ++i) {
    evidence[i] -= before;
    before = std::max(0.0, ratio[i] - kPlainlyLoud) + kFadeBefore * before;
  }
  return evidence;
}

}  // namespace strikeplate
