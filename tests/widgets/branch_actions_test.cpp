#include "widgets/branch_actions.h"

#include <cmath>

#include <gtest/gtest.h>

#include "core/traveltime/branches.h"
#include "tests/widgets/table_scene.h"
#include "widgets/branch_marks.h"

namespace strikeplate {
namespace {

class BranchActions : public ::testing::Test {
 protected:
  BranchActions() : scene(testing::sceneOfTimes(testing::twoLayerSurvey())) {}
  const Branch& branch(int layer) const { return *findBranch(interpretation().branches, 0, 1, layer); }
  const Interpretation& interpretation() const { return *scene.interpretation; }
  std::vector<int> layersAfter(const Edit& edit, const std::vector<int>& arrivals) const {
    const Survey after = applied(*scene.survey, edit);
    std::vector<int> layers;
    for (const int i : arrivals) {
      const Arrival& a = interpretation().times.arrivals[static_cast<std::size_t>(i)];
      layers.push_back(
          after.shots[static_cast<std::size_t>(a.shot)].traces[static_cast<std::size_t>(a.trace)].pick->layer);
    }
    return layers;
  }
  Scene scene;
};

TEST_F(BranchActions, ASplitGivesTheOuterPartToTheNextLayer) {
  const Branch& head = branch(2);
  const int at = head.arrivals[head.arrivals.size() / 2];
  const Edit edit = splitBranch(*scene.survey, interpretation(), at);
  EXPECT_EQ(edit.text, "Split the layer 2 branch, shot 1");
  const auto layers = layersAfter(edit, head.arrivals);
  const std::size_t half = head.arrivals.size() / 2;
  EXPECT_EQ(layers[half - 1], 0) << "the inner part stays as it was";
  EXPECT_EQ(layers[half], 3);
  EXPECT_EQ(layers.back(), 3);
}

TEST_F(BranchActions, ASplitOfTheDirectBranchMovesTheHeadWaveOneLayerOut) {
  const Edit edit = splitBranch(*scene.survey, interpretation(), branch(1).arrivals.back());
  EXPECT_EQ(layersAfter(edit, {branch(1).arrivals.back(), branch(2).arrivals.front()}), (std::vector<int>{2, 3}));
}

TEST_F(BranchActions, TheFirstPickOfABranchSplitsNothing) {
  EXPECT_TRUE(splitBranch(*scene.survey, interpretation(), branch(2).arrivals.front()).changes.empty());
}

TEST_F(BranchActions, MergingTakesTheBranchBeyondIn) {
  const Edit edit = mergeBranch(*scene.survey, interpretation(), branch(1).arrivals.front());
  for (const int layer : layersAfter(edit, branch(2).arrivals)) {
    EXPECT_EQ(layer, 1);
  }
  EXPECT_TRUE(mergeBranch(*scene.survey, interpretation(), branch(2).arrivals.front()).changes.empty());
}

TEST_F(BranchActions, DissolvingIsOnlyForWhatWasAssignedByHand) {
  const int at = branch(2).arrivals.back();
  EXPECT_TRUE(dissolveBranch(*scene.survey, interpretation(), at).changes.empty());
  const int trace = interpretation().times.arrivals[static_cast<std::size_t>(at)].trace;
  const Survey held = applied(*scene.survey, edits::assignLayer(*scene.survey, 0, {trace}, 2));
  const Interpretation after = interpret(held);
  const Edit edit = dissolveBranch(held, after, after.arrivalOf(0, trace));
  ASSERT_FALSE(edit.changes.empty());
  EXPECT_EQ(applied(held, edit).shots[0].traces[static_cast<std::size_t>(trace)].pick->layer, 0);
}

// 400 over 2000 m/s under 4 m: crossover 2 h sqrt((v2 + v1)/(v2 - v1)), critical distance 2 h v1/sqrt(v2^2 - v1^2)
// (Sheriff and Geldart 1995).
TEST_F(BranchActions, CrossoverAndCriticalDistanceAreThoseOfTheGround) {
  double crossover = 0.0, critical = 0.0;
  for (const BranchMark& mark : branchMarks(*scene.survey, interpretation(), 0)) {
    (mark.kind == BranchMark::Kind::Crossover ? crossover : critical) = mark.offset;
  }
  EXPECT_NEAR(crossover, 8.0 * std::sqrt(2400.0 / 1600.0), 0.05);
  EXPECT_NEAR(critical, 8.0 * 400.0 / std::sqrt(2000.0 * 2000.0 - 400.0 * 400.0), 0.05);
}

TEST_F(BranchActions, WhatIsMarkedByHandStandsOnTheHeadWave) {
  const Survey marked =
      applied(*scene.survey, edits::setMark(*scene.survey, 0, {MarkKind::CriticalDistance, 2.0, 0.5}));
  const auto marks = branchMarks(marked, interpretation(), 0);
  ASSERT_FALSE(marks.empty());
  EXPECT_EQ(marks.back().kind, BranchMark::Kind::CriticalByHand);
  EXPECT_NEAR(marks.back().time, branch(2).fit.at(2.0), 1e-12);
}

}  // namespace
}  // namespace strikeplate
