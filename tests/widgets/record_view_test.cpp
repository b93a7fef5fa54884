// Pointer gestures as a person's, through the widget.
#include <cmath>

#include <gtest/gtest.h>

#include "core/survey/survey_file.h"
#include "tests/widgets/record_hand.h"

using namespace strikeplate;
using namespace strikeplate::testing;

TEST(RecordView, AClickPicksAtTheOnsetAndWithAltExactlyThere) {
  RecordDesk desk(sharpLine(24));
  Hand hand{desk};
  hand.click(desk.at(5, onsetOf(desk, 5) + 0.001));
  ASSERT_EQ(desk.edits.size(), 1U);
  EXPECT_NEAR(desk.trace(5).pick->time, onsetOf(desk, 5), 2 * kInterval);
  EXPECT_EQ(desk.scene.selection.trace, 5);
  const QPoint free = desk.at(9, 0.0401);
  hand.click(free, Qt::AltModifier);
  EXPECT_NEAR(desk.trace(9).pick->time, desk.view.axes().timeAt(9, free.y()), 1e-9);
}

TEST(RecordView, ADragShowsEveryStepAndIsOneEdit) {
  RecordDesk desk(pickedLine(24));
  Hand hand{desk};
  const QPoint from = desk.at(5, desk.trace(5).pick->time);
  hand.drag({from, from + QPoint(0, 10), from + QPoint(0, 20), from + QPoint(0, 31)}, Qt::AltModifier);
  EXPECT_GE(desk.live, 3);
  ASSERT_EQ(desk.edits.size(), 1U);
  EXPECT_EQ(desk.edits[0].text, "Move pick, shot 1, trace 6");
  EXPECT_NEAR(desk.trace(5).pick->time, onsetOf(desk, 5) + 31 * desk.view.axes().secondsPerPixel(), 1e-9);
  EXPECT_EQ(desk.trace(5).pick->origin, PickOrigin::Hand);
}

TEST(RecordView, ARecordIsPickedByOneStrokeAndThreeCorrectionsAndComesBackFromItsFile) {
  const Survey survey = sharpLine(24);
  RecordDesk desk(survey);
  Hand hand{desk};
  std::vector<QPoint> way;
  for (int t = 0; t < 24; ++t) {
    // At three traces the hand goes astray.
    const bool astray = t == 6 || t == 13 || t == 20;
    way.push_back(desk.at(t, onsetOf(desk, t) + (astray ? 0.014 : 0.001)));
  }
  hand.drag(way);
  for (const int t : {6, 13, 20}) {
    ASSERT_TRUE(desk.trace(t).pick);
    const QPoint wrong = desk.at(t, desk.trace(t).pick->time);
    const QPoint right = desk.at(t, onsetOf(desk, t));
    hand.drag({wrong, (wrong + right) / 2, right});
  }
  EXPECT_LE(hand.gestures, 6);
  EXPECT_EQ(desk.edits.size(), 4U);
  for (int t = 0; t < 24; ++t) {
    ASSERT_TRUE(desk.trace(t).pick) << t;
    EXPECT_NEAR(desk.trace(t).pick->time, onsetOf(desk, t), 2 * kInterval) << t;
    EXPECT_GT(desk.trace(t).pick->sigma, 0.0);
  }
  const std::string path = ::testing::TempDir() + "record_view_test.splate";
  std::remove(path.c_str());
  {
    auto file = SurveyFile::create(path, survey);
    ASSERT_TRUE(file) << file.message();
    for (const Edit& edit : desk.edits) {
      ASSERT_TRUE(file->append(edit));
    }
    for (std::size_t i = 0; i < desk.edits.size(); ++i) {
      ASSERT_TRUE(file->undo());
    }
    EXPECT_FALSE(file->survey().shots[0].traces[3].pick);
  }
  auto again = SurveyFile::open(path);
  ASSERT_TRUE(again) << again.message();
  while (again->history().canRedo()) {
    ASSERT_TRUE(again->redo());
  }
  EXPECT_EQ(again->survey().shots, desk.committed->shots);
}

