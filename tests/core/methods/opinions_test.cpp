#include "core/methods/opinions.h"

#include <algorithm>
#include <chrono>
#include <map>
#include <string>

#include <gtest/gtest.h>

#include "../traveltime/two_layer_line.h"
#include "core/traveltime/branches.h"

namespace strikeplate {
namespace {

std::map<std::string, int> countOf(const std::vector<Opinion>& opinions) {
  std::map<std::string, int> count;
  for (const Opinion& o : opinions) {
    count[o.route] += o.depth.determined ? 1 : 0;
  }
  return count;
}

// Own exact times over a level refractor at 5 m: whatever the route, 5 m.
TEST(SecondOpinions, EveryRouteFindsALevelRefractor) {
  const TravelTimes times = twoLayerLine({0.0, 48.0, 96.0});
  const auto opinions = secondOpinions(times, findBranches(times));
  for (const Opinion& o : opinions) {
    ASSERT_TRUE(o.depth.determined) << o.route << ": " << o.depth.reason;
    EXPECT_NEAR(o.depth.value, 5.0, 1e-6) << o.route << " at " << o.x;
    EXPECT_GT(o.depth.sigma, 0.0);
    EXPECT_FALSE(o.assumes.empty());
  }
  auto count = countOf(opinions);
  EXPECT_EQ(count["intercept time"], 4);
  EXPECT_EQ(count["crossover distance"], 4);
  EXPECT_EQ(count["dipping layers"], 3);
  EXPECT_GE(count["plus-minus"], 16);
  EXPECT_EQ(count["plus-minus"], count["reciprocal"]);
  EXPECT_GE(count["time terms"], 16);
}

TEST(SecondOpinions, ARouteWithoutDataIsAbsent) {
  const TravelTimes times = twoLayerLine({0.0});
  auto count = countOf(secondOpinions(times, findBranches(times)));
  EXPECT_EQ(count.size(), 2U);
  EXPECT_EQ(count["intercept time"], 1);
  EXPECT_TRUE(secondOpinions({}, {}).empty());
}

TEST(SecondOpinions, BrokenReciprocityGivesAReasonAndNoNumber) {
  TravelTimes times = twoLayerLine({0.0, 96.0});
  for (Arrival& a : times.arrivals) {
    a.time += a.shot == 1 && a.layer == 2 ? 12e-3 : 0.0;
  }
  int dipping = 0;
  for (const Opinion& o : secondOpinions(times, findBranches(times))) {
    if (o.route == "dipping layers") {
      ++dipping;
      EXPECT_FALSE(o.depth.determined);
      EXPECT_NE(o.depth.reason.find("differ by 12.0 ms"), std::string::npos) << o.depth.reason;
    }
  }
  EXPECT_EQ(dipping, 2);
}

// A drag asks for them at every step; the limit here is ten times what an unhurried machine needs to stay live.
TEST(SecondOpinions, AreReadyWithinAStepOfADrag) {
  const TravelTimes times = twoLayerLine({-10.0, 0.0, 24.0, 48.0, 72.0, 96.0, 106.0});
  const auto branches = findBranches(times);
  double best = 1.0;
  for (int i = 0; i < 20; ++i) {
    const auto start = std::chrono::steady_clock::now();
    EXPECT_FALSE(secondOpinions(times, branches).empty());
    best = std::min(best, std::chrono::duration<double>(std::chrono::steady_clock::now() - start).count());
  }
  RecordProperty("microseconds", static_cast<int>(1e6 * best));
  EXPECT_LT(best, 20e-3);
}

}  // namespace
}  // namespace strikeplate
