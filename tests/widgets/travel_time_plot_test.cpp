#include "widgets/travel_time_plot.h"

#include <memory>

#include <QMenu>
#include <QTest>
#include <gtest/gtest.h>
#include <qcustomplot.h>

#include "tests/widgets/table_scene.h"

namespace strikeplate {
namespace {

/// Stands for the desk: applies what the plot proposes and shows it again, live and for good.
class TravelTimePlotTest : public ::testing::Test {
 protected:
  TravelTimePlotTest() {
    survey = testing::twoLayerSurvey();
    scene = testing::sceneOfTimes(survey);
    view.resize(900, 400);
    view.setAxisMargins(64, 18);
    view.showPositionRange(-5.0, 52.0);
    view.showScene(scene);
    view.show();
    QCoreApplication::processEvents();
    QObject::connect(&view, &View::proposed, &view, [this](const Edit& edit, Phase phase) {
      phases.push_back(phase);
      lastEdit = edit;
      if (phase == Phase::Commit) {
        apply(survey, edit);
      }
      scene.survey = std::make_shared<Survey>(phase == Phase::Live ? applied(survey, edit) : survey);
      scene.interpretation = std::make_shared<Interpretation>(interpretLive(*scene.survey, *scene.interpretation));
      view.showScene(scene);
    });
    QObject::connect(&view, &View::selectionWanted, &view, [this](const Selection& s) {
      scene.selection = s;
      view.showSelection(s);
    });
  }

  QWidget* canvas() { return view.findChild<QCustomPlot*>(); }
  QPoint placeOf(int shot, int trace) {
    const auto place = view.placeOf(scene.interpretation->arrivalOf(shot, trace));
    EXPECT_TRUE(place.has_value());
    return place.value_or(QPointF()).toPoint();
  }
  void drag(const QPoint& from, const QPoint& to, bool letGo = true) {
    QTest::mousePress(canvas(), Qt::LeftButton, {}, from);
    for (int step = 1; step <= 10; ++step) {
      QTest::mouseMove(canvas(), from + (to - from) * step / 10);
      QCoreApplication::processEvents();
    }
    if (letGo) {
      QTest::mouseRelease(canvas(), Qt::LeftButton, {}, to);
    }
  }
  int layerOf(int shot, int trace) const {
    return scene.interpretation->times
        .arrivals[static_cast<std::size_t>(scene.interpretation->arrivalOf(shot, trace))]
        .layer;
  }

