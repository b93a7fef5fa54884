#include "widgets/position_range.h"

#include <gtest/gtest.h>

namespace strikeplate {
namespace {

TEST(PositionRange, TheWholeLineHoldsGeophonesShotsAndBoreholes) {
  Survey survey;
  survey.geophones = {{0.0, 0.0}, {46.0, 0.0}};
  survey.shots.resize(1);
  survey.shots[0].point.x = -20.0;
  survey.boreholes = {{60.0, 2, 5.0, 0.1, false, "BH1"}};
  const PositionRange range = wholeLine(survey);
  EXPECT_NEAR(range.left, -22.4, 1e-9) << "3 % of 80 m";
  EXPECT_NEAR(range.right, 62.4, 1e-9);
  EXPECT_EQ(wholeLine(Survey{}), PositionRange{});
}

TEST(PositionRange, ZoomKeepsThePositionUnderThePointer) {
  const PositionRange whole{0.0, 100.0};
  const PositionRange near = zoomed({0.0, 100.0}, 30.0, 0.5, whole);
  EXPECT_NEAR(near.width(), 50.0, 1e-9);
  EXPECT_NEAR((30.0 - near.left) / near.width(), 0.3, 1e-12);
  EXPECT_NEAR(zoomed({10.0, 12.0}, 11.0, 1e-3, whole).width(), 1.0, 1e-12) << "never closer than 1 m";
  EXPECT_NEAR(zoomed(whole, 50.0, 1e3, whole).width(), 400.0, 1e-9) << "never wider than four lines";
}

TEST(PositionRange, PanningNeverLosesTheLine) {
  const PositionRange whole{0.0, 100.0};
  const PositionRange far = panned({40.0, 60.0}, 1e6, whole);
  EXPECT_NEAR(far.width(), 20.0, 1e-9);
  EXPECT_NEAR(far.left, 98.0, 1e-9) << "a tenth of the pane, 2 m, still shows the line";
  EXPECT_NEAR(panned({40.0, 60.0}, -5.0, whole).left, 35.0, 1e-12);
}

TEST(PositionRange, StepsAreOneTwoOrFiveTimesAPowerOfTen) {
  EXPECT_DOUBLE_EQ(niceStep(0.11), 0.2);
  EXPECT_DOUBLE_EQ(niceStep(0.1), 0.1);
  EXPECT_DOUBLE_EQ(niceStep(3.0), 5.0);
  EXPECT_DOUBLE_EQ(niceStep(6.0), 10.0);
}

}  // namespace
}  // namespace strikeplate
