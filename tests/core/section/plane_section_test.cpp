#include <algorithm>
#include <array>
#include <cmath>
#include <numbers>

#include <gtest/gtest.h>

#include "core/section/solve.h"
#include "tests/core/section/scene.h"

namespace strikeplate {
namespace {

using testing::evenSpread;
using testing::flatTimes;
using testing::Scene;
using testing::Spread;

constexpr double kDepthTolerance = 5e-4;     // relative
constexpr double kVelocityTolerance = 2e-4;  // relative

double worstDepth(const Section& s, const Scene& scene, int layer) {
  double worst = 0.0;
  for (std::size_t i = 0; i < s.x.size(); ++i) {
    const double truth = scene.depth(layer, s.x[i]);
    worst = std::max(worst, std::abs(s.interfaces[layer - 2].depth[i].value - truth) / truth);
  }
  return worst;
}

void expectFlat(const std::vector<double>& velocities, const std::vector<double>& thicknesses, const Spread& spread) {
  const Section s = solveSection(flatTimes(velocities, thicknesses, spread, 0.5e-3).times, {});
  ASSERT_TRUE(s.determined) << s.reason;
  ASSERT_EQ(s.layers, static_cast<int>(velocities.size()));
  double depth = 0.0;
  for (std::size_t n = 0; n < thicknesses.size(); ++n) {
    depth += thicknesses[n];
    const Scene scene =
        testing::planeScene(velocities, std::vector<double>(n + 1, depth), std::vector<double>(n + 1, 0.0));
    EXPECT_LT(worstDepth(s, scene, static_cast<int>(n) + 2), kDepthTolerance);
    EXPECT_NEAR(s.interfaces[n].meanDip.value, 0.0, 0.01);
  }
  for (std::size_t n = 0; n < velocities.size(); ++n) {
    EXPECT_NEAR(s.velocities[n].value / velocities[n], 1.0, kVelocityTolerance);
  }
}

TEST(PlaneSection, TwoFlatLayersComeOutFlat) {
  expectFlat({500.0, 2000.0}, {5.0}, evenSpread(24, 2.0, {-1.0, 11.0, 23.0, 35.0, 47.0, -20.0, 66.0}));
}

// Worked example: 800 over 3200 m/s at 12 m (open worked examples, University of Washington).
TEST(PlaneSection, TwelveMetresUnderEightHundredMetresPerSecond) {
  expectFlat({800.0, 3200.0}, {12.0}, evenSpread(24, 4.0, {-2.0, 22.0, 46.0, 70.0, 94.0}));
}

// intercepts 18.85618 and 31.26727 ms (flat-layer formulas).
TEST(PlaneSection, ThreeFlatLayersComeOutFlat) {
  expectFlat({500.0, 1500.0, 3000.0}, {5.0, 10.0}, evenSpread(48, 2.0, {-1.0, 31.0, 63.0, 95.0}));
}

// intercepts 8.95806, 21.29697 and 37.82513 ms (flat-layer formulas).
TEST(PlaneSection, FourFlatLayersComeOutFlat) {
  expectFlat({400.0, 900.0, 1800.0, 4000.0}, {2.0, 6.0, 15.0}, evenSpread(48, 3.0, {-1.5, 46.5, 94.5, 142.5}));
}

/// Times of reversed branches given by slope and intercept: two shots at the ends of the line.
struct Branches {
  std::vector<double> slopeA, slopeB, interceptA, interceptB;  // s/m and s, first layer included
};

TravelTimes reversedTimes(const Branches& b, const std::vector<double>& geophones, double length) {
  TravelTimes t;
  for (const double x : geophones) {
    t.geophones.push_back({x, 0.0});
  }
  t.shots = {{0.0, 0.0, 0.0}, {length, 0.0, 0.0}};
  t.ground = Ground(t.geophones, t.shots);
  for (int shot = 0; shot < 2; ++shot) {
    for (int g = 0; g < static_cast<int>(geophones.size()); ++g) {
      const double x = shot == 0 ? geophones[g] : length - geophones[g];
      double time = 1e9;
      for (std::size_t n = 0; n < b.slopeA.size(); ++n) {
        time = std::min(time, shot == 0 ? b.interceptA[n] + b.slopeA[n] * x : b.interceptB[n] + b.slopeB[n] * x);
      }
      if (x > 0.0) {
        t.arrivals.push_back({shot, g, g, time, 0.5e-3, 0, false});
      }
    }
  }
  return t;
}

std::vector<double> positions(double from, double step, double to) {
  std::vector<double> x;
  for (double v = from; v <= to + 1e-9; v += step) {
    x.push_back(v);
  }
  return x;
}

// Plane dip of 6 degrees, 600 over 2400 m/s, 6 m at right angles under A; times after Hagedoorn 1959 and the
// plane-dip formulas, own golden table.
TEST(PlaneSection, DippingPairComesBackFromReversedTimes) {
  const double dip = 6.0 * std::numbers::pi / 180.0;
  const double critical = std::asin(600.0 / 2400.0);
  const double zB = 6.0 + 120.0 * std::sin(dip);
  Branches b{{1.0 / 600.0, std::sin(critical + dip) / 600.0},
             {1.0 / 600.0, std::sin(critical - dip) / 600.0},
             {0.0, 2.0 * 6.0 * std::cos(critical) / 600.0},
             {0.0, 2.0 * zB * std::cos(critical) / 600.0}};
  EXPECT_NEAR(b.interceptB[1] * 1e3, 59.848616, 1e-6);
  const TravelTimes times = reversedTimes(b, positions(0.0, 5.0, 120.0), 120.0);
  const Section s = solveSection(times, {});
  ASSERT_TRUE(s.determined) << s.reason;
  ASSERT_EQ(s.layers, 2);
  EXPECT_NEAR(s.velocities[0].value / 600.0, 1.0, kVelocityTolerance);
  EXPECT_NEAR(s.velocities[1].value / 2400.0, 1.0, kVelocityTolerance);
  EXPECT_NEAR(s.interfaces[0].meanDip.value, 6.0, 0.01);
  const Scene scene = testing::planeScene({600.0, 2400.0}, {6.0 / std::cos(dip)}, {std::tan(dip)});
  EXPECT_LT(worstDepth(s, scene, 2), kDepthTolerance);
  constexpr std::array<std::array<double, 3>, 5> kRows{{{20.0, 31.0262, 84.4188},
                                                        {40.0, 42.6876, 79.5048},
                                                        {60.0, 54.3489, 74.5907},
                                                        {80.0, 66.0102, 69.6767},
                                                        {100.0, 77.6715, 64.7627}}};
  for (std::size_t i = 0; i < times.arrivals.size(); ++i) {
    for (const auto& row : kRows) {
      const Arrival& a = times.arrivals[i];
      const double tabled = row[a.shot == 0 ? 1 : 2];
      if (times.geophones[a.geophone].x == row[0] && s.layerOf[i] == 2) {
        EXPECT_NEAR(s.predicted[i] * 1e3, tabled, 2e-3);
      }
    }
  }
}

/// Every branch beyond its critical distance, also where it is not the first to come, with its layer set by hand.
TravelTimes labelledTimes(const Branches& b, const std::vector<double>& from, const TravelTimes& places) {
  TravelTimes t = places;
  const double length = t.shots[1].x;
  t.arrivals.clear();
  for (int shot = 0; shot < 2; ++shot) {
    for (int g = 0; g < static_cast<int>(t.geophones.size()); ++g) {
      const double x = shot == 0 ? t.geophones[g].x : length - t.geophones[g].x;
      for (std::size_t n = 0; n < from.size(); ++n) {
        const double time = shot == 0 ? b.interceptA[n] + b.slopeA[n] * x : b.interceptB[n] + b.slopeB[n] * x;
        if (x > from[n]) {
          t.arrivals.push_back({shot, g, g, time, 0.5e-3, static_cast<int>(n) + 1, true});
        }
      }
    }
  }
  return t;
}

// Four layers with three dipping interfaces: slopes and intercepts of the golden table made by brute Fermat
// minimisation; recursion of Ewing, Woollard & Vine 1939 and Adachi 1954. From B layer 2 is never first, so all
// branches are given, each with its layer.
TEST(PlaneSection, ThreeDippingInterfacesComeBackFromReversedBranches) {
  const Branches b{{1.0 / 500.0, 0.9554122346159616e-3, 0.4708153832296644e-3, 0.25960614649895586e-3},
                   {1.0 / 500.0, 0.8621465380668691e-3, 0.43751828901659157e-3, 0.1840498771038493e-3},
                   {0.0, 14.246693025894958e-3, 43.91973764886292e-3, 65.85682040938492e-3},
                   {0.0, 42.22640199062269e-3, 53.90886591278476e-3, 88.52370122791686e-3}};
  const TravelTimes first = reversedTimes(b, positions(0.0, 5.0, 300.0), 300.0);
  SectionOptions options;
  options.layers = 4;
  const Section s = solveSection(labelledTimes(b, {0.0, 40.0, 60.0, 90.0}, first), options);
  ASSERT_TRUE(s.determined) << s.reason;
  const std::array<double, 4> velocities{500.0, 1100.0, 2200.0, 4500.0};
  for (int n = 0; n < 4; ++n) {
    EXPECT_NEAR(s.velocities[n].value / velocities[n], 1.0, kVelocityTolerance);
  }
  const std::array<double, 3> atA{4.0, 22.0, 45.0};
  const std::array<double, 3> atB{11.855776, 16.76348, 58.105282};
  for (int n = 0; n < 3; ++n) {
    EXPECT_NEAR(s.depthAt(n + 2, 0.0).value / atA[n], 1.0, kDepthTolerance);
    EXPECT_NEAR(s.depthAt(n + 2, 300.0).value / atB[n], 1.0, kDepthTolerance);
  }
}

TEST(PlaneSection, AnswerReachesEveryStationAndIsDenseEnough) {
  const Spread spread = evenSpread(24, 2.0, {-7.3, 23.0, 60.1});
  SectionOptions options;
  options.outputSpacing = 0.7;
  const Section s = solveSection(flatTimes({500.0, 2000.0}, {5.0}, spread, 0.5e-3).times, options);
  ASSERT_TRUE(s.determined) << s.reason;
  EXPECT_EQ(s.x.front(), -7.3);
  EXPECT_EQ(s.x.back(), 60.1);
  for (const double x : {0.0, 2.0, 23.0, 46.0}) {
    EXPECT_TRUE(std::binary_search(s.x.begin(), s.x.end(), x));
  }
  for (std::size_t i = 1; i < s.x.size(); ++i) {
    EXPECT_LE(s.x[i] - s.x[i - 1], 0.7 + 1e-9);
  }
}

}  // namespace
}  // namespace strikeplate
