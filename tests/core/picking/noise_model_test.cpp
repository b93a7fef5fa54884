#include "core/picking/noise_model.h"

#include <random>

#include <gtest/gtest.h>

namespace strikeplate {
namespace {

/// A second-order autoregression with poles at 0.9: smooth noise on a short stretch.
std::vector<float> smoothNoise(std::size_t count, unsigned seed) {
  std::mt19937 random(seed);
  std::normal_distribution<double> normal;
  std::vector<float> noise;
  double last = 0.0, before = 0.0;
  for (std::size_t i = 0; i < count + 200; ++i) {
    const double next = 1.8 * last - 0.81 * before + normal(random);
    before = last;
    last = next;
    if (i >= 200)
      noise.push_back(static_cast<float>(next));
  }
  return noise;
}

// The noise is built from white noise, so that its whitened form is known (common practice, no source).
TEST(NoiseModel, ShortStretchesOfSmoothNoiseBecomeWhite) {
  std::vector<std::vector<float>> traces;
  for (unsigned seed = 1; seed <= 40; ++seed)
    traces.push_back(smoothNoise(100, seed));
  const NoiseModel model = fitNoise(traces, std::vector<std::size_t>(traces.size(), 100), 1e-5);
  const std::vector<float> white = whitened(model, smoothNoise(5000, 99));
  double power = 0.0, next = 0.0;
  for (std::size_t i = 20; i < white.size(); ++i) {
    power += static_cast<double>(white[i]) * white[i];
    next += static_cast<double>(white[i]) * white[i - 1];
  }
  EXPECT_LT(std::abs(next / power), 0.1);
}

TEST(NoiseModel, WithoutNoiseTheFilterChangesNothing) {
  const NoiseModel model = fitNoise({{1.0F, 2.0F, 3.0F}}, {3}, 1e-5);
  EXPECT_EQ(model.whitener, std::vector<double>{1.0});
}

}  // namespace
}  // namespace strikeplate