  Survey survey;
  Scene scene;
  TravelTimePlot view;
  std::vector<Phase> phases;
  Edit lastEdit;
};

TEST_F(TravelTimePlotTest, DraggingABranchEndMovesTheSectionBeforeTheButtonIsLetGo) {
  const double before = scene.interpretation->section.depthAt(2, 10.0).value;
  drag(placeOf(0, 4), placeOf(0, 7), false);
  ASSERT_FALSE(phases.empty());
  EXPECT_EQ(phases.back(), Phase::Live);
  EXPECT_EQ(layerOf(0, 7), 1);
  EXPECT_NE(scene.interpretation->section.depthAt(2, 10.0).value, before);
  EXPECT_EQ(survey.shots[0].traces[7].pick->layer, 0);  // nothing is kept yet
}

TEST_F(TravelTimePlotTest, LettingGoKeepsTheAssignmentAsOneEdit) {
  drag(placeOf(0, 4), placeOf(0, 6));
  EXPECT_EQ(std::count(phases.begin(), phases.end(), Phase::Commit), 1);
  EXPECT_EQ(lastEdit.text, "Move far end of the layer 1 branch, shot 1");
  EXPECT_EQ(survey.shots[0].traces[5].pick->layer, 1);
  EXPECT_EQ(survey.shots[0].traces[6].pick->layer, 1);
  EXPECT_EQ(survey.shots[0].traces[7].pick->layer, 0);
}

TEST_F(TravelTimePlotTest, EscapeLeavesNoTraceOfADrag) {
  const Survey before = survey;
  drag(placeOf(0, 4), placeOf(0, 8), false);
  QTest::keyClick(&view, Qt::Key_Escape);
  QTest::mouseRelease(canvas(), Qt::LeftButton, {}, placeOf(0, 8));
  EXPECT_EQ(phases.back(), Phase::Abandon);
  EXPECT_TRUE(survey == before);
}

TEST_F(TravelTimePlotTest, AClickSelectsThePickUnderThePointer) {
  QTest::mouseClick(canvas(), Qt::LeftButton, {}, placeOf(2, 3));
  EXPECT_EQ(scene.selection.shot, 2);
  EXPECT_EQ(scene.selection.trace, 3);
  EXPECT_TRUE(phases.empty());
}

TEST_F(TravelTimePlotTest, ADragOverEmptyGroundMarksPicksForOneKey) {
  const QPoint corner = placeOf(0, 18) + QPoint(-8, 30);
  const QPoint other = placeOf(0, 20) + QPoint(8, -12);
  TravelTimeDisplay display;
  display.allShots = false;
  view.setDisplay(display);
  drag(corner, other);
  EXPECT_EQ(view.chosen().size(), 3u);
  QTest::keyClick(&view, Qt::Key_3);
  EXPECT_EQ(survey.shots[0].traces[18].pick->layer, 3);
  EXPECT_EQ(survey.shots[0].traces[20].pick->layer, 3);
  QTest::keyClick(&view, Qt::Key_0);
  EXPECT_EQ(survey.shots[0].traces[19].pick->layer, 0);
}

TEST_F(TravelTimePlotTest, KeysAloneWalkTheCurveMarkAndAssign) {
  QTest::keyClick(&view, Qt::Key_PageDown);
  EXPECT_EQ(scene.selection.shot, 1);
  QTest::keyClick(&view, Qt::Key_Right);
  QTest::keyClick(&view, Qt::Key_Right, Qt::ShiftModifier);
  QTest::keyClick(&view, Qt::Key_Right, Qt::ShiftModifier);
  EXPECT_EQ(view.chosen().size(), 3u);
  QTest::keyClick(&view, Qt::Key_2);
  for (int trace = 0; trace < 3; ++trace) {
    EXPECT_EQ(survey.shots[1].traces[static_cast<std::size_t>(trace)].pick->layer, 2) << trace;
  }
}

TEST_F(TravelTimePlotTest, DeleteTakesTheChosenPickAway) {
  QTest::mouseClick(canvas(), Qt::LeftButton, {}, placeOf(0, 12));
  QTest::keyClick(&view, Qt::Key_Delete);
  EXPECT_FALSE(survey.shots[0].traces[12].pick.has_value());
}

TEST_F(TravelTimePlotTest, ResidualsStandNearNothingWhereTheSectionFits) {
  TravelTimeDisplay display;
  display.residuals = true;
  for (std::size_t i = 0; i < scene.interpretation->times.arrivals.size(); ++i) {
    EXPECT_NEAR(shownTime(*scene.interpretation, static_cast<int>(i), display), 0.0, 0.3);
  }
}

TEST_F(TravelTimePlotTest, ReducedTimeLaysTheRefractorLevel) {
  TravelTimeDisplay display;
  display.reductionVelocity = 2000.0;
  const double near = shownTime(*scene.interpretation, scene.interpretation->arrivalOf(0, 8), display);
  const double far = shownTime(*scene.interpretation, scene.interpretation->arrivalOf(0, 23), display);
  EXPECT_NEAR(near, far, 1e-6);
}

TEST_F(TravelTimePlotTest, ALassoMarksOnlyWhatItsLineSurrounds) {
  TravelTimeDisplay display;
  display.allShots = false;
  view.setDisplay(display);
  const QPoint a = placeOf(0, 18), c = placeOf(0, 20);
  const QList<QPoint> around = {a + QPoint(-8, -14), c + QPoint(8, -14), c + QPoint(8, 14), c + QPoint(-6, 14),
                                c + QPoint(-6, -10), a + QPoint(6, -10), a + QPoint(6, 14), a + QPoint(-8, 14)};
  QTest::mousePress(canvas(), Qt::LeftButton, Qt::AltModifier, around.front() - QPoint(4, 8));
  for (const QPoint& corner : around) {
    QTest::mouseMove(canvas(), corner);
  }
  QTest::mouseRelease(canvas(), Qt::LeftButton, Qt::AltModifier, around.back());
  EXPECT_EQ(view.chosen(), (std::vector<TraceOfShot>{{0, 18}, {0, 20}}));
}

TEST_F(TravelTimePlotTest, KeysSplitMergeAndDissolveTheBranchOfTheSelectedPick) {
  QTest::mouseClick(canvas(), Qt::LeftButton, {}, placeOf(0, 15));
  QTest::keyClick(&view, Qt::Key_S);
  EXPECT_EQ(lastEdit.text, "Split the layer 2 branch, shot 1");
  EXPECT_EQ(survey.shots[0].traces[15].pick->layer, 3);
  EXPECT_EQ(survey.shots[0].traces[23].pick->layer, 3);
  QTest::keyClick(&view, Qt::Key_D);
  EXPECT_EQ(lastEdit.text, "Dissolve the layer 3 branch, shot 1");
  EXPECT_EQ(survey.shots[0].traces[15].pick->layer, 0);
}

TEST_F(TravelTimePlotTest, AltWithAnArrowSlidesTheBranchEnd) {
  QTest::mouseClick(canvas(), Qt::LeftButton, {}, placeOf(0, 3));
  const int end = layerOf(0, 4) == 1 ? 4 : 3;
  QTest::keyClick(&view, Qt::Key_Right, Qt::AltModifier);
  EXPECT_EQ(lastEdit.text, "Move far end of the layer 1 branch, shot 1");
  EXPECT_EQ(survey.shots[0].traces[static_cast<std::size_t>(end) + 1].pick->layer, 1);
}

TEST_F(TravelTimePlotTest, ShotsKeptInViewCanBeTakenHoldOfBesideTheSelectedOne) {
  QTest::keyClick(&view, Qt::Key_K);
  TravelTimeDisplay display = view.display();
  EXPECT_TRUE(display.kept.contains(0));
  display.allShots = false;
  view.setDisplay(display);
  scene.selection = {1, -1, 0};
  view.showSelection(scene.selection);
  QTest::mouseClick(canvas(), Qt::LeftButton, {}, placeOf(2, 3));
  EXPECT_NE(scene.selection.shot, 2) << "a shot out of view";
  QTest::mouseClick(canvas(), Qt::LeftButton, {}, placeOf(0, 20));
  EXPECT_EQ(scene.selection.shot, 0);
}

TEST_F(TravelTimePlotTest, TheMenuOffersWhatFitsThePick) {
  const auto offered = [this](int trace) {
    QTest::mousePress(canvas(), Qt::RightButton, {}, placeOf(0, trace));
    QCoreApplication::processEvents();
    QString texts;
    if (auto* menu = view.findChild<QMenu*>()) {
      for (const QAction* action : menu->actions()) {
        texts += action->text() + "\n";
      }
      menu->close();
      QCoreApplication::sendPostedEvents(nullptr, QEvent::DeferredDelete);
    }
    return texts;
  };
  const QString direct = offered(2);
  EXPECT_TRUE(direct.contains("Merge")) << direct.toStdString();
  EXPECT_FALSE(direct.contains("Dissolve"));
  EXPECT_TRUE(direct.contains("Critical distance of shot 1"));
  const QString head = offered(18);
  EXPECT_FALSE(head.contains("Merge")) << "no branch lies beyond";
  EXPECT_TRUE(head.contains("Split"));
}

}  // namespace
}  // namespace strikeplate
