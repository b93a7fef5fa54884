#include "core/section/grid_check.h"

#include <cmath>

#include <gtest/gtest.h>

namespace strikeplate {
namespace {

constexpr double kV1 = 450.0;
constexpr double kV2 = 1800.0;
constexpr double kDepth = 5.0;

/// Exact first arrival on level ground over two flat layers.
double exactTime(double offset) {
  const double head = offset / kV2 + 2.0 * kDepth * std::sqrt(1.0 / (kV1 * kV1) - 1.0 / (kV2 * kV2));
  const double critical = 2.0 * kDepth * kV1 / std::sqrt(kV2 * kV2 - kV1 * kV1);
  return offset < critical ? offset / kV1 : std::min(offset / kV1, head);
}

struct Case {
  TravelTimes times;
  Section section;
};

/// A flat section that predicts exact times, raised by `height` m.
Case flatCase(double height) {
  Case c;
  for (int i = 0; i < 24; ++i)
    c.times.geophones.push_back({2.0 * i, height});
  c.times.shots = {{-1.0, height, 0.0}, {47.0, height, 0.0}};
  Section& s = c.section;
  s.determined = true;
  s.layers = 2;
  s.x = {-1.0, 23.0, 47.0};
  s.ground = {height, height, height};
  SectionInterface interface;
  interface.elevation.assign(3, Estimate::normal(height - kDepth, 0.1));
  interface.depth.assign(3, Estimate::normal(kDepth, 0.1));
  s.interfaces = {interface};
  s.velocityAlong = {{kV1, kV1, kV1}, {kV2, kV2, kV2}};
  for (int shot = 0; shot < 2; ++shot) {
    for (int g = 0; g < 24; ++g) {
      Arrival a;
      a.shot = shot;
      a.geophone = a.trace = g;
      a.sigma = 5e-4;
      const double exact = exactTime(std::abs(c.times.signedOffset(a)));
      a.time = exact + 1e-3;
      c.times.arrivals.push_back(a);
      s.predicted.push_back(exact);
    }
  }
  return c;
}

TEST(GridCheck, FlatSectionAgreesWithExactRaysWithinATenthOfAMillisecond) {
  const Case c = flatCase(103.37);
  const auto check = gridCheck(c.times, c.section, 0.125);
  ASSERT_TRUE(check.ok());
  EXPECT_LT(std::abs(check->worstMinusRays), 1e-4);
  EXPECT_LE(check->rmsMinusRays, std::abs(check->worstMinusRays));
  for (std::size_t i = 0; i < check->time.size(); ++i) {
    EXPECT_NEAR(check->minusPick[i], check->minusRays[i] - 1e-3, 1e-12);
  }
}

TEST(GridCheck, AWrongPredictedTimeIsNamed) {
  Case c = flatCase(0.0);
  c.section.predicted[30] += 2e-3;
  const auto check = gridCheck(c.times, c.section, 0.125);
  ASSERT_TRUE(check.ok());
  EXPECT_EQ(check->worstArrival, 30);
  EXPECT_NEAR(check->worstMinusRays, -2e-3, 1e-4);
}

TEST(GridCheck, AnArrivalWithoutAPredictedTimeIsLeftOut) {
  Case c = flatCase(0.0);
  c.section.predicted[3] = std::nan("");
  const auto check = gridCheck(c.times, c.section, 0.125);
  ASSERT_TRUE(check.ok());
  EXPECT_TRUE(std::isnan(check->time[3]));
  EXPECT_TRUE(std::isfinite(check->rmsMinusRays));
}

TEST(GridCheck, WhatCannotBeCheckedIsRefusedWithOneSentence) {
  Case c = flatCase(0.0);
  EXPECT_FALSE(gridCheck(c.times, c.section, 0.0).ok());
  EXPECT_FALSE(gridCheck(c.times, c.section, std::nan("")).ok());
  EXPECT_FALSE(gridCheck(c.times, c.section, 1e-4).ok());
  c.section.determined = false;
  c.section.reason = "no picks.";
  EXPECT_NE(gridCheck(c.times, c.section, 0.125).message().find("no picks."), std::string::npos);
}

TEST(GridCheck, StopsWhenAsked) {
  const Case c = flatCase(0.0);
  const auto check = gridCheck(c.times, c.section, 0.125, [](double fraction) { return fraction < 0.4; });
  ASSERT_TRUE(check.ok());
  EXPECT_FALSE(check->finished);
  EXPECT_TRUE(std::isnan(check->time.back()));
  EXPECT_TRUE(std::isfinite(check->time.front()));
}

}  // namespace
}  // namespace strikeplate
