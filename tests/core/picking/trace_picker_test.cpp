#include "core/picking/trace_picker.h"

#include <cmath>
#include <random>

#include <gtest/gtest.h>

#include "core/picking/onset_aic.h"

namespace strikeplate {
namespace {

std::vector<float> whiteNoise(std::size_t count, double sigma, unsigned seed) {
  std::mt19937 random(seed);
  std::normal_distribution<float> normal(0.0F, static_cast<float>(sigma));
  std::vector<float> samples(count);
  for (float& x : samples)
    x = normal(random);
  return samples;
}

/// Noise of 1 % of the first peak and a decaying 80 Hz wave that starts at `onset`.
std::vector<float> blow(double interval, double start, double onset, unsigned seed) {
  std::vector<float> samples = whiteNoise(static_cast<std::size_t>(0.3 / interval), 0.01, seed);
  for (std::size_t i = 0; i < samples.size(); ++i) {
    const double t = start + static_cast<double>(i) * interval - onset;
    if (t > 0.0)
      samples[i] += static_cast<float>(std::sin(2.0 * M_PI * 80.0 * t) * std::exp(-40.0 * t));
  }
  return samples;
}

Gather gatherOf(std::vector<std::vector<float>> traces, double interval, double start) {
  Gather gather;
  gather.sampleInterval = interval;
  gather.start = start;
  for (std::size_t i = 0; i < traces.size(); ++i)
    gather.geophones.push_back({5.0 * static_cast<double>(i + 1), 0.0});
  gather.states.assign(traces.size(), TraceState::Live);
  gather.traces.assign(traces.begin(), traces.end());
  return gather;
}

// Values: a step of variance by a factor of 36 after 300 of 500 samples; Maeda 1985, Zisin 38, 365-379.
TEST(OnsetAic, FindsATrueVarianceStepWithinOneSample) {
  for (const unsigned seed : {1U, 2U, 3U, 4U, 5U}) {
    std::vector<float> samples = whiteNoise(300, 1.0, seed);
    const std::vector<float> loud = whiteNoise(200, 6.0, seed + 100);
    samples.insert(samples.end(), loud.begin(), loud.end());
    const auto step = leastAic(samples);
    ASSERT_TRUE(step);
    EXPECT_NEAR(static_cast<double>(step->index), 300.0, 1.0) << "seed " << seed;
    EXPECT_NEAR(step->ratio, 36.0, 12.0);
  }
}

TEST(OnsetAic, SilenceAndTooFewSamplesHaveNoStep) {
  EXPECT_FALSE(leastAic(std::vector<float>(100, 3.0F)));
  EXPECT_FALSE(leastAic(std::vector<float>{1.0F, 2.0F, 1.0F}));
  EXPECT_FALSE(leastAic({}));
}

TEST(TracePicker, PicksTheOnsetAtEveryUsualSampleInterval) {
  for (const double interval : {0.000125, 0.00025, 0.0005, 0.001}) {
    for (const double onset : {0.012, 0.040, 0.0905}) {
      const auto pick = pickOnset(blow(interval, -0.010, onset, 7), interval, -0.010);
      ASSERT_TRUE(pick);
      EXPECT_NEAR(pick->time, onset, std::max(0.0007, 1.1 * interval)) << interval << " " << onset;
      EXPECT_GT(pick->sigma, 0.0);
      EXPECT_GT(pick->confidence, 0.8);
    }
  }
}

TEST(TracePicker, NoiseSilenceAndBadNumbersGetNoPick) {
  EXPECT_FALSE(pickOnset(whiteNoise(1200, 1.0, 11), 0.00025, 0.0));
  EXPECT_FALSE(pickOnset(std::vector<float>(1200, 0.0F), 0.00025, 0.0));
  EXPECT_FALSE(pickOnset({}, 0.00025, 0.0));
  std::vector<float> bad = blow(0.00025, 0.0, 0.05, 3);
  bad[10] = std::nanf("");
  EXPECT_FALSE(pickOnset(bad, 0.00025, 0.0));
}

TEST(TracePicker, AShiftOfTimeZeroMovesThePickAndAScaleDoesNot) {
  std::vector<float> samples = blow(0.00025, -0.010, 0.033, 5);
  const auto pick = pickOnset(samples, 0.00025, -0.010);
  const auto shifted = pickOnset(samples, 0.00025, 0.990);
  for (float& x : samples)
    x *= -4096.0F;
  const auto scaled = pickOnset(samples, 0.00025, -0.010);
  ASSERT_TRUE(pick && shifted && scaled);
  EXPECT_NEAR(shifted->time - pick->time, 1.0, 1e-9);
  EXPECT_EQ(scaled->time, pick->time);
  EXPECT_EQ(scaled->sigma, pick->sigma);
}

TEST(TracePicker, ADeadTraceOfAGatherGetsNoPick) {
  Gather gather = gatherOf({blow(0.0005, 0.0, 0.02, 1), blow(0.0005, 0.0, 0.03, 2)}, 0.0005, 0.0);
  gather.states[1] = TraceState::Dead;
  const auto picks = pickGather(gather);
  ASSERT_EQ(picks.size(), 2U);
  EXPECT_TRUE(picks[0]);
  EXPECT_FALSE(picks[1]);
}

TEST(SnapOnset, FindsTheOnsetNearTheHandAndNoneInQuietGround) {
  const Gather gather = gatherOf({blow(0.00025, 0.0, 0.050, 9)}, 0.00025, 0.0);
  for (const double near : {0.047, 0.050, 0.052}) {
    const auto pick = snapOnset(gather, 0, near, 0.006);
    ASSERT_TRUE(pick);
    EXPECT_NEAR(pick->time, 0.050, 0.0007);
  }
  EXPECT_FALSE(snapOnset(gather, 0, -0.5, 0.005));
}

TEST(SigmaAt, IsLargerOnANoisierTrace) {
  std::vector<float> noisy = blow(0.00025, 0.0, 0.050, 9);
  const std::vector<float> more = whiteNoise(noisy.size(), 0.2, 21);
  for (std::size_t i = 0; i < noisy.size(); ++i)
    noisy[i] += more[i];
  const Gather gather = gatherOf({blow(0.00025, 0.0, 0.050, 9), noisy}, 0.00025, 0.0);
  EXPECT_LT(sigmaAt(gather, 0, 0.050), sigmaAt(gather, 1, 0.050));
  EXPECT_GE(sigmaAt(gather, 0, 0.050), 0.00015);
  EXPECT_LE(sigmaAt(gather, 1, 0.050), 0.003);
}

}  // namespace
}  // namespace strikeplate
