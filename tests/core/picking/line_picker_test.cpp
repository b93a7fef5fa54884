#include "core/picking/line_picker.h"

#include <algorithm>
#include <cmath>
#include <functional>
#include <random>

#include <gtest/gtest.h>

namespace strikeplate {
namespace {

using PulseShape = std::function<double(double)>;  // time after the onset, s -> relative motion

/// Two flat layers, 500 over 2000 m/s, rock at 4 m: the head wave's intercept is 2 h sqrt(1/v1^2 - 1/v2^2).
double firstBreak(double offset) {
  const double intercept = 8.0 * std::sqrt(1.0 / (500.0 * 500.0) - 1.0 / (2000.0 * 2000.0));
  return std::min(offset / 500.0, offset / 2000.0 + intercept);
}

/// Twelve geophones every 4 m, `noise` relative to the first peak; the pulse decays after its first swings.
Gather shotAt(double x, const PulseShape& pulse, double noise, unsigned seed) {
  Gather gather;
  gather.shot.x = x;
  gather.sampleInterval = 0.00025;
  gather.start = -0.010;
  std::mt19937 random(seed);
  std::normal_distribution<double> normal(0.0, noise);
  for (int i = 0; i < 12; ++i) {
    gather.geophones.push_back({4.0 * i, 0.0});
    std::vector<float> trace(600);
    const double onset = firstBreak(std::abs(4.0 * i - x));
    double coloured = 0.0;
    for (std::size_t k = 0; k < trace.size(); ++k) {
      coloured = 0.8 * coloured + 0.6 * normal(random);
      trace[k] = static_cast<float>(pulse(gather.timeOf(static_cast<double>(k)) - onset) + coloured);
    }
    gather.traces.push_back(std::move(trace));
    gather.states.push_back(TraceState::Live);
  }
  return gather;
}

double ringing(double t) {
  return std::cos(2.0 * M_PI * 70.0 * std::max(0.0, t - 0.003)) * std::exp(-30.0 * std::max(0.0, t - 0.003));
}
double gradualPulse(double t) {
  const double u = t / 0.0018;
  return u <= 0.0 ? 0.0 : u < 1.0 ? u * u * std::exp(2.0 * (1.0 - u)) : ringing(t + 0.0012);
}
double abruptPulse(double t) {
  const double u = t / 0.0018;
  return u <= 0.0 ? 0.0 : u < 1.0 ? u * std::exp(1.0 - u) : ringing(t + 0.0012);
}
double cosinePulse(double t) {
  return t <= 0.0 ? 0.0 : t < 0.002 ? 0.5 - 0.5 * std::cos(M_PI * t / 0.002) : ringing(t + 0.001);
}

std::vector<Gather> lineOf(const PulseShape& pulse, double noise) {
  std::vector<Gather> gathers;
  unsigned seed = 1;
  for (const double x : {-2.0, 14.0, 30.0, 46.0})
    gathers.push_back(shotAt(x, pulse, noise, seed++));
  return gathers;
}

std::vector<double> timesOf(const LinePicks& picks) {
  std::vector<double> times;
  for (const auto& gather : picks.onsets) {
    for (const auto& onset : gather)
      times.push_back(onset ? onset->time : -1.0);
  }
  return times;
}

// The onsets are known because the traces were built from them (common practice, no source).
TEST(LinePicker, FindsKnownOnsetsWhateverThePulse) {
  for (const PulseShape& pulse : {PulseShape(gradualPulse), PulseShape(abruptPulse), PulseShape(cosinePulse)}) {
    const std::vector<Gather> gathers = lineOf(pulse, 0.02);
    const LinePicks picks = pickLine(gathers);
    ASSERT_TRUE(picks.finished);
    int picked = 0, near = 0, covered = 0;
    for (std::size_t g = 0; g < gathers.size(); ++g) {
      for (std::size_t i = 0; i < 12; ++i) {
        if (!picks.onsets[g][i])
          continue;
        const double error = std::abs(picks.onsets[g][i]->time - firstBreak(gathers[g].offset(i)));
        ++picked;
        near += error < 0.0005 ? 1 : 0;
        covered += error < 3.0 * picks.onsets[g][i]->sigma ? 1 : 0;
      }
    }
    EXPECT_GE(picked, 46);
    EXPECT_GE(near, 44);
    EXPECT_GE(covered, 42);
  }
}

TEST(LinePicker, AShiftOfTimeZeroMovesThePicks) {
  std::vector<Gather> gathers = lineOf(gradualPulse, 0.05);
  const std::vector<double> before = timesOf(pickLine(gathers));
  for (Gather& gather : gathers)
    gather.start += 0.001;
  const std::vector<double> after = timesOf(pickLine(gathers));
  int picked = 0;
  for (std::size_t i = 0; i < before.size(); ++i) {
    ASSERT_EQ(before[i] > 0.0, after[i] > 0.0);
    if (!(before[i] > 0.0))
      continue;
    EXPECT_NEAR(after[i] - before[i], 0.001, 0.0002);
    ++picked;
  }
  EXPECT_GE(picked, 46);
}

TEST(LinePicker, TheGainOfATraceChangesNothing) {
  std::vector<Gather> gathers = lineOf(gradualPulse, 0.05);
  const std::vector<double> before = timesOf(pickLine(gathers));
  for (Gather& gather : gathers) {
    for (auto& trace : gather.traces) {
      std::vector<float> louder = trace.values();
      for (float& x : louder)
        x *= 1024.0F;
      trace = std::move(louder);
    }
  }
  const std::vector<double> after = timesOf(pickLine(gathers));
  for (std::size_t i = 0; i < before.size(); ++i)
    EXPECT_NEAR(after[i], before[i], 1e-5);
}

TEST(LinePicker, TheMirroredLineGetsTheSamePicks) {
  const std::vector<Gather> gathers = lineOf(gradualPulse, 0.05);
  std::vector<Gather> mirrored = gathers;
  for (Gather& gather : mirrored) {
    gather.shot.x = -gather.shot.x;
    for (Geophone& geophone : gather.geophones)
      geophone.x = -geophone.x;
    std::reverse(gather.geophones.begin(), gather.geophones.end());
    std::reverse(gather.traces.begin(), gather.traces.end());
  }
  const LinePicks straight = pickLine(gathers), turned = pickLine(mirrored);
  for (std::size_t g = 0; g < gathers.size(); ++g) {
    for (std::size_t i = 0; i < 12; ++i) {
      ASSERT_EQ(straight.onsets[g][i].has_value(), turned.onsets[g][11 - i].has_value());
      if (!straight.onsets[g][i])
        continue;
      EXPECT_NEAR(straight.onsets[g][i]->time, turned.onsets[g][11 - i]->time, 1e-5);
    }
  }
}

TEST(LinePicker, ADeadChannelGetsNoPickAndAReversedOneIsNamed) {
  std::vector<Gather> gathers = lineOf(gradualPulse, 0.02);
  unsigned seed = 50;
  for (Gather& gather : gathers) {
    std::mt19937 random(seed++);
    std::normal_distribution<float> normal(0.0F, 1e-4F);
    std::vector<float> dead = gather.traces[5].values(), reversed = gather.traces[8].values();
    for (float& x : dead)
      x = normal(random);
    for (float& x : reversed)
      x = -x;
    gather.traces[5] = std::move(dead);
    gather.traces[8] = std::move(reversed);
  }
  const LinePicks picks = pickLine(gathers);
  for (std::size_t g = 0; g < gathers.size(); ++g) {
    EXPECT_TRUE(picks.dead[g][5]);
    EXPECT_FALSE(picks.onsets[g][5]);
    EXPECT_TRUE(picks.reversed[g][8]);
    EXPECT_FALSE(picks.reversed[g][7]);
  }
}

TEST(LinePicker, NoiseAloneGetsNoPick) {
  const std::vector<Gather> gathers = lineOf([](double) { return 0.0; }, 1.0);
  int picked = 0;
  for (const double time : timesOf(pickLine(gathers)))
    picked += time > -1.0 ? 1 : 0;
  EXPECT_LE(picked, 2);
}

TEST(LinePicker, TrustedPicksStayAsTheyAre) {
  const std::vector<Gather> gathers = lineOf(gradualPulse, 0.05);
  LinePickOptions options;
  options.trusted.assign(4, std::vector<std::optional<Onset>>(12));
  options.trusted[1][3] = Onset{0.0310, 0.0004, 1.0};
  const LinePicks picks = pickLine(gathers, options);
  EXPECT_EQ(picks.onsets[1][3], options.trusted[1][3]);
}

TEST(LinePicker, StopsWhenAskedAndSaysSo) {
  int calls = 0;
  const LinePicks picks = pickLine(lineOf(gradualPulse, 0.05), {}, [&](double) { return ++calls < 3; });
  EXPECT_FALSE(picks.finished);
  EXPECT_EQ(calls, 3);
  EXPECT_EQ(picks.onsets.size(), 4U);
  EXPECT_TRUE(pickLine({}).finished);
}

}  // namespace
}  // namespace strikeplate
