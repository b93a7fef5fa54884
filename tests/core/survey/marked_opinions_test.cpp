#include "core/survey/marked_opinions.h"

#include <cmath>

#include <gtest/gtest.h>

namespace strikeplate {
namespace {

Branch branchOf(int side, int layer, double velocity) {
  Branch branch;
  branch.shot = 0;
  branch.side = side;
  branch.layer = layer;
  branch.fit.determined = true;
  branch.fit.slope = 1.0 / velocity;
  branch.fit.varSlope = 1e-12;
  return branch;
}

Survey surveyWith(const ShotMark& mark) {
  Survey survey;
  survey.shots.resize(1);
  survey.shots[0].point.x = 12.0;
  survey.shots[0].marks = {mark};
  return survey;
}

// Layer of 5 m, 500 over 1500 m/s: the critical distance is 2 h tan(asin(v1/v2)), the vertical time 2 h / v1
// (Sheriff and Geldart 1995).
TEST(MarkedOpinions, AMarkedCriticalDistanceGivesTheDepthUnderItsShot) {
  const double xcrit = 2.0 * 5.0 * std::tan(std::asin(500.0 / 1500.0));
  const auto opinions = markedOpinions(surveyWith({MarkKind::CriticalDistance, xcrit, 0.2}),
                                       {branchOf(1, 1, 500.0), branchOf(1, 2, 1500.0), branchOf(-1, 2, 1500.0)});
  ASSERT_EQ(opinions.size(), 1U);
  EXPECT_EQ(opinions[0].route, "critical distance");
  EXPECT_EQ(opinions[0].x, 12.0);
  EXPECT_NEAR(opinions[0].depth.value, 5.0, 1e-9);
  // Almost all of its uncertainty is the mark's own: depth is proportional to the distance.
  EXPECT_NEAR(opinions[0].depth.sigma, 5.0 * 0.2 / xcrit, 0.02);
}

TEST(MarkedOpinions, AMarkedReflectionTimeNeedsNoHeadWave) {
  const auto opinions = markedOpinions(surveyWith({MarkKind::ReflectionTime, 0.02, 0.001}), {branchOf(1, 1, 500.0)});
  ASSERT_EQ(opinions.size(), 1U);
  EXPECT_NEAR(opinions[0].depth.value, 5.0, 1e-9);
}

TEST(MarkedOpinions, WithoutTheBranchesThereIsAReasonInsteadOfADepth) {
  const auto opinions = markedOpinions(surveyWith({MarkKind::CriticalDistance, 4.0, 0.2}), {branchOf(1, 1, 500.0)});
  ASSERT_EQ(opinions.size(), 1U);
  EXPECT_FALSE(opinions[0].depth.determined);
  EXPECT_NE(opinions[0].depth.reason.find("layer 2"), std::string::npos);
}

}  // namespace
}  // namespace strikeplate