TEST(RecordView, EscapeAbandonsEveryGestureWithoutTrace) {
  const Survey survey = pickedLine(24);
  RecordDesk desk(survey);
  Hand hand{desk};
  desk.scene.selection.trace = 3;
  desk.view.showSelection(desk.scene.selection);
  const QPoint pick = desk.at(5, desk.trace(5).pick->time);
  const std::vector<std::vector<QPoint>> ways = {{pick, pick + QPoint(0, 25)},
                                                 {pick + QPoint(0, 40), pick + QPoint(0, 60)},
                                                 {pick + QPoint(0, 40), desk.at(12, 0.05), desk.at(18, 0.06)}};
  for (const auto& way : ways) {
    hand.drag(way, Qt::NoModifier, false);
    EXPECT_NE(*desk.scene.survey, survey);
    hand.key(Qt::Key_Escape);
    EXPECT_EQ(*desk.scene.survey, survey);
    EXPECT_EQ(desk.scene.selection.trace, 3);
    QTest::mouseRelease(&desk.view, Qt::LeftButton, Qt::NoModifier, way.back());
    EXPECT_EQ(*desk.scene.survey, survey);
  }
  EXPECT_TRUE(desk.edits.empty());
  EXPECT_EQ(desk.abandoned, 3);
}

TEST(RecordView, TheSigmaBracketIsDragged) {
  Survey survey = pickedLine(12);
  survey.shots[0].traces[5].pick->sigma = 0.002;
  RecordDesk desk(survey);
  Hand hand{desk};
  hand.click(desk.at(5, desk.trace(5).pick->time));
  EXPECT_TRUE(desk.edits.empty());
  const double y = desk.view.axes().yOf(5, desk.trace(5).pick->time + 0.002);
  const QPoint end = QPointF(bracketX(desk.view.axes(), 5), y).toPoint();
  hand.drag({end, end + QPoint(0, 6), end + QPoint(0, 15)});
  ASSERT_EQ(desk.edits.size(), 1U);
  EXPECT_NEAR(desk.trace(5).pick->sigma, 0.002 + 15 * desk.view.axes().secondsPerPixel(), 1e-9);
  hand.key(Qt::Key_Comma);
  EXPECT_NEAR(desk.trace(5).pick->sigma, (0.002 + 15 * desk.view.axes().secondsPerPixel()) / 1.1, 1e-9);
}

TEST(RecordView, AClickOnADeadTraceSaysWhyNothingHappens) {
  Survey survey = sharpLine(12);
  survey.shots[0].traces[4].state = TraceState::Dead;
  RecordDesk desk(survey);
  Hand{desk}.click(desk.at(4, 0.03));
  EXPECT_TRUE(desk.edits.empty());
  EXPECT_TRUE(desk.hint.contains("dead"));
}

TEST(RecordView, TimesWithoutARecordAreShownAndMoved) {
  Survey survey = pickedLine(12);
  survey.records.clear();
  for (Shot& shot : survey.shots) {
    shot.blows.clear();
  }
  RecordDesk desk(survey);
  Hand hand{desk};
  const double before = desk.trace(5).pick->time;
  const QPoint from = desk.at(5, before);
  hand.drag({from, from + QPoint(0, 20)});
  ASSERT_EQ(desk.edits.size(), 1U);
  EXPECT_NEAR(desk.trace(5).pick->time, before + 20 * desk.view.axes().secondsPerPixel(), 1e-9);
  EXPECT_FALSE(desk.view.grab().isNull());
}

TEST(RecordView, AGestureWhoseReleaseWasLostIsAbandoned) {
  RecordDesk desk(pickedLine(24));
  Hand hand{desk};
  const QPoint from = desk.at(5, desk.trace(5).pick->time);
  hand.drag({from, from + QPoint(0, 30)}, Qt::NoModifier, false);
  hand.move(from + QPoint(0, 50), Qt::NoModifier, Qt::NoButton);
  EXPECT_EQ(desk.abandoned, 1);
  EXPECT_NEAR(desk.trace(5).pick->time, onsetOf(desk, 5), 1e-12);
}
