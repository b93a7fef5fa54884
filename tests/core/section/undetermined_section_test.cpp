#include <cmath>

#include <gtest/gtest.h>

#include "core/section/solve.h"
#include "tests/core/section/scene.h"

namespace strikeplate {
namespace {

using testing::evenSpread;
using testing::Spread;

TravelTimes twoLayers() {
  return testing::flatTimes({500.0, 2000.0}, {5.0}, evenSpread(24, 2.0, {-1.0, 23.0, 47.0}), 0.5e-3).times;
}

void expectNoNumber(const Section& s) {
  EXPECT_FALSE(s.determined);
  EXPECT_FALSE(s.reason.empty());
  EXPECT_TRUE(s.interfaces.empty());
  EXPECT_TRUE(s.velocities.empty());
}

TEST(UndeterminedSection, NoPicksGiveAReason) {
  expectNoNumber(solveSection({}, {}));
}

TEST(UndeterminedSection, NotANumberIsNamedWithItsShotAndTrace) {
  TravelTimes times = twoLayers();
  times.arrivals[30].time = std::nan("");
  const Section s = solveSection(times, {});
  expectNoNumber(s);
  EXPECT_NE(s.reason.find("shot 2, trace 7"), std::string::npos) << s.reason;
}

TEST(UndeterminedSection, TwoStationsAreTooFew) {
  expectNoNumber(
      solveSection(testing::flatTimes({500.0, 2000.0}, {5.0}, evenSpread(2, 20.0, {-1.0, 41.0}), 1e-3).times, {}));
}

TEST(UndeterminedSection, AllPicksHeldInLayerOneGiveAReason) {
  TravelTimes times = twoLayers();
  for (Arrival& a : times.arrivals) {
    a.layer = 1;
    a.layerByHand = true;
  }
  expectNoNumber(solveSection(times, {}));
}

TEST(UndeterminedSection, OneBranchGivesAReason) {
  const Spread spread = evenSpread(24, 2.0, {-1.0, 23.0, 47.0});
  const TravelTimes exact = testing::flatTimes({500.0}, {}, spread, 0.5e-3).times;
  expectNoNumber(solveSection(exact, {}));
  for (unsigned seed = 1; seed <= 5; ++seed) {
    std::mt19937 random(seed);
    expectNoNumber(solveSection(testing::withNoise(exact, random), {}));
  }
}

TEST(UndeterminedSection, VelocityFallingWithDepthGivesAReason) {
  TravelTimes times = testing::flatTimes({500.0}, {}, evenSpread(24, 2.0, {-1.0, 47.0}), 0.5e-3).times;
  for (Arrival& a : times.arrivals) {
    const double x = times.offset(a);
    a.time = x < 20.0 ? x / 1500.0 : 20.0 / 1500.0 + (x - 20.0) / 500.0;
  }
  expectNoNumber(solveSection(times, {}));
}

TEST(UndeterminedSection, StoppedEarlySaysSo) {
  const Section s = solveSection(twoLayers(), {}, [](double) { return false; });
  EXPECT_FALSE(s.finished);
}

TEST(UndeterminedSection, OneShotAloneLeavesDipOpen) {
  const Spread one = evenSpread(24, 2.0, {-1.0});
  const Section s = solveSection(testing::flatTimes({500.0, 2000.0}, {5.0}, one, 0.5e-3).times, {});
  const Section all = solveSection(twoLayers(), {});
  ASSERT_TRUE(s.determined) << s.reason;
  EXPECT_NEAR(s.depthAt(2, -1.0).value, 5.0, 1.0);
  EXPECT_GT(s.interfaces[0].meanDip.sigma, 1.0);
  EXPECT_GT(s.interfaces[0].meanDip.sigma, 10.0 * all.interfaces[0].meanDip.sigma);
}

}  // namespace
}  // namespace strikeplate
