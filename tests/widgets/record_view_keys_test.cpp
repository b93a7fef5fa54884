// Keys and menus of the record view, through the widget.
#include <memory>

#include <QAction>
#include <QMenu>
#include <QSignalSpy>
#include <gtest/gtest.h>

#include "tests/widgets/record_hand.h"
#include "widgets/record_display_menu.h"

using namespace strikeplate;
using namespace strikeplate::testing;

TEST(RecordView, AHeldArrowKeyIsOneEdit) {
  RecordDesk desk(pickedLine(12));
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
  Survey survey = pickedLine(12);
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
  RecordDesk desk(pickedLine(12));
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
  RecordDesk desk(pickedLine(12));
  Hand hand{desk};
  hand.click(desk.at(2, desk.trace(2).pick->time));
  hand.key(Qt::Key_2);
  EXPECT_EQ(desk.trace(2).pick->layer, 2);
  hand.key(Qt::Key_2);
  EXPECT_EQ(desk.edits.size(), 1U) << "what changes nothing is no edit";
  hand.key(Qt::Key_0);
  EXPECT_EQ(desk.trace(2).pick->layer, 0);
}

TEST(RecordView, TheMenuOffersWhatFitsTheTrace) {
  RecordDesk desk(pickedLine(12));
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
  RecordDesk desk(pickedLine(12));
  QMenu menu;
  fillDisplayMenu(menu, desk.view);
  QSignalSpy changed(&desk.view, &RecordView::displayChanged);
  for (QAction* action : menu.actions()) {
    if (action->text() == "Time upwards") {
      action->trigger();
      EXPECT_TRUE(desk.view.display().timeUp);
    } else if (action->text() == "Low cut") {
      QMenu* cuts = action->menu();
      EXPECT_EQ(cuts->actions().at(2)->text(), "10 Hz (first breaks seem 0.31 ms late)");
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
