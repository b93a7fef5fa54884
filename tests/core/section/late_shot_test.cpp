#include <cmath>

#include <gtest/gtest.h>

#include "core/section/solve.h"
#include "tests/core/section/scene.h"

namespace strikeplate {
namespace {

using testing::evenSpread;
using testing::Spread;

Spread fortyEight() {
  return evenSpread(48, 2.0, {-1.0, 15.0, 31.0, 47.0, 63.0, 79.0, 95.0});
}

TravelTimes flatWithLateShot(const std::vector<double>& velocities, const std::vector<double>& thicknesses,
                             double delay) {
  std::mt19937 random(5);
  TravelTimes times =
      testing::withNoise(testing::flatTimes(velocities, thicknesses, fortyEight(), 0.5e-3).times, random);
  for (Arrival& a : times.arrivals) {
    a.time += a.shot == 1 ? delay : 0.0;
  }
  return times;
}

TEST(LateShot, MakesNoLayerAndBendsNoRock) {
  const Section s = solveSection(flatWithLateShot({420.0, 2400.0}, {5.0}, -3.5e-3), {});
  ASSERT_TRUE(s.determined) << s.reason;
  ASSERT_EQ(s.layers, 2);
  for (std::size_t i = 0; i < s.x.size(); ++i) {
    EXPECT_NEAR(s.interfaces[0].depth[i].value, 5.0, 0.15) << s.x[i];
  }
}

TEST(LateShot, IsToldByItsDelayWhichNoOtherShotHas) {
  const Section s = solveSection(flatWithLateShot({420.0, 2400.0}, {5.0}, 2.0e-3), {});
  ASSERT_EQ(s.triggerDelays.size(), 7u);
  for (std::size_t shot = 0; shot < s.triggerDelays.size(); ++shot) {
    EXPECT_EQ(s.triggerDelays[shot].determined, shot == 1) << shot;
  }
  EXPECT_NEAR(s.triggerDelays[1].value, 2.0e-3, 0.3e-3);
}

TEST(LateShot, DoesNotHideAThirdLayerThatIsThere) {
  const Section s = solveSection(flatWithLateShot({400.0, 1200.0, 3000.0}, {3.0, 6.0}, 3.0e-3), {});
  ASSERT_TRUE(s.determined) << s.reason;
  EXPECT_EQ(s.layers, 3);
  ASSERT_EQ(s.triggerDelays.size(), 7u);
  EXPECT_NEAR(s.triggerDelays[1].value, 3.0e-3, 0.4e-3);
}

TEST(LateShot, IsNotSeenWhereEveryTriggerIsRight) {
  const Section s = solveSection(flatWithLateShot({420.0, 2400.0}, {5.0}, 0.0), {});
  ASSERT_TRUE(s.determined) << s.reason;
  EXPECT_TRUE(s.triggerDelays.empty());
}

TEST(LateShot, StaysAllowedForWhileAPickIsDragged) {
  TravelTimes times = flatWithLateShot({420.0, 2400.0}, {5.0}, -3.5e-3);
  const Section full = solveSection(times, {});
  times.arrivals[60].time += 1e-3;
  const Section live = resolveSection(times, {}, full.memory);
  ASSERT_TRUE(live.determined) << live.reason;
  ASSERT_EQ(live.triggerDelays.size(), 7u);
  EXPECT_NEAR(live.triggerDelays[1].value, -3.5e-3, 0.3e-3);
}

}  // namespace
}  // namespace strikeplate
