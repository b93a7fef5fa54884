#include "core/record/conditioning.h"

#include <cmath>
#include <numbers>
#include <random>

#include <gtest/gtest.h>

#include "core/record/hum.h"
#include "core/record/onset_shift.h"

namespace strikeplate {
namespace {

constexpr double kInterval = 0.000125;
constexpr double kTwoPi = 2.0 * std::numbers::pi;

std::vector<float> sineWave(double frequency, std::size_t count, double amplitude = 1.0, double phase = 0.0) {
  std::vector<float> out(count);
  for (std::size_t i = 0; i < count; ++i) {
    out[i] =
        static_cast<float>(amplitude * std::sin(kTwoPi * frequency * kInterval * static_cast<double>(i) + phase));
  }
  return out;
}

double middleRms(const std::vector<float>& samples) {
  double squares = 0.0;
  const std::size_t quarter = samples.size() / 4;
  for (std::size_t i = quarter; i < 3 * quarter; ++i) {
    squares += static_cast<double>(samples[i]) * static_cast<double>(samples[i]);
  }
  return std::sqrt(squares / static_cast<double>(2 * quarter));
}

double gainAt(double frequency, const PassBand& band) {
  const auto wave = sineWave(frequency, 32000);
  return middleRms(zeroPhase(wave, kInterval, band)) / middleRms(wave);
}

TEST(Butterworth, CornersAreThreeDecibelsDownAndTheSlopesSteep) {
  const double corner = 1.0 / std::numbers::sqrt2;
  EXPECT_NEAR(gainAt(100.0, {0.0, 100.0}), corner, 0.002);
  EXPECT_NEAR(gainAt(20.0, {20.0, 0.0}), corner, 0.002);
  EXPECT_NEAR(gainAt(40.0, {10.0, 200.0}), 1.0, 0.001);
  EXPECT_LT(gainAt(200.0, {0.0, 100.0}), 0.01);
  EXPECT_LT(gainAt(10.0, {20.0, 0.0}), 0.01);
}

TEST(Butterworth, NoPhaseIsMoved) {
  const auto wave = sineWave(60.0, 16000);
  const auto out = zeroPhase(wave, kInterval, {5.0, 400.0});
  for (std::size_t i = 4000; i < 12000; ++i) {
    ASSERT_NEAR(out[i], wave[i], 0.002);
  }
}

TEST(Butterworth, ConstantPassesAHighCutAndNotALowCut) {
  const std::vector<float> level(500, 3.0F);
  for (const float s : zeroPhase(level, kInterval, {0.0, 100.0})) {
    EXPECT_NEAR(s, 3.0F, 1e-5F);
  }
  for (const float s : zeroPhase(level, kInterval, {10.0, 0.0})) {
    EXPECT_NEAR(s, 0.0F, 1e-5F);
  }
  EXPECT_EQ(zeroPhase(level, kInterval, {0.0, 0.0}), level);
  EXPECT_EQ(zeroPhase(level, kInterval, {0.0, 4000.0}), level);
}

// The figures stated in butterworth.h and, in words, in the record view's menu.
TEST(Butterworth, EffectOnOnsetTimeIsAsStated) {
  const auto moved = [](double low, double high) { return 1e3 * onsetShift({low, high}); };
  EXPECT_EQ(moved(0.0, 0.0), 0.0);
  EXPECT_NEAR(moved(0.0, 400.0), -0.04, 0.01);
  EXPECT_NEAR(moved(0.0, 200.0), -0.24, 0.01);
  EXPECT_NEAR(moved(0.0, 100.0), -1.31, 0.01);
  EXPECT_NEAR(moved(5.0, 0.0), 0.17, 0.01);
  EXPECT_NEAR(moved(10.0, 0.0), 0.31, 0.01);
  EXPECT_NEAR(moved(20.0, 0.0), 0.55, 0.01);
}

TEST(Hum, MainsAndThirdHarmonicAreTakenOut) {
  std::vector<float> trace(4000);
  const auto mains = sineWave(50.0, trace.size(), 5.0, 0.7);
  const auto third = sineWave(150.0, trace.size(), 1.0, -0.2);
  for (std::size_t i = 0; i < trace.size(); ++i) {
    trace[i] = mains[i] + third[i] + 2.0F;
  }
  const Hum hum = fitHum(trace, kInterval, 400, 50.0);
  EXPECT_NEAR(hum.share, 1.0, 1e-6);
  for (const float s : withoutHum(trace, kInterval, hum)) {
    ASSERT_NEAR(s, 2.0F, 0.001F);
  }
}

TEST(Hum, IsOnlyFoundWhereItIs) {
  std::mt19937 random(3);
  std::normal_distribution<float> noise;
  std::vector<std::vector<float>> quiet(12), humming(12);
  for (std::size_t t = 0; t < quiet.size(); ++t) {
    const auto mains = sineWave(50.0, 800, 2.0, 0.5 * static_cast<double>(t));
    for (std::size_t i = 0; i < 800; ++i) {
      quiet[t].push_back(noise(random));
      humming[t].push_back(quiet[t][i] + mains[i]);
    }
  }
  const auto rows = [](const std::vector<std::vector<float>>& all) {
    return std::vector<std::span<const float>>(all.begin(), all.end());
  };
  EXPECT_FALSE(carriesHum(rows(quiet), kInterval, 50.0));
  EXPECT_TRUE(carriesHum(rows(humming), kInterval, 50.0));
  EXPECT_FALSE(carriesHum(rows(humming), kInterval, 60.0));
  EXPECT_FALSE(carriesHum({}, kInterval, 50.0));
}

TEST(Hum, TooShortANoiseIsLeftAlone) {
  const auto trace = sineWave(50.0, 1000);
  EXPECT_EQ(withoutHum(trace, kInterval, fitHum(trace, kInterval, 100, 50.0)), trace);
}

// A quarter of a period of noise before the blow and a break 30 ms after it, on a record of 250 ms.
TEST(Hum, IsTakenOutWhereHardlyAnyNoiseWasRecorded) {
  std::mt19937 random(5);
  std::normal_distribution<double> noise(0.0, 0.1);
  constexpr double kStep = 0.00025;
  constexpr double kAmplitude = 3.0;
  for (const double frequency : {50.0, 60.0}) {
    for (int phase = 0; phase < 8; ++phase) {
      std::vector<float> clean(1000), humming(1000);
      for (std::size_t i = 0; i < clean.size(); ++i) {
        const double after = static_cast<double>(i) * kStep - 0.035;
        const double wave = after > 0.0 ? 20.0 * (1.0 - std::exp(-after / 0.003)) * std::exp(-after / 0.02) *
                                              std::sin(kTwoPi * 45.0 * after)
                                        : 0.0;
        clean[i] = static_cast<float>(wave + noise(random));
        humming[i] =
            clean[i] + static_cast<float>(
                           kAmplitude * std::sin(kTwoPi * frequency * kStep * static_cast<double>(i) + 0.8 * phase));
      }
      Conditioning settings;
      settings.removeDc = false;
      settings.humFrequency = frequency;
      const auto out = conditioned(humming, kStep, -0.005, settings);
      double left = 0.0;
      for (std::size_t i = 0; i < out.size(); ++i) {
        left = std::max(left, std::abs(static_cast<double>(out[i]) - static_cast<double>(clean[i])));
      }
      EXPECT_LT(left, 0.05 * kAmplitude) << frequency << " Hz, phase " << phase;
    }
  }
}

TEST(Hum, ATraceOfLessThanThreePeriodsIsLeftAlone) {
  const auto trace = sineWave(50.0, 400);
  EXPECT_EQ(withoutHum(trace, kInterval, fitHumThroughout(trace, kInterval, 50.0)), trace);
}

TEST(Conditioning, StepsDoWhatTheySay) {
  const std::vector<float> trace = {1.0F, 3.0F, -5.0F, 5.0F};
  EXPECT_EQ(withoutDc(trace), (std::vector<float>{0.0F, 2.0F, -6.0F, 4.0F}));
  EXPECT_EQ(normalised(trace), (std::vector<float>{0.2F, 0.6F, -1.0F, 1.0F}));
  EXPECT_EQ(normalised(std::vector<float>(3, 0.0F)), std::vector<float>(3, 0.0F));
  const auto gained = withTimeGain(trace, 0.1, 0.0, 1.0);
  EXPECT_FLOAT_EQ(gained[1], 3.0F);
  EXPECT_FLOAT_EQ(gained[3], 15.0F);
  Conditioning settings;
  settings.reversePolarity = true;
  settings.normalise = true;
  EXPECT_EQ(conditioned(trace, 0.1, 0.0, settings), (std::vector<float>{0.0F, -1.0F / 3.0F, 1.0F, -2.0F / 3.0F}));
}

TEST(Conditioning, AutomaticGainEvensOutAndStaysFinite) {
  std::vector<float> trace = sineWave(60.0, 8000);
  for (std::size_t i = 4000; i < trace.size(); ++i) {
    trace[i] *= 0.1F;
  }
  const auto out = withAutomaticGain(trace, kInterval, 0.1);
  EXPECT_NEAR(out[2035] / trace[2035] * 10.0F, out[6035] / trace[6035], 0.01F * out[6035] / trace[6035]);
  for (const float s : withAutomaticGain(std::vector<float>(100, 0.0F), kInterval, 0.1)) {
    EXPECT_EQ(s, 0.0F);
  }
}

}  // namespace
}  // namespace strikeplate
