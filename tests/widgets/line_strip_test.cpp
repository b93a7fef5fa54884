#include "widgets/line_strip.h"

#include <cmath>

#include <QApplication>
#include <QTest>
#include <QWheelEvent>
#include <gtest/gtest.h>

#include "tests/core/report/sheet_sample.h"
#include "tests/widgets/view_log.h"

namespace strikeplate {
namespace {

using testing::ViewLog;

QPoint whole(const QPointF& p) {
  return p.toPoint();
}

class LineStripTest : public ::testing::Test {
 protected:
  void SetUp() override {
    testing::SheetSample sample = testing::sheetSample();  // geophones 0 to 94 m, seven shots from -4 to 98 m
    scene_.survey = std::make_shared<Survey>(sample.survey);
    scene_.interpretation = std::make_shared<Interpretation>(sample.interpretation);
    scene_.gathers = std::make_shared<std::vector<Gather>>();
    scene_.selection = {1, -1, 0};
    strip_.setAxisMargins(64, 18);
    strip_.resize(882, 64);
    const PositionRange range = wholeLine(*scene_.survey);
    strip_.showPositionRange(range.left, range.right);
    strip_.showScene(scene_);
    strip_.show();
  }

  Scene scene_;
  LineStrip strip_;
  ViewLog log_{strip_};
};

TEST_F(LineStripTest, AClickChoosesAShotOrTheTraceAtAGeophone) {
  QTest::mouseClick(&strip_, Qt::LeftButton, {}, whole(strip_.shotPlace(4)));
  ASSERT_EQ(log_.selections.size(), 1U);
  EXPECT_EQ(log_.selections[0], (Selection{4, -1, 0}));
  QTest::mouseClick(&strip_, Qt::LeftButton, {}, whole(strip_.geophonePlace(17)));
  ASSERT_EQ(log_.selections.size(), 2U);
  EXPECT_EQ(log_.selections[1], (Selection{1, 17, 0}));
  EXPECT_TRUE(log_.proposals.empty());
}

TEST_F(LineStripTest, TheRulerHasThePlotsMargins) {
  strip_.showPositionRange(0.0, 100.0);
  EXPECT_NEAR(strip_.geophonePlace(0).x(), 64.0, 1e-9);
  EXPECT_NEAR(strip_.geophonePlace(25).x(), 64.0 + 400.0, 1e-9) << "50 m of 100 m over 800 px";
}

TEST_F(LineStripTest, ADraggedShotMovesLiveAndIsCommittedOnce) {
  const QPoint from = whole(strip_.shotPlace(2));
  QTest::mousePress(&strip_, Qt::LeftButton, {}, from);
  QTest::mouseMove(&strip_, from + QPoint(2, 0));
  EXPECT_TRUE(log_.proposals.empty()) << "a trembling hand moves nothing";
  QTest::mouseMove(&strip_, from + QPoint(30, 0));
  QTest::mouseMove(&strip_, from + QPoint(40, 0));
  QTest::mouseRelease(&strip_, Qt::LeftButton, {}, from + QPoint(40, 0));
  ASSERT_GE(log_.proposals.size(), 2U);
  for (std::size_t i = 0; i + 1 < log_.proposals.size(); ++i) {
    EXPECT_EQ(log_.proposals[i].phase, Phase::Live);
  }
  EXPECT_EQ(log_.proposals.back().phase, Phase::Commit);
  const Survey after = applied(*scene_.survey, log_.proposals.back().edit);
  const double metresPerPixel = wholeLine(*scene_.survey).width() / 800.0;
  const double moved = after.shots[2].point.x - scene_.survey->shots[2].point.x;
  EXPECT_NEAR(moved, 40.0 * metresPerPixel, 0.2 + 3.0 * metresPerPixel) << "to the step, or to a geophone close by";
  EXPECT_EQ(after.shots[2].traces, scene_.survey->shots[2].traces);
}

TEST_F(LineStripTest, ADraggedShotHoldsToAGeophoneExactly) {
  const QPoint from = whole(strip_.shotPlace(2));
  const int pixels = whole(strip_.geophonePlace(20)).x() - from.x();
  QTest::mousePress(&strip_, Qt::LeftButton, {}, from);
  QTest::mouseMove(&strip_, from + QPoint(pixels, 0));
  QTest::mouseRelease(&strip_, Qt::LeftButton, {}, from + QPoint(pixels, 0));
  ASSERT_FALSE(log_.proposals.empty());
  EXPECT_EQ(applied(*scene_.survey, log_.proposals.back().edit).shots[2].point.x, scene_.survey->geophones[20].x);
}

TEST_F(LineStripTest, AShotDraggedPastItsNeighbourStaysSelected) {
  const QPoint from = whole(strip_.shotPlace(2));
  const QPoint to = whole(strip_.shotPlace(3)) + QPoint(30, 0);
  QTest::mousePress(&strip_, Qt::LeftButton, {}, from);
  QTest::mouseMove(&strip_, to);
  QTest::mouseRelease(&strip_, Qt::LeftButton, {}, to);
  ASSERT_FALSE(log_.proposals.empty());
  const Survey after = applied(*scene_.survey, log_.proposals.back().edit);
  EXPECT_EQ(after.shots[3].blows, scene_.survey->shots[2].blows);
  ASSERT_FALSE(log_.selections.empty());
  EXPECT_EQ(log_.selections.back().shot, 3);
}

TEST_F(LineStripTest, EscapeLeavesTheShotWhereItWas) {
  const QPoint from = whole(strip_.shotPlace(2));
  QTest::mousePress(&strip_, Qt::LeftButton, {}, from);
  QTest::mouseMove(&strip_, from + QPoint(50, 0));
  QTest::keyClick(&strip_, Qt::Key_Escape);
  const std::size_t count = log_.proposals.size();
  QTest::mouseMove(&strip_, from + QPoint(80, 0));
  QTest::mouseRelease(&strip_, Qt::LeftButton, {}, from + QPoint(80, 0));
  EXPECT_EQ(log_.proposals.size(), count);
  EXPECT_EQ(log_.proposals.back().phase, Phase::Abandon);
}

TEST_F(LineStripTest, ArrowKeysWalkThroughTheShots) {
  QTest::keyClick(&strip_, Qt::Key_Right);
  QTest::keyClick(&strip_, Qt::Key_Left);
  QTest::keyClick(&strip_, Qt::Key_End);
  ASSERT_EQ(log_.selections.size(), 3U);
  EXPECT_EQ(log_.selections[0].shot, 2);
  EXPECT_EQ(log_.selections[1].shot, 0);
  EXPECT_EQ(log_.selections[2].shot, 6);
}

TEST_F(LineStripTest, TheWheelZoomsAboutThePointerAndADragPans) {
  const QPointF at = strip_.geophonePlace(10);
  QWheelEvent turn(at, strip_.mapToGlobal(at), {}, {0, 120}, Qt::NoButton, Qt::NoModifier, Qt::NoScrollPhase, false);
  QApplication::sendEvent(&strip_, &turn);
  ASSERT_EQ(log_.ranges.size(), 1U);
  const auto [left, right] = log_.ranges[0];
  EXPECT_NEAR(right - left, 0.8 * wholeLine(*scene_.survey).width(), 1e-9);
  EXPECT_NEAR(64.0 + (20.0 - left) / (right - left) * 800.0, at.x(), 1e-6) << "geophone 11 at 20 m stays put";
  strip_.showPositionRange(40.0, 60.0);
  QTest::mousePress(&strip_, Qt::LeftButton, {}, {400, 4});
  QTest::mouseMove(&strip_, {440, 4});
  QTest::mouseRelease(&strip_, Qt::LeftButton, {}, {440, 4});
  EXPECT_NEAR(log_.ranges.back().first, 39.0, 1e-9) << "40 px of 800 px over 20 m";
}

TEST_F(LineStripTest, AShotOutsideStandsAtTheEdgeAndAClickBringsItIn) {
  strip_.showPositionRange(20.0, 60.0);
  EXPECT_LT(strip_.shotPlace(0).x(), 64.0);
  EXPECT_GT(strip_.shotPlace(0).x(), 0.0);
  QTest::mouseClick(&strip_, Qt::LeftButton, {}, whole(strip_.shotPlace(0)));
  ASSERT_EQ(log_.ranges.size(), 1U);
  EXPECT_LT(log_.ranges[0].first, log_.ranges[0].second);
  ASSERT_EQ(log_.selections.size(), 1U);
  const double x = scene_.survey->shots[static_cast<std::size_t>(log_.selections[0].shot)].point.x;
  EXPECT_TRUE(log_.ranges[0].first < x && x < log_.ranges[0].second);
}

TEST_F(LineStripTest, ThePointerIsFollowedWithNumbers) {
  QTest::mouseMove(&strip_, whole(strip_.shotPlace(2)));
  ASSERT_FALSE(log_.hints.empty());
  EXPECT_EQ(log_.hints.back(), "Shot 3 at 30.0 m: 45 of 48 traces picked, 1 doubt");
  ASSERT_FALSE(log_.plumbLines.empty());
  EXPECT_NEAR(log_.plumbLines.back(), 30.0, 0.1);
  QEvent leave(QEvent::Leave);
  QApplication::sendEvent(&strip_, &leave);
  EXPECT_TRUE(std::isnan(log_.plumbLines.back()));
}

TEST(LineStripContent, ADraggedShotKeepsItsHeightAboveTheGround) {
  Survey survey;
  survey.geophones = {{0.0, 100.0}, {10.0, 105.0}};
  survey.shots.resize(1);
  survey.shots[0].point = {0.0, 100.3, 0.5};
  const ShotPoint point = draggedPoint(survey, 0, 4.02, 0.1, 0.5);
  EXPECT_DOUBLE_EQ(point.x, 4.0);
  EXPECT_DOUBLE_EQ(point.elevation, 102.3) << "5 m up in 10 m";
  EXPECT_DOUBLE_EQ(point.depth, 0.5);
  EXPECT_DOUBLE_EQ(draggedPoint(survey, 0, 9.95, 0.1, 0.5).x, 10.0) << "a geophone close by holds it";
}

TEST(LineStripContent, AnEmptySurveyIsShownWithoutHarm) {
  LineStrip strip;
  Scene scene;
  scene.survey = std::make_shared<Survey>();
  strip.resize(600, 64);
  strip.showScene(scene);
  ViewLog log(strip);
  QTest::mouseClick(&strip, Qt::LeftButton);
  QTest::keyClick(&strip, Qt::Key_Right);
  EXPECT_FALSE(strip.grab().isNull());
  EXPECT_TRUE(log.selections.empty());
}

}  // namespace
}  // namespace strikeplate
