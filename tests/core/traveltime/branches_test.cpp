#include "core/traveltime/branches.h"

#include <gtest/gtest.h>

#include "core/traveltime/reciprocity.h"
#include "core/traveltime/trigger_delay.h"
#include "two_layer_line.h"

namespace strikeplate {
namespace {

TEST(Branches, EachShotSideAndLayerHasItsLine) {
  const TravelTimes times = twoLayerLine({0.0, 48.0, 96.0});
  const auto branches = findBranches(times);
  ASSERT_EQ(branches.size(), 8U);
  const Branch* right = findBranch(branches, 1, 1, 2);
  const Branch* left = findBranch(branches, 1, -1, 2);
  ASSERT_NE(right, nullptr);
  ASSERT_NE(left, nullptr);
  EXPECT_NEAR(right->velocity.value, 2000.0, 1e-6);
  EXPECT_NEAR(left->fit.intercept, right->fit.intercept, 1e-12);
  EXPECT_EQ(findBranch(branches, 0, -1, 2), nullptr);
  EXPECT_TRUE(findBranch(branches, 0, 1, 1)->fit.throughOrigin);
}

TEST(Branches, UnassignedPicksAndThoseAtTheShotBelongToNone) {
  TravelTimes times = twoLayerLine({2.0});
  times.arrivals.back().layer = 0;
  std::size_t count = 0;
  for (const Branch& branch : findBranches(times)) {
    count += branch.arrivals.size();
  }
  EXPECT_EQ(count, 22U);
}

TEST(Branches, ABuriedShotsDirectLineIsFree) {
  TravelTimes times = twoLayerLine({0.0});
  times.shots[0].depth = 1.0;
  EXPECT_FALSE(findBranch(findBranches(times), 0, 1, 1)->fit.throughOrigin);
}

// xc = 2 h sqrt((v2 + v1)/(v2 - v1)), Sheriff and Geldart (1995): 12.910 m.
TEST(Branches, CrossoverIsWhereTheLinesMeet) {
  const auto branches = findBranches(twoLayerLine({0.0}));
  const LineFit &near = findBranch(branches, 0, 1, 1)->fit, &far = findBranch(branches, 0, 1, 2)->fit;
  const Crossover meeting = crossover(near, far);
  ASSERT_TRUE(meeting.offset.determined);
  EXPECT_NEAR(meeting.offset.value, 10.0 * std::sqrt(2500.0 / 1500.0), 1e-6);
  EXPECT_NEAR(meeting.time, near.at(meeting.offset.value), 1e-12);
  EXPECT_GT(meeting.offset.sigma, 0.0);
  EXPECT_EQ(crossover(far, near).offset.reason, "the farther branch is not the flatter one");
}

TEST(Reciprocity, ExactTimesAgreeBothWays) {
  const auto pairs = reciprocalPairs(twoLayerLine({0.0, 48.0, 96.0}));
  ASSERT_EQ(pairs.size(), 3U);
  for (const ReciprocalPair& pair : pairs) {
    EXPECT_NEAR(pair.difference(), 0.0, 1e-9);
    EXPECT_GT(pair.tolerance, 0.0);
  }
}

TEST(Reciprocity, ALateTriggerShowsInEveryPairOfItsShot) {
  TravelTimes times = twoLayerLine({0.0, 48.0, 96.0});
  for (Arrival& a : times.arrivals) {
    a.time -= a.shot == 2 ? 6e-3 : 0.0;
  }
  for (const ReciprocalPair& pair : reciprocalPairs(times)) {
    EXPECT_NEAR(pair.difference(), pair.shotB == 2 ? 6e-3 : 0.0, 1e-9);
    EXPECT_EQ(std::abs(pair.difference()) > pair.tolerance, pair.shotB == 2);
  }
}

TEST(Reciprocity, ShotsThatDoNotReachEachOtherMakeNoPair) {
  TravelTimes times = twoLayerLine({0.0, 96.0});
  std::erase_if(times.arrivals, [&times](const Arrival& a) { return times.offset(a) > 50.0; });
  EXPECT_TRUE(reciprocalPairs(times).empty());
}

TEST(TriggerDelay, ALateTriggerIsSuggestedBackAndTheOthersLeftAlone) {
  TravelTimes times = twoLayerLine({0.0, 48.0, 96.0});
  for (Arrival& a : times.arrivals) {
    a.time -= a.shot == 2 ? 6e-3 : 0.0;
  }
  const auto corrections = suggestedTriggerCorrections(times, findBranches(times), reciprocalPairs(times));
  ASSERT_EQ(corrections.size(), 3U);
  EXPECT_NEAR(corrections[2].value, 6e-3, 1e-3);
  EXPECT_NEAR(corrections[0].value, 0.0, 1e-3);
  EXPECT_NEAR(corrections[1].value, 0.0, 1e-3);
}

TEST(TriggerDelay, AShotNothingSpeaksAboutGetsNone) {
  TravelTimes times = twoLayerLine({0.0});
  std::erase_if(times.arrivals, [](const Arrival& a) { return a.layer == 1; });
  const auto corrections = suggestedTriggerCorrections(times, findBranches(times), reciprocalPairs(times));
  ASSERT_EQ(corrections.size(), 1U);
  EXPECT_FALSE(corrections[0].determined);
}

}  // namespace
}  // namespace strikeplate
