// Pointer and keys as a person's, through the widget.
#include <cmath>

#include <QAction>
#include <QMenu>
#include <QSignalSpy>
#include <QTest>
#include <QWheelEvent>
#include <gtest/gtest.h>

#include "core/survey/survey_file.h"
#include "tests/widgets/record_desk.h"
#include "tests/widgets/record_scene.h"
#include "widgets/record_display_menu.h"

using namespace strikeplate;
using namespace strikeplate::testing;

namespace {

Survey picked(int geophones) {
  Survey survey = sharpLine(geophones);
  for (Shot& shot : survey.shots) {
    for (ShotTrace& trace : shot.traces) {
      const double x = survey.geophones[static_cast<std::size_t>(trace.geophone)].x;
      trace.pick = Pick{onsetAt(std::abs(x - shot.point.x)), 5e-4, 0, PickOrigin::Automatic};
    }
  }
  return survey;
}

struct Hand {
  RecordDesk& desk;
  int gestures = 0;

  void drag(const std::vector<QPoint>& way, Qt::KeyboardModifiers modifiers = Qt::NoModifier, bool release = true) {
    ++gestures;
    QTest::mousePress(&desk.view, Qt::LeftButton, modifiers, way.front());
    for (std::size_t i = 1; i < way.size(); ++i) {
      move(way[i], modifiers);
    }
    if (release) {
      QTest::mouseRelease(&desk.view, Qt::LeftButton, modifiers, way.back());
    }
  }
  /// QTest::mouseMove holds no button.
  void move(const QPoint& to, Qt::KeyboardModifiers modifiers = Qt::NoModifier,
            Qt::MouseButton with = Qt::LeftButton) {
    QMouseEvent event(QEvent::MouseMove, to, desk.view.mapToGlobal(to), Qt::NoButton, with, modifiers);
    QApplication::sendEvent(&desk.view, &event);
  }
  void click(const QPoint& at, Qt::KeyboardModifiers modifiers = Qt::NoModifier) {
    ++gestures;
    QTest::mouseClick(&desk.view, Qt::LeftButton, modifiers, at);
  }
  void key(Qt::Key key, Qt::KeyboardModifiers modifiers = Qt::NoModifier) {
    QTest::keyClick(&desk.view, key, modifiers);
  }
  void wheel(const QPointF& at, const QPoint& turn, Qt::KeyboardModifiers modifiers = Qt::NoModifier) {
    QWheelEvent event(at, desk.view.mapToGlobal(at), {}, turn, Qt::NoButton, modifiers, Qt::NoScrollPhase, false);
    QApplication::sendEvent(&desk.view, &event);
  }
};

double onsetOf(const RecordDesk& desk, int t) {
  return onsetAt(desk.gather().offset(static_cast<std::size_t>(t)));
}

}  // namespace

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
  RecordDesk desk(picked(24));
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
  const Survey survey = picked(24);
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
  Survey survey = picked(12);
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

TEST(RecordView, AHeldArrowKeyIsOneEdit) {
  RecordDesk desk(picked(12));
  Hand hand{desk};
  hand.key(Qt::Key_Right);
  EXPECT_EQ(desk.scene.selection.trace, 0);
  const double before = desk.trace(0).pick->time;
  QTest::keyPress(&desk.view, Qt::Key_Down);
  for (int i = 0; i < 4; ++i) {
    QKeyEvent repeat(QEvent::KeyPress, Qt::Key_Down, Qt::NoModifier, {}, true);
    QApplication::sendEvent(&desk.view, &repeat);
  }
  EXPECT_TRUE(desk.edits.empty());
  EXPECT_NEAR(desk.trace(0).pick->time, before + 5 * kInterval, 1e-12);
  QTest::keyRelease(&desk.view, Qt::Key_Down);
  ASSERT_EQ(desk.edits.size(), 1U);
  hand.key(Qt::Key_Up, Qt::ShiftModifier);
  EXPECT_NEAR(desk.trace(0).pick->time, before - 5 * kInterval, 1e-12);
  QTest::keyPress(&desk.view, Qt::Key_Down);
  hand.key(Qt::Key_Escape);
  QTest::keyRelease(&desk.view, Qt::Key_Down);
  EXPECT_NEAR(desk.trace(0).pick->time, before - 5 * kInterval, 1e-12);
  EXPECT_EQ(desk.edits.size(), 2U);
}

