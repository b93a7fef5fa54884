#include <algorithm>
#include <cmath>

#include <gtest/gtest.h>

#include "core/section/forward.h"
#include "core/section/sensitivity.h"
#include "core/section/solve.h"
#include "tests/core/section/scene.h"

namespace strikeplate {
namespace {

using testing::evenSpread;
using testing::Spread;

constexpr double kTop = 300.0;      // m/s
constexpr double kGrowth = 60.0;    // 1/s
constexpr double kRock = 2200.0;    // m/s
constexpr double kThickness = 6.0;  // m

/// Vertical slowness integrated over depth where velocity runs from v to the bottom's, over a head wave of slowness
/// p: integral of sqrt(1 / v^2 - p^2) dz with v = v_0 + k z (Slotnick 1959).
double delayTerm(double v) {
  const double c = std::sqrt(1.0 - v * v / (kRock * kRock));
  return (std::log((1.0 + c) * kRock / v) - c) / kGrowth;
}

TravelTimes gradientTimes(const Spread& spread, double sigma) {
  TravelTimes t = testing::flatTimes({kTop, kRock}, {kThickness}, spread, sigma).times;
  const double intercept = 2.0 * (delayTerm(kTop) - delayTerm(kTop + kGrowth * kThickness));
  for (Arrival& a : t.arrivals) {
    const double x = t.offset(a);
    a.time = std::min(2.0 / kGrowth * std::asinh(kGrowth * x / (2.0 * kTop)), intercept + x / kRock);
  }
  return t;
}

TEST(GradientSection, SoilThatHardensWithDepthGivesTheRightDepthAndSaysSo) {
  const Spread spread = evenSpread(24, 2.0, {-1.0, 11.0, 23.0, 35.0, 47.0, -15.0, 61.0});
  const testing::Scene scene = testing::planeScene({kTop, kRock}, {kThickness}, {0.0});
  SectionOptions options;
  options.layers = 2;
  std::mt19937 random(1);
  const Section s = solveSection(testing::withNoise(gradientTimes(spread, 0.5e-3), random), options);
  ASSERT_TRUE(s.determined) << s.reason;
  EXPECT_LT(testing::depthError(s, scene, spread, 2), 0.08);
  EXPECT_GT(testing::coverageOf(s, scene, spread, 2).share95, 0.9);
  EXPECT_NEAR(s.velocities[1].value, kRock, 100.0);
  EXPECT_NEAR(s.velocities[0].value, kTop + 0.5 * kGrowth * kThickness, 40.0);
}

TEST(GradientSection, DerivativesAreThoseOfTheTimes) {
  const Spread spread = evenSpread(12, 3.0, {-1.0, 16.0, 40.0});
  const TravelTimes times = testing::flatTimes({400.0, 900.0, 2000.0}, {3.0, 5.0}, spread, 1e-3).times;
  const SectionGrid grid = makeSectionGrid(times);
  const SectionPicks picks = makeSectionPicks(times);
  for (const bool gradient : {false, true}) {
    const SectionLayout layout{3, grid.knots, grid.velocityKnots, 0, gradient};
    Eigen::VectorXd theta = Eigen::VectorXd::Zero(layout.size());
    for (int i = 0; i < grid.knots; ++i) {
      theta[layout.elevation(1) + i] = -3.0 - 0.3 * std::sin(0.2 * grid.knotX[i]);
      theta[layout.elevation(2) + i] = -8.0 - 0.5 * std::cos(0.15 * grid.knotX[i]);
    }
    theta[layout.logVelocity(1)] = std::log(400.0);
    theta[layout.logVelocity(2)] = std::log(900.0);
    theta[layout.logVelocity(3)] = std::log(2000.0);
    theta.segment(layout.deviation(1), 2 * layout.velocityKnots).setConstant(0.01);
    if (gradient) {
      theta[layout.gradientIndex()] = 25.0;
    }
    Eigen::VectorXd direction = Eigen::VectorXd::Zero(layout.size());
    for (int i = 0; i < layout.size(); ++i) {
      direction[i] = i < 2 * grid.knots ? 0.7 + 0.3 * std::sin(i) : 0.02 * std::cos(3.0 * i);
    }
    if (gradient) {
      direction[layout.gradientIndex()] = 5.0;
    }
    constexpr double kStep = 1e-4;
    const SectionForward here(makeSectionModel(grid, layout, theta), picks);
    const SectionForward plus(makeSectionModel(grid, layout, theta + kStep * direction), picks);
    const SectionForward minus(makeSectionModel(grid, layout, theta - kStep * direction), picks);
    RowGatherer gatherer(layout.size());
    for (int i = 0; i < picks.count(); ++i) {
      for (int layer = 1; layer <= 3; ++layer) {
        const double slope = (plus.time(i, layer) - minus.time(i, layer)) / (2.0 * kStep);
        const double expected = timeDerivative(here, i, layer, gatherer).dot(direction);
        EXPECT_NEAR(slope, expected, 0.02 * std::abs(expected) + 2e-5);
      }
    }
  }
}

}  // namespace
}  // namespace strikeplate
