#include <cmath>
#include <random>
#include <vector>

#include <gtest/gtest.h>

#include "core/methods/dipping_layers.h"
#include "core/methods/flat_layers.h"
#include "core/methods/two_layers.h"
#include "core/traveltime/line_fit.h"

namespace strikeplate {
namespace {

LineFit line(double slope, double intercept, double sigmaSlope = 0.0, double sigmaIntercept = 0.0) {
  LineFit fit;
  fit.determined = true;
  fit.slope = slope;
  fit.intercept = intercept;
  fit.varSlope = sigmaSlope * sigmaSlope;
  fit.varIntercept = sigmaIntercept * sigmaIntercept;
  return fit;
}

// Own forward values (reference W12): 500/1500/3000 m/s, 5 and 10 m.
TEST(FlatLayers, ThreeLayersComeBackFromInterceptsAndFromCrossovers) {
  const std::vector<double> slowness = {1.0 / 500, 1.0 / 1500, 1.0 / 3000};
  const auto h = thicknessesFromIntercepts(slowness, std::vector<double>{18.85618e-3, 31.26727e-3});
  ASSERT_TRUE(h);
  EXPECT_NEAR((*h)[0], 5.0, 1e-5);
  EXPECT_NEAR((*h)[1], 10.0, 1e-4);
  const auto ti = interceptsFromCrossovers(slowness, std::vector<double>{14.1421, 37.2333});
  EXPECT_NEAR(ti[0], 18.85618e-3, 1e-7);
  EXPECT_NEAR(ti[1], 31.26727e-3, 1e-7);
}

// Own forward values (reference W13): 400/900/1800/4000 m/s, 2, 6 and 15 m.
TEST(FlatLayers, FourLayersComeBackFromInterceptsAndFromCrossovers) {
  const std::vector<double> slowness = {1.0 / 400, 1.0 / 900, 1.0 / 1800, 1.0 / 4000};
  const auto h = thicknessesFromIntercepts(slowness, std::vector<double>{8.95806e-3, 21.29697e-3, 37.82513e-3});
  ASSERT_TRUE(h);
  EXPECT_NEAR((*h)[0], 2.0, 1e-5);
  EXPECT_NEAR((*h)[1], 6.0, 1e-4);
  EXPECT_NEAR((*h)[2], 15.0, 1e-4);
  const auto ti = interceptsFromCrossovers(slowness, std::vector<double>{6.44981, 22.21002, 54.09219});
  const auto again = thicknessesFromIntercepts(slowness, ti);
  ASSERT_TRUE(again);
  EXPECT_NEAR((*again)[2], 15.0, 1e-3);
}

// Reference W11, three layers of open worked examples: its arithmetic gives 14.6 m, the formula 11.82 m.
TEST(FlatLayers, TheSecondThicknessIsNotTheOneMisprinted) {
  const auto h = thicknessesFromIntercepts(std::vector<double>{1.0 / 350, 1.0 / 1650, 1.0 / 4200},
                                           std::vector<double>{6.1e-3, 19.4e-3});
  ASSERT_TRUE(h);
  EXPECT_NEAR((*h)[0], 1.092, 5e-4);
  EXPECT_NEAR((*h)[1], 11.82, 5e-3);
  EXPECT_GT(std::abs((*h)[1] - 14.6), 2.0);
}

// Geophysics 19 (1954) 716 says that break points suffer less from weathering unseen; figures own (reference 1.3).
TEST(FlatLayers, UnseenWeatheringMovesCrossoverDepthsLess) {
  for (const auto& [weathering, byIntercept, byCrossover] : std::vector<std::tuple<double, double, double>>{
           {0.0, 10.0, 10.0}, {0.5, 11.38, 10.09}, {1.0, 12.75, 10.19}, {1.5, 14.13, 10.28}}) {
    const auto c = [](double v, double under) { return std::sqrt(1.0 / (v * v) - 1.0 / (under * under)); };
    const std::vector<LineFit> lines = {line(1.0 / 800, 2.0 * weathering * c(300, 800)),
                                        line(1.0 / 3000, 2.0 * (weathering * c(300, 3000) + 10.0 * c(800, 3000)))};
    EXPECT_NEAR(flatLayersFromIntercepts(lines).depths[0].value, byIntercept, 0.006);
    EXPECT_NEAR(flatLayersFromCrossovers(lines).depths[0].value, byCrossover, 0.006);
  }
}

TEST(FlatLayers, ALateTriggerMovesNoCrossoverDepth) {
  const std::vector<LineFit> lines = {line(1.0 / 500, 4e-3), line(1.0 / 1500, 18.85618e-3 + 4e-3),
                                      line(1.0 / 3000, 31.26727e-3 + 4e-3)};
  const FlatLayers layers = flatLayersFromCrossovers(lines);
  ASSERT_TRUE(layers.determined);
  EXPECT_NEAR(layers.depths[0].value, 5.0, 1e-4);
  EXPECT_NEAR(layers.depths[1].value, 15.0, 1e-4);
  EXPECT_GT(flatLayersFromIntercepts(lines).depths[0].value, 5.5);
}

// Own Monte Carlo (reference 1.10 b): 24 geophones 2 m apart, 1 ms picks, 500 over 2000 m/s at 5 m: 0.2259 m with the
// covariance of slope and intercept, and one and 1.96 sigma hold 68 and 95 %.
TEST(FlatLayers, IntervalsHoldWhatTheyPromise) {
  std::mt19937 random(1);
  std::normal_distribution<double> noise(0.0, 1e-3);
  const double ti = 2.0 * 5.0 * std::sqrt(1.0 / (500.0 * 500.0) - 1.0 / (2000.0 * 2000.0));
  int in68 = 0, in95 = 0;
  double meanSigma = 0.0;
  constexpr int kTrials = 2000;
  for (int trial = 0; trial < kTrials; ++trial) {
    std::vector<FitPoint> near, far;
    for (int i = 1; i <= 24; ++i) {
      const double x = 2.0 * i, direct = x / 500.0, head = ti + x / 2000.0;
      (direct < head ? near : far).push_back({x, std::min(direct, head) + noise(random), 1e-3});
    }
    const FlatLayers layers =
        flatLayersFromIntercepts(std::vector<LineFit>{fitLineThroughOrigin(near), fitLine(far)});
    ASSERT_TRUE(layers.determined);
    const Estimate& h = layers.depths[0];
    meanSigma += h.sigma / kTrials;
    in68 += h.low68 <= 5.0 && 5.0 <= h.high68 ? 1 : 0;
    in95 += h.low95 <= 5.0 && 5.0 <= h.high95 ? 1 : 0;
  }
  EXPECT_NEAR(meanSigma, 0.2259, 0.003);
  // Three standard deviations of a binomial count.
  EXPECT_NEAR(in68, 0.6827 * kTrials, 3.0 * std::sqrt(kTrials * 0.6827 * 0.3173));
  EXPECT_NEAR(in95, 0.95 * kTrials, 3.0 * std::sqrt(kTrials * 0.95 * 0.05));
}

TEST(FlatLayers, WrongInputGivesAReasonAndNoNumber) {
  const FlatLayers slower = flatLayersFromIntercepts(std::vector<LineFit>{line(1.0 / 500, 0), line(1.0 / 400, 0.01)});
  EXPECT_FALSE(slower.determined);
  EXPECT_EQ(slower.reason, "the velocity does not grow from layer to layer");
  EXPECT_TRUE(slower.depths.empty());
  const FlatLayers thin = flatLayersFromIntercepts(
      std::vector<LineFit>{line(1.0 / 500, 0), line(1.0 / 1500, 0.02), line(1.0 / 3000, 0.015)});
  EXPECT_FALSE(thin.determined);
  EXPECT_FALSE(thin.reason.empty());
  EXPECT_FALSE(flatLayersFromIntercepts(std::vector<LineFit>{line(1.0 / 500, 0)}).determined);
}

// Own golden table (reference 1.5, W18), times by Fermat minimisation.
const std::vector<ReversedTimes> kGolden = {
    {0.9554122346159616e-3, 14.246693025894958e-3, 0.8621465380668691e-3, 42.22640199062269e-3},
    {0.4708153832296644e-3, 43.91973764886292e-3, 0.43751828901659157e-3, 53.90886591278476e-3},
    {0.25960614649895586e-3, 65.85682040938492e-3, 0.1840498771038493e-3, 88.52370122791686e-3}};

TEST(DippingLayers, ThreeDippingInterfacesComeBack) {
  constexpr double kDegree = 0.017453292519943295;
  const DippingPlanes planes = dippingPlanes(500.0, kGolden);
  ASSERT_TRUE(planes.determined) << planes.reason;
  const std::vector<double> velocity = {500, 1100, 2200, 4500}, dip = {1.5, -1.0, 2.5}, hA = {4, 18, 23},
                            hB = {11.855776, 4.907704, 41.334802};
  for (std::size_t i = 0; i < 3; ++i) {
    EXPECT_NEAR(planes.velocity[i + 1], velocity[i + 1], 1e-8);
    EXPECT_NEAR(planes.dip[i], dip[i] * kDegree, 1e-11);
    EXPECT_NEAR(planes.thicknessA[i], hA[i], 1e-9);
    EXPECT_NEAR(planes.thicknessB[i], hB[i], 1e-6);
  }
}

TEST(DippingLayers, ReciprocalTimesOfTheGoldenTableAgree) {
  const double expected[] = {300.8703634106834e-3, 185.16435261776226e-3, 143.73866435907166e-3};
  for (std::size_t i = 0; i < 3; ++i) {
    const ReversedLines lines{line(kGolden[i].slopeA, kGolden[i].interceptA),
                              line(kGolden[i].slopeB, kGolden[i].interceptB)};
    EXPECT_NEAR(lines.fromA.at(300.0), expected[i], 1e-12);
    EXPECT_NEAR(reciprocityGap(lines, 300.0).value, 0.0, 1e-12);
  }
}

// Own (reference W19).
TEST(DippingLayers, TwoLayersAgreeWithTheClosedForm) {
  const DippingPlanes planes = dippingPlanes(800.0, std::vector<ReversedTimes>{{1.0 / 2000, 0.02, 1.0 / 3000, 0.03}});
  const DippingPair pair = dippingPair(800.0, 2000.0, 3000.0);
  ASSERT_TRUE(planes.determined);
  EXPECT_NEAR(planes.velocity[1], 2393.989, 1e-3);
  EXPECT_NEAR(planes.velocity[1], pair.v2, 1e-9);
  EXPECT_NEAR(planes.dip[0], pair.dip, 1e-14);
  EXPECT_NEAR(planes.dip[0] * 180.0 / M_PI, 4.0561, 1e-4);
  // The arithmetic mean of both velocities, met in print, is 2500.
  EXPECT_GT(2500.0 - planes.velocity[1], 100.0);
}

// Own golden example of reference 1.6: 600 over 2400 m/s, 6 degrees, 6 m perpendicular below A.
TEST(DippingLayers, DepthIsVerticalBelowTheShots) {
  const ReversedLines direct{line(1.0 / 600, 0.0, 1e-6), line(1.0 / 600, 0.0, 1e-6)};
  const std::vector<ReversedLines> refractor = {
      {line(1.0 / 1715.071, 19.364917e-3, 1e-6, 1e-4), line(1.0 / 4069.970, 59.848616e-3, 1e-6, 1e-4)}};
  const DippingLayers layers = dippingLayers(direct, refractor);
  ASSERT_TRUE(layers.determined) << layers.reason;
  EXPECT_NEAR(layers.velocities[1].value, 2400.0, 0.01);
  EXPECT_NEAR(layers.depthsA[0].value, 6.0 / std::cos(6.0 * M_PI / 180.0), 1e-4);
  EXPECT_GT(layers.depthsA[0].sigma, 0.0);
  EXPECT_NEAR(layers.dips[0].value, 6.0 * M_PI / 180.0, 1e-6);
}

TEST(DippingLayers, WrongInputGivesAReasonAndNoNumber) {
  const DippingPlanes slow = dippingPlanes(800.0, std::vector<ReversedTimes>{{1.0 / 700, 0.02, 1.0 / 3000, 0.03}});
  EXPECT_FALSE(slow.determined);
  EXPECT_EQ(slow.reason, "layer 2: its apparent velocity is below that of layer 1");
  const DippingPlanes thin = dippingPlanes(800.0, std::vector<ReversedTimes>{{1.0 / 2000, -0.02, 1.0 / 3000, 0.03}});
  EXPECT_FALSE(thin.determined);
  EXPECT_FALSE(dippingLayers({}, {}).determined);
}

}  // namespace
}  // namespace strikeplate
