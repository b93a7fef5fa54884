#include "core/section/eikonal.h"

#include <algorithm>
#include <cmath>

#include <gtest/gtest.h>

#include "core/section/layered_grid.h"

namespace strikeplate {
namespace {

/// Exact time between two points where velocity is `v0 + k depth`: Slotnick, Lessons in Seismic Computing (1959).
double gradientTime(double v0, double k, double x, double depth) {
  const double there = v0 + k * depth;
  return std::acosh(1.0 + k * k * (x * x + depth * depth) / (2.0 * v0 * there)) / k;
}

/// Exact first arrival at the surface over two flat layers: direct or head wave.
double twoLayerTime(double v1, double v2, double depth, double x) {
  const double head = x / v2 + 2.0 * depth * std::sqrt(1.0 / (v1 * v1) - 1.0 / (v2 * v2));
  const double critical = 2.0 * depth * v1 / std::sqrt(v2 * v2 - v1 * v1);
  return x < critical ? x / v1 : std::min(x / v1, head);
}

SlownessGrid uniform(const PlaneGrid& grid, double velocity) {
  return {grid, std::vector<double>(grid.size(), 1.0 / velocity)};
}

LayeredGround flatLayers(double v1, double v2, double depth) {
  LayeredGround ground;
  ground.layers = 2;
  ground.ground = [](double) { return 0.0; };
  ground.interfaces.emplace_back([depth](double) { return -depth; });
  ground.velocity = [v1, v2](int layer, double, double) { return layer == 0 ? v1 : v2; };
  return ground;
}

TEST(Eikonal, UniformMediumGivesStraightTimesFromASourceBetweenNodes) {
  const PlaneGrid grid{-1.0, 0.5, 0.5, 60, 30};
  const TimeField field = firstArrivals(uniform(grid, 500.0), 3.13, -4.41);
  for (const double x : {-0.9, 3.0, 3.13, 11.7, 28.0}) {
    for (const double z : {0.4, -4.41, -9.3}) {
      EXPECT_NEAR(field.at(x, z), std::hypot(x - 3.13, z + 4.41) / 500.0, 2e-5) << x << " " << z;
    }
  }
}

TEST(Eikonal, LinearGradientIsMetWithinOneInAThousand) {
  const double v0 = 400.0;
  const double k = 40.0;
  const PlaneGrid grid{0.0, 0.0, 0.25, 401, 281};
  SlownessGrid medium{grid, std::vector<double>(grid.size())};
  for (int j = 0; j < grid.rows; ++j) {
    for (int i = 0; i < grid.columns; ++i)
      medium.slowness[grid.at(i, j)] = 1.0 / (v0 - k * grid.elevationOf(j));
  }
  const TimeField field = firstArrivals(medium, 0.0, 0.0);
  double worst = 0.0;
  for (int j = 0; j < grid.rows; ++j) {
    for (int i = 0; i < grid.columns; ++i) {
      if (i + j == 0)
        continue;
      const double exact = gradientTime(v0, k, grid.xOf(i), -grid.elevationOf(j));
      worst = std::max(worst, std::abs(field.atNode(i, j) / exact - 1.0));
    }
  }
  EXPECT_LT(worst, 1e-3);
}

TEST(Eikonal, HalvingTheStepOfAGradientQuartersTheError) {
  const auto worst = [](double h) {
    const int n = static_cast<int>(std::lround(40.0 / h)) + 1;
    const PlaneGrid grid{0.0, 0.0, h, n, n};
    SlownessGrid medium{grid, std::vector<double>(grid.size())};
    for (int j = 0; j < n; ++j) {
      for (int i = 0; i < n; ++i)
        medium.slowness[grid.at(i, j)] = 1.0 / (400.0 - 40.0 * grid.elevationOf(j));
    }
    const TimeField field = firstArrivals(medium, 0.0, 0.0);
    double sum = 0.0;
    for (double x = 4.0; x <= 40.0; x += 4.0) {
      for (double d = 4.0; d <= 40.0; d += 4.0)
        sum += std::abs(field.at(x, -d) - gradientTime(400.0, 40.0, x, d));
    }
    return sum;
  };
  EXPECT_GT(worst(1.0) / worst(0.5), 2.8);
}

TEST(Eikonal, TwoLayersAreMetWithinFifteenInTenThousandWhereverTheInterfaceLiesBetweenNodes) {
  for (const double depth : {4.0, 4.03, 4.05, 4.08}) {
    const PlaneGrid grid{-1.0, 0.4, 0.05, 1841, 120};
    const TimeField field = firstArrivals(layeredSlowness(flatLayers(420.0, 2600.0, depth), grid), 0.0, 0.0);
    for (double x = 1.0; x <= 90.0; x += 1.0) {
      const double exact = twoLayerTime(420.0, 2600.0, depth, x);
      EXPECT_NEAR(field.at(x, 0.0) / exact, 1.0, 1.5e-3) << "depth " << depth << " x " << x;
    }
  }
}

TEST(Eikonal, TimesAreTheSameWithSourceAndReceiverExchanged) {
  const PlaneGrid grid{-1.0, 0.4, 0.1, 321, 80};
  const SlownessGrid medium = layeredSlowness(flatLayers(500.0, 1800.0, 3.0), grid);
  EXPECT_NEAR(firstArrivals(medium, 2.03, 0.0).at(27.0, -1.2), firstArrivals(medium, 27.0, -1.2).at(2.03, 0.0), 2e-5);
}

TEST(Eikonal, AirOverAValleyCarriesNoFirstArrival) {
  LayeredGround ground;
  ground.layers = 1;
  ground.ground = [](double x) { return std::abs(x - 10.0) - 10.0; };  // a notch 10 m deep, sides at 45 degrees
  ground.velocity = [](int, double, double) { return 400.0; };
  const PlaneGrid grid{-0.5, 1.0, 0.1, 211, 160};
  const TimeField field = firstArrivals(layeredSlowness(ground, grid), 0.0, 0.0);
  // Down one side and up the other; across the air it would be 20 m.
  EXPECT_NEAR(field.at(20.0, 0.0), 2.0 * std::hypot(10.0, 10.0) / 400.0, 1.2e-3);
}

}  // namespace
}  // namespace strikeplate
