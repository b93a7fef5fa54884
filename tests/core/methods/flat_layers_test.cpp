#include "core/methods/flat_layers.h"

#include <cmath>
#include <random>

#include <gtest/gtest.h>

#include "core/traveltime/line_fit.h"

namespace strikeplate {
namespace {

LineFit exactLine(double velocity, double intercept) {
  LineFit line;
  line.determined = true;
  line.slope = 1.0 / velocity;
  line.intercept = intercept;
  return line;
}

// Own exact values (check W12): 500, 1500, 3000 m/s under 5 and 10 m.
TEST(FlatLayers, ThreeLayersComeBackFromTheirInterceptTimes) {
  const std::vector<double> v{500, 1500, 3000}, h{5, 10};
  const std::vector<double> ti = interceptTimes(v, h);
  EXPECT_NEAR(ti[0], 18.85618e-3, 5e-9);
  EXPECT_NEAR(ti[1], 31.26727e-3, 5e-9);
  const std::vector<LineFit> lines{exactLine(500, 0), exactLine(1500, ti[0]), exactLine(3000, ti[1])};
  const FlatLayers layers = layersFromIntercepts(lines);
  ASSERT_TRUE(layers.determined) << layers.reason;
  EXPECT_NEAR(layers.thicknesses[0].value, 5.0, 1e-9);
  EXPECT_NEAR(layers.thicknesses[1].value, 10.0, 1e-9);
  EXPECT_NEAR(layers.depths[1].value, 15.0, 1e-9);
}

// Own exact values (check W13): 400, 900, 1800, 4000 m/s under 2, 6 and 15 m.
TEST(FlatLayers, FourLayersComeBackFromTheirInterceptTimes) {
  const std::vector<double> v{400, 900, 1800, 4000}, h{2, 6, 15};
  const std::vector<double> ti = interceptTimes(v, h);
  EXPECT_NEAR(ti[0], 8.95806e-3, 5e-9);
  EXPECT_NEAR(ti[1], 21.29697e-3, 5e-9);
  EXPECT_NEAR(ti[2], 37.82513e-3, 5e-9);
  const std::vector<LineFit> lines{exactLine(400, 0), exactLine(900, ti[0]), exactLine(1800, ti[1]),
                                   exactLine(4000, ti[2])};
  const FlatLayers layers = layersFromIntercepts(lines);
  ASSERT_TRUE(layers.determined) << layers.reason;
  for (std::size_t k = 0; k < h.size(); ++k) {
    EXPECT_NEAR(layers.thicknesses[k].value, h[k], 1e-9);
  }
}

// Crossover distances of the same two models (W12, W13), given to 1e-4 m.
TEST(FlatLayers, CrossoverDistancesGiveTheSameLayers) {
  const auto exact = [](std::vector<double> values) {
    std::vector<Datum> out;
    for (const double v : values) {
      out.push_back({v, 0.0});
    }
    return out;
  };
  const FlatLayers three = layersFromCrossovers(exact({14.1421, 37.2333}), exact({500, 1500, 3000}));
  ASSERT_TRUE(three.determined) << three.reason;
  EXPECT_NEAR(three.thicknesses[0].value, 5.0, 1e-4);
  EXPECT_NEAR(three.thicknesses[1].value, 10.0, 1e-3);
  const FlatLayers four = layersFromCrossovers(exact({6.44981, 22.21002, 54.09219}), exact({400, 900, 1800, 4000}));
  ASSERT_TRUE(four.determined) << four.reason;
  EXPECT_NEAR(four.thicknesses[1].value, 6.0, 1e-4);
  EXPECT_NEAR(four.thicknesses[2].value, 15.0, 1e-4);
}

// University of Washington ESS 314, refraction with several layers (check W11): 350, 1650, 4200 m/s with intercept
// times 6.1 and 19.4 ms give 1.09 m over 11.82 m; the source's own 14.6 m does not follow from its times.
TEST(FlatLayers, PublishedThreeLayerExampleWithWrongArithmeticIsNotFollowed) {
  const std::vector<LineFit> lines{exactLine(350, 0), exactLine(1650, 6.1e-3), exactLine(4200, 19.4e-3)};
  const FlatLayers layers = layersFromIntercepts(lines);
  ASSERT_TRUE(layers.determined) << layers.reason;
  EXPECT_NEAR(layers.thicknesses[0].value, 1.092, 1e-3);
  EXPECT_NEAR(layers.thicknesses[1].value, 11.82, 1e-2);
  EXPECT_GT(std::abs(layers.thicknesses[1].value - 14.6), 2.0);
}

// Own Monte Carlo (reference section 1.10 b): 24 geophones at 2 m, 500 over 2000 m/s under 5 m, picks of 1 ms. First
// order with the covariance of slope and intercept gives 0.2259 m; without it, 0.2378 m.
TEST(FlatLayers, SigmaIsTheScatterOverRepeatedPicks) {
  constexpr int kDraws = 3000;
  constexpr double kSigma = 1e-3;
  const double ti = interceptTimes(std::vector<double>{500, 2000}, std::vector<double>{5})[0];
  std::mt19937 random(3);
  std::normal_distribution<double> noise(0.0, kSigma);
  double sum = 0.0, squares = 0.0, stated = 0.0;
  int within68 = 0, within95 = 0;
  for (int draw = 0; draw < kDraws; ++draw) {
    std::vector<FitPoint> near, far;
    for (int i = 1; i <= 24; ++i) {
      const double x = 2.0 * i, direct = x / 500, head = ti + x / 2000;
      (direct < head ? near : far).push_back({x, std::min(direct, head) + noise(random), kSigma});
    }
    const std::vector<LineFit> lines{fitLineThroughOrigin(near), fitLine(far)};
    const FlatLayers layers = layersFromIntercepts(lines);
    ASSERT_TRUE(layers.determined);
    const Estimate& h = layers.thicknesses[0];
    sum += h.value;
    squares += h.value * h.value;
    stated += h.sigma;
    within68 += h.low68 <= 5.0 && 5.0 <= h.high68 ? 1 : 0;
    within95 += h.low95 <= 5.0 && 5.0 <= h.high95 ? 1 : 0;
  }
  const double scatter = std::sqrt(squares / kDraws - std::pow(sum / kDraws, 2));
  EXPECT_NEAR(stated / kDraws, 0.2259, 0.004);
  EXPECT_NEAR(scatter, 0.226, 0.012);
  // Binomial limits of three standard deviations.
  EXPECT_NEAR(within68 / static_cast<double>(kDraws), 0.683, 3.0 * std::sqrt(0.683 * 0.317 / kDraws) + 0.005);
  EXPECT_NEAR(within95 / static_cast<double>(kDraws), 0.950, 3.0 * std::sqrt(0.95 * 0.05 / kDraws) + 0.005);
}

TEST(FlatLayers, WrongInputGivesAReasonAndNoNumber) {
  const std::vector<LineFit> slower{exactLine(1500, 0), exactLine(500, 0.01)};
  const std::vector<LineFit> alone{exactLine(500, 0)};
  const std::vector<LineFit> negative{exactLine(500, 0), exactLine(1500, 0.02), exactLine(3000, 0.0205)};
  for (const auto& lines : {slower, alone, negative}) {
    const FlatLayers layers = layersFromIntercepts(lines);
    EXPECT_FALSE(layers.determined);
    EXPECT_FALSE(layers.reason.empty());
  }
  EXPECT_FALSE(
      layersFromCrossovers(std::vector<Datum>{{-3.0, 0.1}}, std::vector<Datum>{{500, 1}, {900, 1}}).determined);
  EXPECT_FALSE(layersFromCrossovers(std::vector<Datum>{}, std::vector<Datum>{{500, 1}}).determined);
}

}  // namespace
}  // namespace strikeplate
