#include <algorithm>
#include <cmath>

#include <gtest/gtest.h>

#include "core/section/solve.h"
#include "tests/core/section/scene.h"

namespace strikeplate {
namespace {

using testing::evenSpread;
using testing::Scene;
using testing::Spread;

Spread spreadOfSeven() {
  return evenSpread(24, 2.0, {-1.0, 11.0, 23.0, 35.0, 47.0, -15.0, 61.0});
}

Scene humpedScene() {
  Scene scene = testing::planeScene({450.0, 1800.0}, {5.0}, {0.01});
  scene.interfaces[0] = [](double x) {
    const double q = (x - 28.0) / 9.0;
    return -5.0 - 0.01 * x + 1.2 * std::exp(-0.5 * q * q);
  };
  return scene;
}

TravelTimes noisyTimes(unsigned seed) {
  static const testing::TrueTimes exact = testing::networkTimes(humpedScene(), spreadOfSeven(), 0.25, 0.6e-3);
  std::mt19937 random(seed);
  return testing::withNoise(exact.times, random);
}

double meanSigma(const Section& s, double from, double to) {
  double sum = 0.0;
  int n = 0;
  for (std::size_t i = 0; i < s.x.size(); ++i) {
    if (s.x[i] >= from && s.x[i] <= to) {
      sum += s.interfaces[0].depth[i].sigma;
      ++n;
    }
  }
  return sum / n;
}

TEST(SectionLaws, ReversingTheLineMirrorsTheAnswer) {
  const TravelTimes times = noisyTimes(1);
  TravelTimes mirrored = times;
  const int geophones = static_cast<int>(times.geophones.size());
  for (int g = 0; g < geophones; ++g) {
    mirrored.geophones[g] = {46.0 - times.geophones[geophones - 1 - g].x, 0.0};
  }
  for (ShotPoint& s : mirrored.shots) {
    s.x = 46.0 - s.x;
  }
  for (Arrival& a : mirrored.arrivals) {
    a.geophone = geophones - 1 - a.geophone;
  }
  mirrored.ground = Ground(mirrored.geophones, mirrored.shots);
  const Section a = solveSection(times, {});
  const Section b = solveSection(mirrored, {});
  ASSERT_TRUE(a.determined && b.determined);
  EXPECT_NEAR(a.velocities[0].value, b.velocities[0].value, 0.25 * a.velocities[0].sigma);
  for (double x = 0.0; x <= 46.0; x += 2.0) {
    const Estimate p = a.depthAt(2, x);
    const Estimate q = b.depthAt(2, 46.0 - x);
    EXPECT_NEAR(p.value, q.value, 0.25 * p.sigma);
    EXPECT_NEAR(p.sigma, q.sigma, 0.25 * p.sigma);
  }
}

TEST(SectionLaws, OrderOfPicksDoesNotMatter) {
  const TravelTimes times = noisyTimes(2);
  TravelTimes shuffled = times;
  std::mt19937 random(5);
  std::shuffle(shuffled.arrivals.begin(), shuffled.arrivals.end(), random);
  const Section a = solveSection(times, {});
  const Section b = solveSection(shuffled, {});
  ASSERT_TRUE(a.determined && b.determined);
  for (double x = 0.0; x <= 46.0; x += 2.0) {
    EXPECT_NEAR(a.depthAt(2, x).value, b.depthAt(2, x).value, 0.02 * a.depthAt(2, x).sigma);
  }
}

TEST(SectionLaws, BandWidensWherePicksAreMissing) {
  const TravelTimes all = noisyTimes(3);
  TravelTimes gap = all;
  std::erase_if(gap.arrivals, [&](const Arrival& a) {
    const double x = all.geophones[a.geophone].x;
    return x > 19.0 && x < 35.0;
  });
  const Section whole = solveSection(all, {});
  const Section holed = solveSection(gap, {});
  ASSERT_TRUE(whole.determined && holed.determined);
  EXPECT_GT(meanSigma(holed, 21.0, 33.0), 1.3 * meanSigma(whole, 21.0, 33.0));
}

TEST(SectionLaws, BandIsWiderOffTheEndsThanInTheMiddle) {
  const Section s = solveSection(noisyTimes(4), {});
  ASSERT_TRUE(s.determined);
  EXPECT_GT(meanSigma(s, 55.0, 61.0), 1.5 * meanSigma(s, 15.0, 31.0));
}

TEST(SectionLaws, BandNarrowsWithSmallerSigma) {
  TravelTimes coarse = noisyTimes(5);
  TravelTimes fine = coarse;
  const testing::TrueTimes exact = testing::networkTimes(humpedScene(), spreadOfSeven(), 0.25, 0.6e-3);
  for (std::size_t i = 0; i < fine.arrivals.size(); ++i) {
    const double truth = exact.times.arrivals[i].time;
    fine.arrivals[i].time = truth + 0.25 * (coarse.arrivals[i].time - truth);
    fine.arrivals[i].sigma *= 0.25;
  }
  const Section a = solveSection(coarse, {});
  const Section b = solveSection(fine, {});
  ASSERT_TRUE(a.determined && b.determined);
  EXPECT_LT(meanSigma(b, 0.0, 46.0), 0.6 * meanSigma(a, 0.0, 46.0));
}

TEST(SectionLaws, LateTriggerIsFoundWhenDelaysAreSolvedFor) {
  TravelTimes times = noisyTimes(6);
  for (Arrival& a : times.arrivals) {
    a.time += a.shot == 3 ? 3.2e-3 : 0.0;
  }
  SectionOptions options;
  options.solveTriggerDelays = true;
  const Section s = solveSection(times, options);
  ASSERT_TRUE(s.determined) << s.reason;
  ASSERT_EQ(s.triggerDelays.size(), times.shots.size());
  EXPECT_NEAR(s.triggerDelays[3].value, 3.2e-3, 0.4e-3);
  for (const int other : {0, 1, 2, 4, 5, 6}) {
    EXPECT_NEAR(s.triggerDelays[other].value, 0.0, 4.0 * s.triggerDelays[other].sigma);
  }
  EXPECT_LT(testing::depthError(s, humpedScene(), spreadOfSeven(), 2), 0.05);
}

TEST(SectionLaws, BoreholeTiesTheInterfaceDown) {
  const TravelTimes times = noisyTimes(7);
  const Section without = solveSection(times, {});
  SectionOptions options;
  options.boreholes.push_back({58.0, 2, humpedScene().depth(2, 58.0), 0.05, true, "B1"});
  const Section with = solveSection(times, options);
  ASSERT_TRUE(with.determined && without.determined);
  EXPECT_NEAR(with.depthAt(2, 58.0).value, humpedScene().depth(2, 58.0), 0.15);
  EXPECT_LT(with.depthAt(2, 58.0).sigma, 0.5 * without.depthAt(2, 58.0).sigma);
  options.boreholes[0].used = false;
  const Section compared = solveSection(times, options);
  EXPECT_EQ(compared.depthAt(2, 58.0).value, without.depthAt(2, 58.0).value);
}

TEST(SectionLaws, HeldLabelsAreKept) {
  TravelTimes times = noisyTimes(8);
  const Section free = solveSection(times, {});
  ASSERT_TRUE(free.determined);
  const auto second = std::find(free.layerOf.begin(), free.layerOf.end(), 2);
  ASSERT_NE(second, free.layerOf.end());
  const auto i = static_cast<std::size_t>(second - free.layerOf.begin());
  times.arrivals[i].layer = 1;
  times.arrivals[i].layerByHand = true;
  const Section held = solveSection(times, {});
  ASSERT_TRUE(held.determined);
  EXPECT_EQ(held.layerOf[i], 1);
  EXPECT_EQ(held.layerProbability[i], 1.0);
  const Section live = resolveSection(times, {}, free.memory);
  EXPECT_EQ(live.layerOf[i], 1);
}

TEST(SectionLaws, HillOverLevelRockIsFollowed) {
  Scene scene = testing::planeScene({450.0, 2000.0}, {7.0}, {0.0});
  scene.ground = [](double x) {
    const double q = (x - 23.0) / 10.0;
    return 3.0 * std::exp(-0.5 * q * q);
  };
  const Spread spread = spreadOfSeven();
  const testing::TrueTimes exact = testing::networkTimes(scene, spread, 0.25, 0.5e-3);
  std::mt19937 random(9);
  const Section s = solveSection(testing::withNoise(exact.times, random), {});
  ASSERT_TRUE(s.determined) << s.reason;
  ASSERT_EQ(s.layers, 2);
  EXPECT_LT(testing::depthError(s, scene, spread, 2), 0.03);
}

}  // namespace
}  // namespace strikeplate
