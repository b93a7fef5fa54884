#include "core/methods/opinions.h"

#include <algorithm>
#include <cmath>
#include <set>

#include <gtest/gtest.h>

#include "core/methods/flat_layers.h"
#include "core/traveltime/branches.h"

namespace strikeplate {
namespace {

/// 24 geophones 2 m apart with shots off both ends, over two level layers: 500 over 2000 m/s under 4 m.
TravelTimes levelTimes() {
  TravelTimes times;
  for (int i = 0; i < 24; ++i) {
    times.geophones.push_back({2.0 * i, 0.0});
  }
  times.shots = {{-1.0, 0.0, 0.0}, {47.0, 0.0, 0.0}};
  const double ti = interceptTimes(std::vector<double>{500, 2000}, std::vector<double>{4})[0];
  for (int shot = 0; shot < 2; ++shot) {
    for (int i = 0; i < 24; ++i) {
      const double x = std::abs(2.0 * i - times.shots[static_cast<std::size_t>(shot)].x);
      const bool direct = x / 500 < ti + x / 2000;
      times.arrivals.push_back({shot, i, i, direct ? x / 500 : ti + x / 2000, 0.5e-3, direct ? 1 : 2, false});
    }
  }
  times.ground = Ground(times.geophones, times.shots);
  return times;
}

TEST(SecondOpinions, EveryRouteThatHasDataAgreesOnLevelGround) {
  const TravelTimes times = levelTimes();
  const std::vector<Opinion> opinions = secondOpinions(times, findBranches(times));
  std::set<std::string> routes;
  for (const Opinion& opinion : opinions) {
    routes.insert(opinion.route);
    EXPECT_EQ(opinion.layer, 2);
    ASSERT_TRUE(opinion.depth.determined) << opinion.route << ": " << opinion.depth.reason;
    EXPECT_NEAR(opinion.depth.value, 4.0, 0.02) << opinion.route;
    EXPECT_GT(opinion.depth.sigma, 0.0) << opinion.route;
    EXPECT_FALSE(opinion.assumes.empty()) << opinion.route;
  }
  for (const char* route : {"intercept time", "crossover distance", "dipping layers"}) {
    EXPECT_TRUE(routes.contains(route)) << route;
  }
}

TEST(SecondOpinions, ARouteWithoutDataIsAbsent) {
  TravelTimes times = levelTimes();
  std::erase_if(times.arrivals, [](const Arrival& a) { return a.shot == 1; });
  const std::vector<Opinion> opinions = secondOpinions(times, findBranches(times));
  EXPECT_FALSE(opinions.empty());
  EXPECT_TRUE(
      std::none_of(opinions.begin(), opinions.end(), [](const Opinion& o) { return o.route == "dipping layers"; }));
  EXPECT_TRUE(secondOpinions(TravelTimes{}, {}).empty());
}

}  // namespace
}  // namespace strikeplate
