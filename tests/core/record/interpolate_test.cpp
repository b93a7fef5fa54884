#include "core/record/interpolate.h"

#include <cmath>
#include <numbers>

#include <gtest/gtest.h>

namespace strikeplate {
namespace {

std::vector<float> sine(double cyclesPerSample, double shift, std::size_t count) {
  std::vector<float> out(count);
  for (std::size_t i = 0; i < count; ++i) {
    out[i] = static_cast<float>(
        std::sin(2.0 * std::numbers::pi * cyclesPerSample * (static_cast<double>(i) + shift) + 0.3));
  }
  return out;
}

TEST(Interpolate, SinesUpToAThirdOfTheSamplingRateAreMovedExactly) {
  for (const double frequency : {0.01, 0.1, 0.25, 0.35}) {
    for (const double shift : {0.1, 0.25, 0.5, -3.77}) {
      const auto moved = interpolated(sine(frequency, 0.0, 200), shift, 1.0, 200);
      const auto wanted = sine(frequency, shift, 200);
      for (std::size_t i = 20; i < 180; ++i) {
        ASSERT_NEAR(moved[i], wanted[i], 1e-4) << frequency << " " << shift << " " << i;
      }
    }
  }
}

TEST(Interpolate, WholePositionsAreTheSamplesThemselves) {
  const auto samples = sine(0.2, 0.0, 50);
  EXPECT_EQ(interpolated(samples, 0.0, 1.0, 50), samples);
  EXPECT_EQ(interpolated(samples, 3.0, 1.0, 10), std::vector<float>(samples.begin() + 3, samples.begin() + 13));
}

TEST(Interpolate, ConstantStaysConstantBeyondTheEnds) {
  for (const float value : interpolated(std::vector<float>(5, 7.0F), -20.3, 0.7, 60)) {
    EXPECT_FLOAT_EQ(value, 7.0F);
  }
}

TEST(Interpolate, FinerStepGivesTheSameSignal) {
  const auto fine = interpolated(sine(0.2, 0.0, 100), 0.0, 0.25, 400);
  for (std::size_t i = 80; i < 320; ++i) {
    const double wanted = std::sin(2.0 * std::numbers::pi * 0.2 * 0.25 * static_cast<double>(i) + 0.3);
    ASSERT_NEAR(fine[i], wanted, 1e-4);
  }
}

}  // namespace
}  // namespace strikeplate
