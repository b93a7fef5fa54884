#include <cmath>
#include <random>
#include <vector>

#include <gtest/gtest.h>

#include "core/methods/reversed_pair.h"
#include "core/traveltime/branches.h"

namespace strikeplate {
namespace {

constexpr double kDip = 6.0 * M_PI / 180.0;

/// Own golden example (reference 1.6): 600 over 2400 m/s, 6 degrees down toward B, 6 m perpendicular below A, 120 m.
TravelTimes dippingLine(double sigma) {
  TravelTimes times;
  times.shots = {{0.0, 0.0, 0.0}, {120.0, 0.0, 0.0}};
  const double theta = std::asin(600.0 / 2400.0), lead = 2.0 * std::cos(theta) / 600.0;
  for (int g = 0; g < 9; ++g) {
    times.geophones.push_back({20.0 + 10.0 * g, 0.0});
  }
  for (int shot = 0; shot < 2; ++shot) {
    for (int g = 0; g < 9; ++g) {
      const double x = times.geophones[static_cast<std::size_t>(g)].x;
      Arrival a;
      a.shot = shot;
      a.trace = a.geophone = g;
      a.sigma = sigma;
      a.layer = 2;
      a.time = shot == 0 ? x * std::sin(theta + kDip) / 600.0 + 6.0 * lead
                         : (120.0 - x) * std::sin(theta - kDip) / 600.0 + (6.0 + 120.0 * std::sin(kDip)) * lead;
      times.arrivals.push_back(a);
    }
  }
  return times;
}

ReversedPair pairOf(const TravelTimes& times) {
  const auto branches = findBranches(times);
  return reversedPair(times, *findBranch(branches, 0, 1, 2), *findBranch(branches, 1, -1, 2));
}

// Own golden table (reference 1.6, W20), the formulas being Hagedoorn's (1959).
TEST(PlusMinus, TimesAndDepthsOfTheGoldenTable) {
  const ReversedPair pair = pairOf(dippingLine(1e-3));
  ASSERT_TRUE(pair.determined) << pair.reason;
  EXPECT_NEAR(pair.reciprocalTime.value, 89.33286e-3, 1e-8);
  EXPECT_NEAR(1.0 / pair.minusSlowness.value, 2413.220, 1e-3);
  const double plus[] = {26.1122e-3, 32.8595e-3, 39.6068e-3, 46.3540e-3, 53.1013e-3};
  const double minus[] = {-53.3926e-3, -36.8172e-3, -20.2418e-3, -3.6665e-3, 12.9089e-3};
  const double depth[] = {8.0906, 10.1811, 12.2717, 14.3623, 16.4528};
  const Overburden above{{{1.0 / 600, 0.0}}, {}};
  for (std::size_t i = 0; i < 5; ++i) {
    const ReversedStation& d = pair.stations[2 * i];
    EXPECT_NEAR(d.plus, plus[i], 6e-8);
    EXPECT_NEAR(d.minus, minus[i], 6e-8);
    // With the true velocity the perpendicular depth is exact; with the minus velocity 0.036 % less.
    EXPECT_NEAR(depthFromDelay({{0.5 * d.plus, 0.0}, {1.0 / 2400, 0.0}, 0.0}, above).value, depth[i], 6e-5);
    EXPECT_NEAR(stationDepth(pair, d, pair.minusSlowness, above).value / depth[i], 1.0 - 0.00036, 2e-5);
  }
}

// Mean of the apparent slownesses is exact but for the cosine of the dip (reference 1.4; W16).
TEST(Reciprocal, MeanSlownessIsOffByTheCosineOfTheDipOnly) {
  const ReversedPair pair = pairOf(dippingLine(1e-3));
  EXPECT_NEAR(1.0 / pair.meanSlowness.value, 2400.0 / std::cos(kDip), 1e-6);
}

// Sum of layers above: 2 sum h c = T+ (reference 1.6), 500/1500/3000 m/s, 5 and 10 m (W12).
TEST(PlusMinus, LayersAboveAreTakenOff) {
  const Overburden above{{{1.0 / 500, 0.0}, {1.0 / 1500, 0.0}}, {{5.0, 0.0}}};
  EXPECT_NEAR(depthFromDelay({{0.5 * 31.26727e-3, 0.0}, {1.0 / 3000, 0.0}, 0.0}, above).value, 15.0, 1e-4);
  EXPECT_FALSE(depthFromDelay({{5e-3, 0.0}, {1.0 / 3000, 0.0}, 0.0}, above).determined);
  EXPECT_FALSE(depthFromDelay({{15e-3, 0.0}, {1.0 / 1400, 0.0}, 0.0}, above).determined);
}

TEST(PlusMinus, IntervalsHoldWhatTheyPromise) {
  std::mt19937 random(7);
  std::normal_distribution<double> noise(0.0, 0.5e-3);
  const TravelTimes exact = dippingLine(0.5e-3);
  const Overburden above{{{1.0 / 600, 0.0}}, {}};
  const ReversedPair truth = pairOf(exact);
  const double expected = stationDepth(truth, truth.stations[4], truth.minusSlowness, above).value;
  int in68 = 0, in95 = 0;
  constexpr int kTrials = 2000;
  for (int trial = 0; trial < kTrials; ++trial) {
    TravelTimes times = exact;
    for (Arrival& a : times.arrivals) {
      a.time += noise(random);
    }
    const ReversedPair pair = pairOf(times);
    const Estimate z = stationDepth(pair, pair.stations[4], pair.minusSlowness, above);
    in68 += z.low68 <= expected && expected <= z.high68 ? 1 : 0;
    in95 += z.low95 <= expected && expected <= z.high95 ? 1 : 0;
  }
  EXPECT_NEAR(in68, 0.6827 * kTrials, 3.0 * std::sqrt(kTrials * 0.6827 * 0.3173));
  EXPECT_NEAR(in95, 0.95 * kTrials, 3.0 * std::sqrt(kTrials * 0.95 * 0.05));
}

TEST(PlusMinus, TooFewCommonGeophonesGiveAReason) {
  TravelTimes times = dippingLine(1e-3);
  std::erase_if(times.arrivals, [](const Arrival& a) { return a.shot == 0 ? a.geophone < 6 : a.geophone > 7; });
  const ReversedPair pair = pairOf(times);
  EXPECT_FALSE(pair.determined);
  EXPECT_EQ(pair.reason, "fewer than three geophones recorded this layer from both shots");
}

}  // namespace
}  // namespace strikeplate