TEST(RecordView, KeysWalkThroughTracesShotsAndDoubts) {
  Survey survey = picked(12);
  survey.shots[0].traces[4].pick.reset();
  RecordDesk desk(survey);
  Hand hand{desk};
  hand.key(Qt::Key_N);
  EXPECT_EQ(desk.scene.selection.trace, 4);
  hand.key(Qt::Key_Space);
  EXPECT_NEAR(desk.trace(4).pick->time, onsetOf(desk, 4), 2 * kInterval);
  hand.key(Qt::Key_N);
  EXPECT_EQ(desk.scene.selection.trace, 4);
  EXPECT_FALSE(desk.hint.isEmpty());
  hand.key(Qt::Key_End);
  EXPECT_EQ(desk.scene.selection.trace, 11);
  hand.key(Qt::Key_Home);
  EXPECT_EQ(desk.scene.selection.trace, 0);
  hand.key(Qt::Key_PageDown);
  EXPECT_EQ(desk.scene.selection.shot, 1);
  hand.key(Qt::Key_PageUp);
  EXPECT_EQ(desk.scene.selection.shot, 0);
  Interpretation interpretation;
  Doubt doubt;
  doubt.shot = 1;
  doubt.trace = 7;
  interpretation.doubts.push_back(doubt);
  desk.showInterpretation(interpretation);
  hand.key(Qt::Key_D);
  EXPECT_EQ(desk.scene.selection, (Selection{1, 7, 0}));
}

TEST(RecordView, DeleteTakesThePickOrThoseOfTheTracesMarked) {
  RecordDesk desk(picked(12));
  Hand hand{desk};
  hand.click(desk.at(2, desk.trace(2).pick->time));
  hand.key(Qt::Key_Delete);
  EXPECT_FALSE(desk.trace(2).pick);
  hand.click(desk.at(6, desk.trace(6).pick->time));
  hand.click(desk.at(9, 0.04), Qt::ShiftModifier);
  EXPECT_EQ(desk.view.marked(), std::pair(6, 9));
  hand.key(Qt::Key_Left, Qt::ShiftModifier);
  EXPECT_EQ(desk.view.marked(), std::pair(6, 8));
  hand.key(Qt::Key_Delete);
  EXPECT_TRUE(desk.trace(5).pick && desk.trace(9).pick);
  EXPECT_FALSE(desk.trace(6).pick || desk.trace(7).pick || desk.trace(8).pick);
  EXPECT_EQ(desk.edits.size(), 2U);
  hand.key(Qt::Key_Escape);
  EXPECT_EQ(desk.view.marked().first, -1);
}

TEST(RecordView, DigitsGiveThePickToALayer) {
  RecordDesk desk(picked(12));
  Hand hand{desk};
  hand.click(desk.at(2, desk.trace(2).pick->time));
  hand.key(Qt::Key_2);
  EXPECT_EQ(desk.trace(2).pick->layer, 2);
  hand.key(Qt::Key_2);
  EXPECT_EQ(desk.edits.size(), 1U) << "what changes nothing is no edit";
  hand.key(Qt::Key_0);
  EXPECT_EQ(desk.trace(2).pick->layer, 0);
}

TEST(RecordView, WheelAndKeysZoomAboutThePointerAndZComesHome) {
  RecordDesk desk(picked(24));
  Hand hand{desk};
  const RecordRange home = desk.view.range();
  const QPointF at(300.0, 200.0);
  const double time = desk.view.axes().shownAt(at.y()), place = desk.view.axes().placeAt(at.x());
  hand.wheel(at, {0, 240});
  EXPECT_LT(desk.view.range().last - desk.view.range().first, 0.8 * (home.last - home.first));
  EXPECT_NEAR(desk.view.axes().shownAt(at.y()), time, 1e-6);
  EXPECT_EQ(desk.view.range().right, home.right);
  hand.wheel(at, {0, 240}, Qt::ControlModifier);
  EXPECT_NEAR(desk.view.axes().placeAt(at.x()), place, 1e-6);
  EXPECT_LT(desk.view.range().right - desk.view.range().left, 20.0);
  hand.key(Qt::Key_Z);
  EXPECT_EQ(desk.view.range(), home);
  hand.key(Qt::Key_Plus);
  EXPECT_LT(desk.view.range().last - desk.view.range().first, home.last - home.first);
  QTest::mouseDClick(&desk.view, Qt::LeftButton, Qt::NoModifier, QPoint(10, 200));
  EXPECT_EQ(desk.view.range(), home);
  hand.key(Qt::Key_A);
  EXPECT_GT(desk.view.range().last, 0.115);
}

