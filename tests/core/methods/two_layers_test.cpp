#include "core/methods/two_layers.h"

#include <cmath>

#include <gtest/gtest.h>

#include "core/methods/blind_zone.h"

namespace strikeplate {
namespace {

constexpr Datum exact(double value) {
  return {value, 0.0};
}

// Common practice, no source: two layers, 2000 over 4000 m/s.
TEST(TwoLayers, FourRoutesToOneDepthAsCommonPracticeHasThem) {
  const double a = depthFromIntercept(exact(0.128), exact(2000), exact(4000)).value;
  const double b = depthFromCriticalDistance(exact(160), exact(2000), exact(4000)).value;
  const double c = depthFromCrossover(exact(520), exact(2000), exact(4000)).value;
  EXPECT_NEAR(a, 147.8, 0.05);
  EXPECT_NEAR(b, 138.6, 0.05);
  EXPECT_NEAR(c, 150.1, 0.05);
  const double mean = (a + b + c) / 3.0;
  EXPECT_NEAR(mean, 145.5, 0.05);
  EXPECT_NEAR(std::sqrt(((a - mean) * (a - mean) + (b - mean) * (b - mean) + (c - mean) * (c - mean)) / 2.0), 6.1,
              0.05);
  EXPECT_NEAR(depthFromReflection(exact(0.145), exact(2000)).value, 145.0, 1e-9);
}

// Common practice, no source: two layers in feet.
TEST(TwoLayers, ReadingsInFeetComeOutInMetres) {
  constexpr double kFoot = 0.3048;
  const double v1 = 30.0 * kFoot / 0.008, v2 = 40.0 * kFoot / 0.0059;
  EXPECT_NEAR(v1, 1143.0, 0.5);
  EXPECT_NEAR(v2, 2067.0, 1.0);
  EXPECT_NEAR(140.0 * kFoot / 0.0113, 3780.0, 10.0);
  EXPECT_NEAR(depthFromCrossover(exact(35.0 * kFoot), exact(v1), exact(v2)).value, 2.86, 0.01);
  EXPECT_NEAR(depthFromIntercept(exact(0.00458), exact(v1), exact(v2)).value, 3.14, 0.01);
}

// Open worked examples of the University of Washington (open refraction examples), recomputed.
TEST(TwoLayers, WorkedExamplesComeBack) {
  EXPECT_NEAR(depthFromIntercept(exact(29.047e-3), exact(800), exact(3200)).value, 12.0, 1e-3);
  EXPECT_NEAR(depthFromCrossover(exact(30.984), exact(800), exact(3200)).value, 12.0, 1e-3);
  EXPECT_NEAR(depthFromIntercept(exact(27.783e-3), exact(350), exact(1500)).value, 5.0, 1e-3);
  EXPECT_NEAR(depthFromCrossover(exact(12.683), exact(350), exact(1500)).value, 5.0, 1e-3);
  EXPECT_NEAR(depthFromCriticalDistance(exact(23.094), exact(2000), exact(4000)).value, 20.0, 1e-3);
  EXPECT_NEAR(depthFromCrossover(exact(69.282), exact(2000), exact(4000)).value, 20.0, 1e-3);
  // Open civil-engineering notes: 300 over 1500 m/s, intercept time 40 ms.
  EXPECT_NEAR(depthFromIntercept(exact(40e-3), exact(300), exact(1500)).value, 6.124, 1e-3);
}

// Own exact values: V1 800, Vd 2000, Vu 3000 m/s.
TEST(TwoLayers, ReversedApparentVelocitiesGiveDipAndTrueVelocity) {
  const DippingPair pair = dippingPair(800, 2000, 3000);
  ASSERT_TRUE(pair.determined);
  EXPECT_NEAR(pair.dip * 180.0 / M_PI, 4.0561, 1e-4);
  EXPECT_NEAR(pair.critical * 180.0 / M_PI, 19.5221, 1e-4);
  EXPECT_NEAR(pair.v2, 2393.989, 1e-3);
  EXPECT_FALSE(dippingPair(800, 700, 3000).determined);
}

TEST(TwoLayers, WrongInputGivesAReasonAndNoNumber) {
  for (const Estimate& e : {depthFromIntercept(exact(0.02), exact(2000), exact(1500)),
                            depthFromCrossover(exact(-1.0), exact(500), exact(1500)),
                            depthFromCriticalDistance(exact(NAN), exact(500), exact(1500))}) {
    EXPECT_FALSE(e.determined);
    EXPECT_TRUE(std::isnan(e.value));
    EXPECT_FALSE(e.reason.empty());
  }
}

// Own exact values; the three branches meet in one point.
TEST(BlindZone, GreatestHiddenThicknessAsTabulated) {
  EXPECT_NEAR(*hiddenThicknessRatio(500, 1000, 3000), 0.970, 5e-4);
  EXPECT_NEAR(*hiddenThicknessRatio(400, 1500, 4000), 0.760, 5e-4);
  EXPECT_NEAR(*hiddenThicknessRatio(1500, 2000, 5000), 1.307, 5e-4);
  EXPECT_FALSE(hiddenThicknessRatio(1000, 500, 3000));
  const auto worst = worstHiddenLayer(500, 3000, 10.0);
  ASSERT_TRUE(worst);
  EXPECT_GT(worst->deepest, 10.0 / (1.0 - 0.257));
}

}  // namespace
}  // namespace strikeplate
