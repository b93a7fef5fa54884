// The methods that are one formula each.
#include <cmath>
#include <random>
#include <vector>

#include <gtest/gtest.h>

#include "core/methods/gradient.h"
#include "core/methods/material_hint.h"
#include "core/methods/moduli.h"
#include "core/methods/reflection.h"

namespace strikeplate {
namespace {

// Formulas of Slotnick (1959); values by own quadrature of the rays (reference 1.13, W25).
TEST(Gradient, DivingWavesAsTabulated) {
  const LinearGradient ground{600.0, 40.0};
  for (const auto& [x, time, deepest] : std::vector<std::tuple<double, double, double>>{
           {20, 31.2573e-3, 3.0278}, {60, 72.1818e-3, 18.5410}, {120, 104.7356e-3, 46.8466}}) {
    const auto wave = divingWave(ground, x);
    ASSERT_TRUE(wave);
    EXPECT_NEAR(wave->time, time, 6e-8);
    EXPECT_NEAR(wave->deepest, deepest, 6e-5);
    EXPECT_NEAR(wave->velocity, 600.0 + 40.0 * deepest, 3e-3);
    EXPECT_NEAR(*divingWaveOffset(ground, wave->time), x, 1e-9);
  }
  EXPECT_FALSE(divingWave({600.0, 0.0}, 20.0));
  EXPECT_FALSE(divingWave({600.0, 40.0}, -1.0));
}

// Own (reference 1.14, W26).
TEST(Gradient, WiechertHerglotzFindsTheGradientAgain) {
  const LinearGradient ground{600.0, 40.0};
  std::vector<double> x, p;
  for (int i = 0; i <= 2000; ++i) {
    x.push_back(0.05 * i);
    p.push_back(i == 0 ? 1.0 / 600.0 : 1.0 / divingWave(ground, x.back())->velocity);
  }
  const VelocityCurve curve = wiechertHerglotz(x, p);
  ASSERT_TRUE(curve.determined) << curve.reason;
  EXPECT_NEAR(curve.points[599].depth, 6.21320, 2e-4);
  EXPECT_NEAR(curve.points[599].velocity, 848.53, 0.005);
  EXPECT_NEAR(curve.points[1999].depth, 37.20153, 2e-4);
}

TEST(Gradient, WiechertHerglotzRefusesAVelocityThatFalls) {
  const VelocityCurve curve =
      wiechertHerglotz(std::vector<double>{0, 10, 20}, std::vector<double>{2e-3, 1e-3, 1.1e-3});
  EXPECT_FALSE(curve.determined);
  EXPECT_TRUE(curve.points.empty());
  EXPECT_NE(curve.reason.find("does not grow"), std::string::npos);
  EXPECT_FALSE(wiechertHerglotz({}, {}).determined);
}

// t^2 = t0^2 + x^2/v^2 (Sheriff and Geldart 1995); intervals by own Monte Carlo.
TEST(Reflection, FitGivesDepthAndVelocityAndItsIntervalsHold) {
  std::mt19937 random(11);
  std::normal_distribution<double> noise(0.0, 0.3e-3);
  int in68 = 0, in95 = 0;
  constexpr int kTrials = 2000;
  for (int trial = -1; trial < kTrials; ++trial) {
    std::vector<FitPoint> picks;
    for (int i = 0; i < 24; ++i) {
      const double x = 4.0 + 3.0 * i;
      picks.push_back({x, std::hypot(0.05, x / 1000.0) + (trial < 0 ? 0.0 : noise(random)), 0.3e-3});
    }
    const ReflectionFit fit = fitReflection(picks);
    ASSERT_TRUE(fit.depth.determined);
    if (trial < 0) {
      EXPECT_NEAR(fit.zeroOffsetTime.value, 0.05, 1e-12);
      EXPECT_NEAR(fit.velocity.value, 1000.0, 1e-7);
      EXPECT_NEAR(fit.depth.value, 25.0, 1e-9);
      continue;
    }
    in68 += fit.depth.low68 <= 25.0 && 25.0 <= fit.depth.high68 ? 1 : 0;
    in95 += fit.depth.low95 <= 25.0 && 25.0 <= fit.depth.high95 ? 1 : 0;
  }
  EXPECT_NEAR(in68, 0.6827 * kTrials, 3.0 * std::sqrt(kTrials * 0.6827 * 0.3173));
  EXPECT_NEAR(in95, 0.95 * kTrials, 3.0 * std::sqrt(kTrials * 0.95 * 0.05));
}

TEST(Reflection, SeveralLayersAreTakenOneByOne) {
  const auto h = thicknessesFromReflections(std::vector<Datum>{{0.02, 0.0}, {0.03, 0.0}, {0.03, 0.0}},
                                            std::vector<Datum>{{500, 0.0}, {1500, 0.0}, {3000, 0.0}});
  EXPECT_NEAR(h[0].value, 5.0, 1e-12);
  EXPECT_NEAR(h[1].value, 7.5, 1e-12);
  EXPECT_FALSE(h[2].determined);
}

TEST(Reflection, TimesThatFallWithOffsetAreRefused) {
  const ReflectionFit fit = fitReflection(std::vector<FitPoint>{{10, 0.05, 1e-3}, {20, 0.04, 1e-3}});
  EXPECT_FALSE(fit.depth.determined);
  EXPECT_EQ(fit.depth.reason, "the times do not lie on a reflection's curve");
}

// A shot and a geophone 2 m above the datum over 500 on 2000 m/s; the formula is that of reference 1.7.
TEST(Elevation, CorrectionTakesTheSlantedWayOff) {
  EXPECT_NEAR(elevationCorrection(2.0, 1.0, 500.0, 2000.0), -3.0 * std::sqrt(4e-6 - 2.5e-7), 1e-15);
  EXPECT_TRUE(std::isnan(elevationCorrection(2.0, 1.0, 500.0, 400.0)));
}

// Reference 1.15 and W29, recomputed there.
TEST(Moduli, AsTabulated) {
  struct Row {
    double density, vp, vs, poisson, shear, young, bulk, constrained;
  };
  for (const Row& r : {Row{1800, 500, 250, 0.3333, 112.50, 300.00, 300.00, 450.00},
                       Row{2000, 1600, 400, 0.4667, 320.00, 938.67, 4693.33, 5120.00},
                       Row{2400, 3000, 1700, 0.2635, 6936.00, 17527.31, 12352.00, 21600.00}}) {
    const SmallStrainModuli m = smallStrainModuli(r.vp, r.vs, r.density);
    ASSERT_TRUE(m.determined);
    EXPECT_NEAR(m.poisson, r.poisson, 6e-5);
    EXPECT_NEAR(m.shear / 1e6, r.shear, 6e-3);
    EXPECT_NEAR(m.young / 1e6, r.young, 6e-3);
    EXPECT_NEAR(m.bulk / 1e6, r.bulk, 6e-3);
    EXPECT_NEAR(m.constrained / 1e6, r.constrained, 6e-3);
  }
  EXPECT_NEAR(smallStrainModuli(std::sqrt(3.0), 1.0, 1.0).poisson, 0.25, 1e-12);
  EXPECT_NEAR(smallStrainModuli(2.0, 1.0, 1.0).poisson, 1.0 / 3.0, 1e-12);
}

TEST(Moduli, ImpossibleInputIsRefusedAndUnlikelyInputRemarkedOn) {
  EXPECT_FALSE(smallStrainModuli(1000, 870, 2000).determined);
  EXPECT_FALSE(smallStrainModuli(1000, 0, 2000).determined);
  EXPECT_FALSE(smallStrainModuli(1000, 750, 2000).caution.empty());
  EXPECT_TRUE(smallStrainModuli(1000, 500, 2000).caution.empty());
}

TEST(MaterialHint, RangesOverlapSoThatNoneStandsAlone) {
  const auto hint = materialHint(Estimate::fromSlowness(1.0 / 1600.0, 2e-5));
  EXPECT_GE(hint.size(), 2U);
  for (const MaterialRange& range : hint) {
    EXPECT_LT(range.low, range.high);
    EXPECT_FALSE(range.source.empty());
  }
  EXPECT_EQ(materialHint(Estimate::fromSlowness(1.0 / 6300.0, 1e-7)).size(), 2U);
  EXPECT_TRUE(materialHint(Estimate::fromSlowness(1.0 / 100.0, 1e-6)).empty());
  EXPECT_TRUE(materialHint(Estimate::none("no picks")).empty());
}

}  // namespace
}  // namespace strikeplate