TEST(RecordView, TheMiddleButtonMovesWhatIsShown) {
  RecordDesk desk(picked(24));
  Hand hand{desk};
  hand.key(Qt::Key_Plus);
  hand.key(Qt::Key_Plus);
  const double time = desk.view.axes().shownAt(250.0);
  QTest::mousePress(&desk.view, Qt::MiddleButton, Qt::NoModifier, QPoint(300, 250));
  hand.move(QPoint(300, 230), Qt::NoModifier, Qt::MiddleButton);
  QTest::mouseRelease(&desk.view, Qt::MiddleButton, Qt::NoModifier, QPoint(300, 230));
  EXPECT_NEAR(desk.view.axes().shownAt(230.0), time, 1e-6);
  EXPECT_TRUE(desk.edits.empty());
}

TEST(RecordView, AtTruePositionTheAxisIsSharedWithTheOtherPanes) {
  RecordDesk desk(picked(24));
  Hand hand{desk};
  RecordDisplay display;
  display.truePosition = true;
  desk.view.setDisplay(display);
  desk.view.showPositionRange(-20.0, 80.0);
  EXPECT_EQ(desk.view.range().left, -20.0);
  EXPECT_EQ(desk.view.range().right, 80.0);
  QSignalSpy wanted(&desk.view, &View::positionRangeWanted);
  hand.wheel({300.0, 200.0}, {0, 120});
  EXPECT_EQ(wanted.count(), 0);
  hand.wheel({300.0, 200.0}, {0, 120}, Qt::ControlModifier);
  ASSERT_EQ(wanted.count(), 1);
  EXPECT_EQ(wanted[0][0].toDouble(), desk.view.range().left);
  EXPECT_NEAR(wanted[0][1].toDouble() - wanted[0][0].toDouble(), 100.0 / 1.2, 1e-9);
}

TEST(RecordView, HoverSaysWhatIsThereAndLeadsThePlumbLine) {
  Survey survey = picked(24);
  RecordDesk desk(survey);
  Hand hand{desk};
  hand.move(desk.at(10, 0.04), Qt::NoModifier, Qt::NoButton);
  EXPECT_NEAR(desk.plumbLine, 20.0, 1e-9);
  for (const char* part : {"Shot 1", "trace 11", "20.0 m", "25.0 m", "29.00", "0.50 ms", "automatic"}) {
    EXPECT_TRUE(desk.hint.contains(part)) << part << " in " << desk.hint.toStdString();
  }
  QEvent leave(QEvent::Leave);
  QApplication::sendEvent(&desk.view, &leave);
  EXPECT_TRUE(std::isnan(desk.plumbLine));
}

TEST(RecordView, AnAbandonedDragLeavesThePictureAsItWas) {
  RecordDesk desk(picked(24));
  Hand hand{desk};
  const QImage before = desk.view.grab().toImage();
  const QPoint from = desk.at(5, desk.trace(5).pick->time);
  hand.drag({from, from + QPoint(0, 60)}, Qt::AltModifier, false);
  EXPECT_NE(desk.view.grab().toImage(), before);
  hand.key(Qt::Key_Escape);
  QTest::mouseRelease(&desk.view, Qt::LeftButton, Qt::NoModifier, from);
  QEvent leave(QEvent::Leave);
  QApplication::sendEvent(&desk.view, &leave);
  EXPECT_EQ(desk.view.grab().toImage(), before);
}

