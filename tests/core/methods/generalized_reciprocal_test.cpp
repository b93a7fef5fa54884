#include "core/methods/generalized_reciprocal.h"

#include <algorithm>
#include <cmath>
#include <vector>

#include <gtest/gtest.h>

#include "core/traveltime/branches.h"

namespace strikeplate {
namespace {

double depthAt(double x) {
  return 10.0 + 2.5 * std::sin(2.0 * M_PI * x / 60.0);
}

/// Own example (reference 1.8, W21): 600 over 2400 m/s, depth 10 + 2.5 sin(2 pi x / 60) m, geophones 2.5 m apart,
/// shots 40 m off the ends. Times to first order in the relief: along the refractor's length, then the quickest way
/// up.
TravelTimes undulatingLine() {
  TravelTimes times;
  for (int g = 0; g <= 48; ++g) {
    times.geophones.push_back({2.5 * g, 0.0});
  }
  times.shots = {{-40.0, 0.0, 0.0}, {160.0, 0.0, 0.0}};
  std::vector<double> x, along;
  for (double at = -60.0; at <= 180.0; at += 0.05) {
    const double step = x.empty() ? 0.0 : std::hypot(at - x.back(), depthAt(at) - depthAt(x.back()));
    along.push_back(along.empty() ? 0.0 : along.back() + step);
    x.push_back(at);
  }
  const auto length = [&](double at) { return along[static_cast<std::size_t>(std::lround((at + 60.0) / 0.05))]; };
  const auto up = [](double from, double to) { return std::hypot(from - to, depthAt(from)) / 600.0; };
  for (int shot = 0; shot < 2; ++shot) {
    const double source = times.shots[static_cast<std::size_t>(shot)].x, way = shot == 0 ? 1.0 : -1.0;
    double start = 1.0;
    for (double d = 0.0; d < 10.0; d += 0.05) {
      start =
          std::min(start, up(source + way * d, source) - way * (length(source + way * d) - length(source)) / 2400.0);
    }
    for (std::size_t g = 0; g < times.geophones.size(); ++g) {
      const double at = times.geophones[g].x;
      double best = 1.0;
      for (double d = 0.0; d < 15.0; d += 0.05) {
        const double leave = at - way * d;
        best = std::min(best, way * (length(leave) - length(source)) / 2400.0 + up(leave, at));
      }
      Arrival a;
      a.shot = shot;
      a.geophone = a.trace = static_cast<int>(g);
      a.layer = 2;
      a.sigma = 0.2e-3;
      a.time = best + start;
      times.arrivals.push_back(a);
    }
  }
  return times;
}

XyAnalysis analysisOf(const TravelTimes& times, const std::vector<double>& xy) {
  const auto branches = findBranches(times);
  return xyAnalysis(times, reversedPair(times, *findBranch(branches, 0, 1, 2), *findBranch(branches, 1, -1, 2)), xy);
}

// Theory 2 z tan i = 5.16 m; the nearest reading is 5 m (reference 1.8).
TEST(GeneralizedReciprocal, TheStraightestVelocityTimesAreAtTheOptimum) {
  const XyAnalysis analysis = analysisOf(undulatingLine(), {0.0, 2.5, 5.0, 7.5, 10.0, 15.0, 20.0});
  ASSERT_TRUE(analysis.determined);
  ASSERT_EQ(analysis.readings.size(), 7U);
  EXPECT_EQ(analysis.readings[analysis.best].xy, 5.0);
  EXPECT_NEAR(*optimumXy(10.0, 600.0, 2400.0), 5.16, 0.005);
  EXPECT_GT(analysis.readings[0].roughness, 3.0 * analysis.readings[2].roughness);
  EXPECT_GT(analysis.readings[6].roughness, 2.0 * analysis.readings[3].roughness);
  EXPECT_NEAR(analysis.readings[2].velocity.value, 2400.0, 60.0);
}

TEST(GeneralizedReciprocal, TimeDepthsFollowTheRefractor) {
  const XyAnalysis analysis = analysisOf(undulatingLine(), {5.0});
  const XyReading& reading = analysis.readings[0];
  double sum = 0.0;
  for (std::size_t i = 0; i < reading.x.size(); ++i) {
    const double z = *depthFromTimeDepth(reading.timeDepths[i], 600.0, reading.velocity.value);
    sum += std::pow(z - depthAt(reading.x[i]), 2);
  }
  EXPECT_LT(std::sqrt(sum / static_cast<double>(reading.x.size())), 0.35);
}

// Own (reference 1.8, W22): exact for 800 over 2500 m/s at 7 m; 9.8 % too deep for 4 m of 500 and 9 m of 1200 m/s
// over 3000 m/s.
TEST(GeneralizedReciprocal, AverageVelocityIsExactForOneLayerOnly) {
  const double timeDepth = 7.0 * std::sqrt(1.0 / (800.0 * 800.0) - 1.0 / (2500.0 * 2500.0));
  EXPECT_NEAR(*averageVelocity(*optimumXy(7.0, 800.0, 2500.0), timeDepth, 2500.0), 800.0, 1e-9);
  const auto deep = [](double xy) {
    return *depthFromTimeDepth(14.762e-3, *averageVelocity(xy, 14.762e-3, 3000.0), 3000.0);
  };
  EXPECT_NEAR(*averageVelocity(9.208, 14.762e-3, 3000.0), 920.6, 0.1);
  EXPECT_NEAR(deep(9.208), 14.28, 0.01);
  EXPECT_NEAR(deep(0.8 * 9.208), 12.77, 0.01);
  EXPECT_NEAR(deep(1.2 * 9.208), 15.64, 0.01);
}

TEST(GeneralizedReciprocal, WrongInputGivesNoNumber) {
  EXPECT_FALSE(depthFromTimeDepth(0.01, 800.0, 700.0));
  EXPECT_FALSE(averageVelocity(0.0, 0.01, 2000.0));
  EXPECT_FALSE(optimumXy(-1.0, 800.0, 2000.0));
  const XyAnalysis far = analysisOf(undulatingLine(), {500.0});
  EXPECT_FALSE(far.determined);
  EXPECT_EQ(far.reason, "no distance XY leaves five points on this pair of shots");
}

}  // namespace
}  // namespace strikeplate
