#include "core/methods/dipping_layers.h"

#include <cmath>
#include <random>

#include <gtest/gtest.h>

namespace strikeplate {
namespace {

constexpr double kDegree = M_PI / 180.0;

LineFit line(double slope, double intercept) {
  LineFit fit;
  fit.determined = true;
  fit.slope = slope;
  fit.intercept = intercept;
  return fit;
}

/// Own exact values from brute Fermat minimisation: 500, 1100, 2200, 4500 m/s; depths under A 4, 22, 45 m; dips +1.5,
/// -1.0, +2.5 degrees; 300 m between the shots.
std::vector<ReversedLines> goldenLines() {
  return {{line(0.9554122346159616e-3, 14.246693025894958e-3), line(0.8621465380668691e-3, 42.22640199062269e-3)},
          {line(0.4708153832296644e-3, 43.91973764886292e-3), line(0.43751828901659157e-3, 53.90886591278476e-3)},
          {line(0.25960614649895586e-3, 65.85682040938492e-3), line(0.1840498771038493e-3, 88.52370122791686e-3)}};
}

TEST(DippingLayers, ThreeDippingInterfacesComeBackExactly) {
  const DippingLayers layers = layersFromReversed({1.0 / 500.0, 0.0}, goldenLines());
  ASSERT_TRUE(layers.determined) << layers.reason;
  const double velocities[] = {500, 1100, 2200, 4500}, dips[] = {1.5, -1.0, 2.5};
  const double underA[] = {4, 18, 23}, underB[] = {11.855776, 4.907704, 41.334802};
  for (std::size_t n = 0; n < 4; ++n) {
    EXPECT_NEAR(layers.velocities[n].value, velocities[n], 1e-6);
  }
  for (std::size_t n = 0; n < 3; ++n) {
    EXPECT_NEAR(layers.dips[n].value / kDegree, dips[n], 1e-9);
    EXPECT_NEAR(layers.thicknessesA[n].value, underA[n], 1e-8);
    EXPECT_NEAR(layers.thicknessesB[n].value, underB[n], 1e-6);
  }
  EXPECT_NEAR(layers.depthsA[2].value, 45.0, 1e-8);
}

TEST(DippingLayers, ReciprocalTimesOfEachBranchAgree) {
  const double times[] = {300.8703634106834e-3, 185.16435261776226e-3, 143.73866435907166e-3};
  const auto lines = goldenLines();
  for (std::size_t n = 0; n < 3; ++n) {
    EXPECT_NEAR(reciprocityOf(lines[n], 300.0).value, 0.0, 1e-12);
    EXPECT_NEAR(lines[n].a.at(300.0), times[n], 1e-12);
  }
}

// Own exact values (check W19): V1 800, Vd 2000, Vu 3000 m/s; A is at the up-dip end.
TEST(DippingLayers, ReversedPairGivesDipAndTrueVelocity) {
  const DippingLayers layers = layersFromReversed(
      {1.0 / 800.0, 0.0}, std::vector<ReversedLines>{{line(1.0 / 2000, 0.02), line(1.0 / 3000, 0.03)}});
  ASSERT_TRUE(layers.determined) << layers.reason;
  EXPECT_NEAR(layers.dips[0].value / kDegree, 4.0561, 1e-4);
  EXPECT_NEAR(layers.velocities[1].value, 2393.989, 1e-3);
}

// Own Monte Carlo (reference section 1.10): 800/2000/3000 m/s known to 2, 3 and 3 %: sigma of dip 0.4535 degrees and
// of V2 52.34 m/s to first order, 0.4556 and 52.37 by 400 000 draws.
TEST(DippingLayers, SigmaOfDipAndVelocityToFirstOrder) {
  ReversedLines lines{line(1.0 / 2000, 0.02), line(1.0 / 3000, 0.03)};
  lines.a.varSlope = std::pow(0.03 / 2000, 2);
  lines.b.varSlope = std::pow(0.03 / 3000, 2);
  const DippingLayers layers = layersFromReversed({1.0 / 800.0, 0.02 / 800.0}, std::vector<ReversedLines>{lines});
  ASSERT_TRUE(layers.determined);
  EXPECT_NEAR(layers.dips[0].sigma / kDegree, 0.4535, 5e-4);
  EXPECT_NEAR(layers.velocities[1].sigma, 52.34, 0.05);
}

TEST(DippingLayers, LevelLayersHaveNoDipAndTheSameDepthAtBothEnds) {
  const double ti = 2.0 * 5.0 * std::sqrt(1.0 / (500.0 * 500.0) - 1.0 / (2000.0 * 2000.0));
  const DippingLayers layers = layersFromReversed(
      {1.0 / 500.0, 0.0}, std::vector<ReversedLines>{{line(1.0 / 2000, ti), line(1.0 / 2000, ti)}});
  ASSERT_TRUE(layers.determined);
  EXPECT_NEAR(layers.dips[0].value, 0.0, 1e-12);
  EXPECT_NEAR(layers.depthsA[0].value, 5.0, 1e-9);
  EXPECT_NEAR(layers.depthsB[0].value, 5.0, 1e-9);
}

TEST(DippingLayers, WrongInputGivesAReasonAndNoNumber) {
  const auto slower = std::vector<ReversedLines>{{line(1.0 / 400, 0.02), line(1.0 / 3000, 0.03)}};
  auto crossing = goldenLines();
  crossing[1].b.intercept = 30e-3;
  for (const auto& lines : {slower, crossing, std::vector<ReversedLines>{}}) {
    const DippingLayers layers = layersFromReversed({1.0 / 500.0, 0.0}, lines);
    EXPECT_FALSE(layers.determined);
    EXPECT_FALSE(layers.reason.empty());
    EXPECT_TRUE(layers.velocities.empty());
  }
  EXPECT_FALSE(layersFromReversed({0.0, 0.0}, goldenLines()).determined);
}

}  // namespace
}  // namespace strikeplate