TEST(RecordView, TheMenuOffersWhatFitsTheTrace) {
  RecordDesk desk(picked(12));
  const auto find = [](QMenu* menu, const QString& text) -> QAction* {
    for (QAction* action : menu->actions()) {
      if (action->text().startsWith(text)) {
        return action;
      }
    }
    return nullptr;
  };
  desk.scene.selection.trace = 4;
  desk.view.showSelection(desk.scene.selection);
  std::unique_ptr<QMenu> menu(desk.view.makeMenu(4));
  ASSERT_TRUE(find(menu.get(), "Delete pick"));
  ASSERT_TRUE(find(menu.get(), "Trace is dead"));
  find(menu.get(), "Trace is dead")->trigger();
  EXPECT_EQ(desk.trace(4).state, TraceState::Dead);
  find(menu.get(), "Delete pick")->trigger();
  EXPECT_FALSE(desk.trace(4).pick);
  menu.reset(desk.view.makeMenu(4));
  EXPECT_FALSE(find(menu.get(), "Delete pick"));
  QSignalSpy wanted(&desk.view, &RecordView::pickShotWanted);
  find(menu.get(), "Pick this shot")->trigger();
  EXPECT_EQ(wanted.count(), 1);
}

TEST(RecordView, AClickOnADeadTraceSaysWhyNothingHappens) {
  Survey survey = sharpLine(12);
  survey.shots[0].traces[4].state = TraceState::Dead;
  RecordDesk desk(survey);
  Hand{desk}.click(desk.at(4, 0.03));
  EXPECT_TRUE(desk.edits.empty());
  EXPECT_TRUE(desk.hint.contains("dead"));
}

TEST(RecordView, EveryDisplayIsPaintedAtEverySize) {
  RecordDesk desk(picked(24));
  for (const QSize& size : {QSize(320, 240), QSize(1400, 900)}) {
    desk.view.resize(size);
    for (const auto style : {TraceStyle::Wiggle, TraceStyle::Area, TraceStyle::WiggleAndArea, TraceStyle::Density}) {
      RecordDisplay display;
      display.style = style;
      display.timeUp = style == TraceStyle::Area;
      display.truePosition = style == TraceStyle::Density;
      display.agcWindow = style == TraceStyle::Wiggle ? 0.05 : 0.0;
      display.magnifier = true;
      desk.view.setDisplay(display);
      const QImage image = desk.view.grab().toImage();
      EXPECT_EQ(image.size(), size * image.devicePixelRatio());
      int ink = 0;
      for (int x = 60; x < image.width() - 20; ++x) {
        ink += qGray(image.pixel(x, image.height() / 2)) < 128 ? 1 : 0;
      }
      EXPECT_GT(ink, 10) << "style " << static_cast<int>(style) << " at " << size.width();
    }
  }
}

TEST(RecordView, TimesWithoutARecordAreShownAndMoved) {
  Survey survey = picked(12);
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

TEST(RecordView, WithoutAnythingItSaysWhatToDo) {
  RecordView view;
  EXPECT_FALSE(view.grab().isNull());
  for (const RecordKey& key : recordKeys()) {
    view.perform(key.command);
  }
  QTest::mouseClick(&view, Qt::LeftButton);
  QTest::keyClick(&view, Qt::Key_Down);
  SUCCEED();
}

TEST(RecordView, TheDisplayMenuSetsAndShowsHowRecordsAreDrawn) {
  RecordDesk desk(picked(12));
  QMenu menu;
  fillDisplayMenu(menu, desk.view);
  QSignalSpy changed(&desk.view, &RecordView::displayChanged);
  for (QAction* action : menu.actions()) {
    if (action->text() == "Time upwards") {
      action->trigger();
      EXPECT_TRUE(desk.view.display().timeUp);
    } else if (action->text() == "Low cut") {
      QMenu* cuts = action->menu();
      cuts->actions().at(2)->trigger();
      EXPECT_EQ(desk.view.display().lowCut, 10.0);
      emit cuts->aboutToShow();
      EXPECT_TRUE(cuts->actions().at(2)->isChecked());
      EXPECT_FALSE(cuts->actions().at(0)->isChecked());
    } else if (action->text() == "Reduced time") {
      emit action->menu()->aboutToShow();
      EXPECT_EQ(action->menu()->actions().at(2)->text(), "At 1000 m/s");
    }
  }
  EXPECT_EQ(changed.count(), 2);
}
