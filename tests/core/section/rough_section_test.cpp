#include <cmath>

#include <gtest/gtest.h>

#include "core/section/solve.h"
#include "tests/core/section/scene.h"

namespace strikeplate {
namespace {

using testing::evenSpread;
using testing::Scene;
using testing::Spread;

/// 450 over 1800 m/s, depth 5 m, a channel 2 m deep in the middle.
Scene buriedChannel() {
  Scene scene = testing::planeScene({450.0, 1800.0}, {5.0}, {0.0});
  scene.interfaces[0] = [](double x) {
    const double q = (x - 47.0) / 12.0;
    return -5.0 - 2.0 * std::exp(-0.5 * q * q);
  };
  return scene;
}

Spread fortyEight() {
  return evenSpread(48, 2.0, {-1.0, 15.0, 31.0, 47.0, 63.0, 79.0, 95.0});
}

TEST(RoughSection, BuriedChannelIsFoundWithinTwoPercent) {
  const Scene scene = buriedChannel();
  const Spread spread = fortyEight();
  const testing::TrueTimes exact = testing::networkTimes(scene, spread, 0.25, 0.7e-3);
  std::mt19937 random(7);
  for (int draw = 0; draw < 4; ++draw) {
    const Section s = solveSection(testing::withNoise(exact.times, random), {});
    ASSERT_TRUE(s.determined) << s.reason;
    ASSERT_EQ(s.layers, 2);
    EXPECT_LT(testing::depthError(s, scene, spread, 2), 0.02);
    EXPECT_GT(testing::coverageOf(s, scene, spread, 2).share95, 0.8);
  }
}

TEST(RoughSection, RaysAgreeWithTheNetworkOnExactTimes) {
  const Scene scene = buriedChannel();
  const testing::TrueTimes exact = testing::networkTimes(scene, fortyEight(), 0.25, 0.7e-3);
  const Section s = solveSection(exact.times, {});
  ASSERT_TRUE(s.determined) << s.reason;
  for (std::size_t i = 0; i < s.predicted.size(); ++i) {
    EXPECT_NEAR(s.predicted[i], exact.times.arrivals[i].time, 1e-4);
  }
  EXPECT_LT(testing::depthError(s, scene, fortyEight(), 2), 5e-3);
}

TEST(RoughSection, GrossMispicksDoNotBendRock) {
  const Scene scene = buriedChannel();
  const Spread spread = fortyEight();
  const testing::TrueTimes exact = testing::networkTimes(scene, spread, 0.25, 0.7e-3);
  std::mt19937 random(11);
  const Section s = solveSection(testing::withNoise(exact.times, random, 1.0, 0.05), {});
  ASSERT_TRUE(s.determined) << s.reason;
  EXPECT_LT(testing::depthError(s, scene, spread, 2), 0.03);
}

TEST(RoughSection, LiveSolveAgreesWithTheFullOne) {
  const Scene scene = buriedChannel();
  const Spread spread = fortyEight();
  const testing::TrueTimes exact = testing::networkTimes(scene, spread, 0.25, 0.7e-3);
  std::mt19937 random(3);
  TravelTimes times = testing::withNoise(exact.times, random);
  const Section full = solveSection(times, {});
  ASSERT_TRUE(full.determined) << full.reason;
  times.arrivals[40].time += 0.7e-3;
  const Section live = resolveSection(times, {}, full.memory);
  const Section again = solveSection(times, {});
  ASSERT_TRUE(live.determined) << live.reason;
  ASSERT_EQ(live.x.size(), again.x.size());
  for (std::size_t i = 0; i < live.x.size(); ++i) {
    const Estimate& a = live.interfaces[0].depth[i];
    const Estimate& b = again.interfaces[0].depth[i];
    EXPECT_NEAR(a.value, b.value, 0.5 * b.sigma);
    EXPECT_NEAR(a.sigma, b.sigma, 0.4 * b.sigma);
  }
}

TEST(RoughSection, MemoryOfAnotherLineIsNotUsed) {
  const Spread spread = evenSpread(24, 2.0, {-1.0, 23.0, 47.0});
  const TravelTimes times = testing::flatTimes({500.0, 2000.0}, {5.0}, spread, 0.5e-3).times;
  SectionMemory strange;
  strange.layers = 2;
  strange.numbers = {2.0, 17.0, std::nan("")};
  const Section s = resolveSection(times, {}, strange);
  ASSERT_TRUE(s.determined) << s.reason;
  EXPECT_NEAR(s.depthAt(2, 23.0).value, 5.0, 0.01);
}

}  // namespace
}  // namespace strikeplate
