#include "widgets/branch_drag.h"

#include <gtest/gtest.h>

#include "tests/widgets/table_scene.h"

namespace strikeplate {
namespace {

// Shot 1 stands at -1 m; 400 over 2000 m/s under 4 m cross over at 9.8 m: traces 1 to 5 are direct, the rest head
// waves.
class BranchDrag : public ::testing::Test {
 protected:
  BranchEnd endOf(int layer, bool far) const {
    for (const BranchEnd& end : branchEnds(interpretation().branches, 0)) {
      if (end.layer == layer && end.far == far) {
        return end;
      }
    }
    ADD_FAILURE() << "no such end";
    return {};
  }
  const Interpretation& interpretation() const { return *scene.interpretation; }
  Edit slide(const BranchEnd& end, int toTrace) const {
    return slideBranchEnd(*scene.survey, interpretation().times, end, interpretation().arrivalOf(0, toTrace));
  }
  static std::vector<std::pair<int, int>> layersSet(const Edit& edit) {  // trace from 0, layer
    std::vector<std::pair<int, int>> out;
    for (const Change& change : edit.changes) {
      const auto& pick = std::get<PickChange>(change);
      out.emplace_back(pick.trace, pick.after->layer);
    }
    return out;
  }

  Scene scene = testing::sceneOfTimes(testing::twoLayerSurvey());
};

using Layers = std::vector<std::pair<int, int>>;

TEST_F(BranchDrag, EveryFarEndAndTheNearEndsOfRefractorsCanBeTaken) {
  const auto ends = branchEnds(interpretation().branches, 0);
  ASSERT_EQ(ends.size(), 3u);  // direct far; head wave far and near
  EXPECT_EQ(interpretation().times.arrivals[static_cast<std::size_t>(endOf(1, true).arrival)].trace, 4);
  EXPECT_EQ(interpretation().times.arrivals[static_cast<std::size_t>(endOf(2, false).arrival)].trace, 5);
  EXPECT_EQ(interpretation().times.arrivals[static_cast<std::size_t>(endOf(2, true).arrival)].trace, 23);
}

TEST_F(BranchDrag, FarEndDrawnOutwardsTakesWhatItPasses) {
  EXPECT_EQ(layersSet(slide(endOf(1, true), 6)), (Layers{{5, 1}, {6, 1}}));
}

TEST_F(BranchDrag, FarEndDrawnBackLeavesArrivalsToTheBranchBeyond) {
  EXPECT_EQ(layersSet(slide(endOf(1, true), 2)), (Layers{{3, 2}, {4, 2}}));
}

TEST_F(BranchDrag, LastFarEndDrawnBackBeginsTheNextLayer) {
  EXPECT_EQ(layersSet(slide(endOf(2, true), 21)), (Layers{{22, 3}, {23, 3}}));
}

TEST_F(BranchDrag, NearEndDrawnInwardsAndOutwards) {
  EXPECT_EQ(layersSet(slide(endOf(2, false), 3)), (Layers{{3, 2}, {4, 2}}));
  EXPECT_EQ(layersSet(slide(endOf(2, false), 7)), (Layers{{5, 1}, {6, 1}}));
}

TEST_F(BranchDrag, ABranchKeepsOneArrival) {
  EXPECT_EQ(layersSet(slide(endOf(1, true), 0)), (Layers{{1, 2}, {2, 2}, {3, 2}, {4, 2}}));
}

TEST_F(BranchDrag, AnEndPutBackWhereItWasChangesNothing) {
  EXPECT_TRUE(slide(endOf(1, true), 4).changes.empty());
}

TEST_F(BranchDrag, ThePointerFindsTheNearestGeophoneOnTheEndsOwnSide) {
  const BranchEnd end = endOf(1, true);
  EXPECT_EQ(interpretation()
                .times.arrivals[static_cast<std::size_t>(arrivalUnder(interpretation().times, end, 15.2))]
                .trace,
            8);
  EXPECT_EQ(interpretation()
                .times.arrivals[static_cast<std::size_t>(arrivalUnder(interpretation().times, end, -50.0))]
                .trace,
            0);
}

TEST_F(BranchDrag, ManyTracesOfSeveralShotsAreAssignedInOneEdit) {
  const Edit edit = assignTraces(*scene.survey, {{0, 3}, {0, 4}, {2, 7}}, 2);
  ASSERT_EQ(edit.changes.size(), 3u);
  EXPECT_EQ(std::get<PickChange>(edit.changes[2]).shot, 2);
  EXPECT_EQ(edit.text, "Assign 3 picks to layer 2");
}

}  // namespace
}  // namespace strikeplate
