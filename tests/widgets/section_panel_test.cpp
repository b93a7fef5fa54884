#include "widgets/section_panel.h"

#include <cmath>

#include <QApplication>
#include <QLabel>
#include <QLineEdit>
#include <QTabWidget>
#include <QTableWidget>
#include <QTest>
#include <QTreeWidget>
#include <gtest/gtest.h>
#include <qcustomplot.h>

#include "tests/core/report/sheet_sample.h"
#include "tests/widgets/view_log.h"
#include "widgets/layer_table.h"
#include "widgets/opinions_view.h"
#include "widgets/section_plot.h"

namespace strikeplate {
namespace {

using testing::ViewLog;

class SectionPanelTest : public ::testing::Test {
 protected:
  void SetUp() override {
    sample_ = testing::sheetSample();
    panel_.setAxisMargins(64, 18);
    panel_.resize(882, 560);
    panel_.show();
    showSample();
  }

  void showSample() {
    Scene scene;
    scene.survey = std::make_shared<Survey>(sample_.survey);
    scene.interpretation = std::make_shared<Interpretation>(sample_.interpretation);
    scene.gathers = std::make_shared<std::vector<Gather>>();
    scene.selection = {1, 4, 2};
    const PositionRange range = wholeLine(*scene.survey);
    panel_.showPositionRange(range.left, range.right);
    panel_.showScene(scene);
    QApplication::processEvents();
  }

  [[nodiscard]] QWidget* canvas() const { return panel_.plot().findChild<QCustomPlot*>(); }
  [[nodiscard]] double depth(int layer, double x) const {
    return sample_.interpretation.section.depthAt(layer, x).value;
  }
  /// A point of the plot under x at that depth.
  [[nodiscard]] QPoint at(double x, double below) const {
    return panel_.plot().placeOf(x, testing::sampleGround(x) - below).toPoint();
  }
  [[nodiscard]] QString cell(int row, int column) const {
    return panel_.findChild<QTableWidget*>()->item(row, column)->text();
  }

  testing::SheetSample sample_;
  SectionPanel panel_;
  ViewLog log_{panel_};
};

TEST_F(SectionPanelTest, ThePlotSharesThePositionAxisOfTheStrip) {
  panel_.showPositionRange(0.0, 100.0);
  EXPECT_NEAR(panel_.plot().placeOf(0.0, 100.0).x(), 64.0, 0.01);
  EXPECT_NEAR(panel_.plot().placeOf(100.0, 100.0).x(), 882.0 - 18.0, 0.01);
}

TEST_F(SectionPanelTest, ThePlotHasMostOfTheRoom) {
  EXPECT_GT(panel_.plot().height(), 2 * panel_.tabs().height());
}

TEST_F(SectionPanelTest, HoverOnAnInterfaceSaysItsDepthWithTheInterval) {
  QTest::mouseMove(canvas(), at(46.0, depth(2, 46.0)));
  ASSERT_FALSE(log_.plumbLines.empty());
  EXPECT_NEAR(log_.plumbLines.back(), 46.0, 0.1);
  ASSERT_FALSE(log_.hints.empty());
  EXPECT_TRUE(log_.hints.back().startsWith("Top of layer 2 under ")) << log_.hints.back().toStdString();
  EXPECT_TRUE(log_.hints.back().contains(" to ")) << log_.hints.back().toStdString();
  QEvent leave(QEvent::Leave);
  QApplication::sendEvent(canvas(), &leave);
  EXPECT_TRUE(std::isnan(log_.plumbLines.back()));
}

TEST_F(SectionPanelTest, HoverOnABoreholeComparesItWithTheSection) {
  const Borehole& hole = sample_.survey.boreholes[0];
  QTest::mouseMove(canvas(), at(hole.x, 0.6 * hole.depth));
  EXPECT_TRUE(log_.hints.back().startsWith("Borehole BH-1 at 13.0 m: top of layer 2 met at "))
      << log_.hints.back().toStdString();
}

TEST_F(SectionPanelTest, AClickInALayerSelectsIt) {
  QTest::mouseClick(canvas(), Qt::LeftButton, {}, at(60.0, 0.5 * (depth(2, 60.0) + depth(3, 60.0))));
  ASSERT_EQ(log_.selections.size(), 1U);
  EXPECT_EQ(log_.selections[0], (Selection{1, 4, 2}));
  QTest::mouseClick(canvas(), Qt::LeftButton, {}, at(60.0, depth(3, 60.0)));
  EXPECT_EQ(log_.selections.back().layer, 3);
}

TEST_F(SectionPanelTest, ADragPansAndIsNoClick) {
  panel_.showPositionRange(40.0, 60.0);
  QApplication::processEvents();
  const QPoint from = at(50.0, 1.0);
  QTest::mousePress(canvas(), Qt::LeftButton, {}, from);
  QTest::mouseMove(canvas(), from + QPoint(80, 0));
  QTest::mouseRelease(canvas(), Qt::LeftButton, {}, from + QPoint(80, 0));
  ASSERT_FALSE(log_.ranges.empty());
  EXPECT_NEAR(log_.ranges.back().first, 38.0, 1e-6) << "80 px of 800 px over 20 m";
  EXPECT_TRUE(log_.selections.empty());
}

TEST_F(SectionPanelTest, PlusMinusAndHomeZoomFromTheKeyboard) {
  QTest::keyClick(&panel_.plot(), Qt::Key_Plus);
  ASSERT_EQ(log_.ranges.size(), 1U);
  const PositionRange whole = wholeLine(sample_.survey);
  EXPECT_NEAR(log_.ranges[0].second - log_.ranges[0].first, 0.8 * whole.width(), 1e-9);
  QTest::keyClick(&panel_.plot(), Qt::Key_Home);
  EXPECT_EQ(log_.ranges.back(), std::pair(whole.left, whole.right));
}

TEST_F(SectionPanelTest, TheLayerTableHasVelocitiesAndDepthsWithIntervals) {
  EXPECT_EQ(cell(0, 1), "420 m/s (404 to 436)") << "2 % sigma in the sample";
  EXPECT_EQ(cell(0, 2), "the ground");
  panel_.showPlumbLine(46.0);
  const Estimate under = sample_.interpretation.section.depthAt(3, 46.0);
  const Units units;
  EXPECT_EQ(cell(2, 5).toStdString(),
            units.length(under.value) + " (" + units.lengthRange(under.low95, under.high95) + ")");
  EXPECT_EQ(panel_.findChild<QTableWidget*>()->horizontalHeaderItem(5)->text(), "Under 46.0 m (95 %)");
  EXPECT_EQ(cell(1, 6), "0.6\u00b0 (0.2 to 1.0)");
}

TEST_F(SectionPanelTest, AClickInTheTableSelectsTheLayer) {
  auto* table = panel_.findChild<QTableWidget*>();
  QTest::mouseClick(table->viewport(), Qt::LeftButton, {}, table->visualItemRect(table->item(2, 1)).center());
  ASSERT_EQ(log_.selections.size(), 1U);
  EXPECT_EQ(log_.selections[0].layer, 3);
}

TEST_F(SectionPanelTest, TheSecondOpinionsAreSummedUpInWords) {
  panel_.showPlumbLine(47.0);
  panel_.tabs().setCurrentIndex(1);
  auto* view = panel_.findChild<OpinionsView*>();
  const QString words = view->headWords();
  EXPECT_TRUE(words.startsWith("Layer 2 under 47.0 m: section ")) << words.toStdString();
  EXPECT_TRUE(words.contains("Others (4): weighted mean ")) << words.toStdString();
  EXPECT_TRUE(words.contains("\u00b1")) << words.toStdString();
  EXPECT_EQ(view->findChild<QLabel*>()->text(), words);
}

TEST_F(SectionPanelTest, AChosenDoubtShowsWhatItRestsOnAndGoesToItsEvidence) {
  EXPECT_EQ(panel_.tabs().tabText(2), "&Doubts (2)");
  panel_.tabs().setCurrentIndex(2);
  auto* tree = panel_.findChild<QTreeWidget*>();
  QTest::mouseClick(tree->viewport(), Qt::LeftButton, {}, tree->visualItemRect(tree->topLevelItem(0)).center());
  ASSERT_FALSE(log_.selections.empty());
  EXPECT_EQ(log_.selections[0], (Selection{2, -1, 2}));
  EXPECT_EQ(log_.plumbLines.back(), 30.0);
  QString shown;
  for (const QLabel* label : panel_.tabs().currentWidget()->findChildren<QLabel*>()) {
    shown += label->text();
  }
  EXPECT_TRUE(shown.contains("57.1 against 60.5 ms")) << shown.toStdString();
  EXPECT_TRUE(shown.contains("a look at the trigger of shot 3")) << shown.toStdString();
}

TEST_F(SectionPanelTest, ADoubtIsAnsweredWithANoteAsAnEdit) {
  panel_.tabs().setCurrentIndex(2);
  auto* tree = panel_.findChild<QTreeWidget*>();
  auto* answer = panel_.tabs().currentWidget()->findChild<QLineEdit*>();
  ASSERT_NE(answer, nullptr);
  EXPECT_FALSE(answer->isEnabled()) << "nothing is chosen yet";
  tree->setCurrentItem(tree->topLevelItem(0));
  Edit made;
  QObject::connect(&panel_, &View::proposed, &panel_, [&made](const Edit& edit, Phase) { made = edit; });
  QTest::keyClicks(answer, "the trigger cable was changed after this shot");
  QTest::keyClick(answer, Qt::Key_Return);
  ASSERT_EQ(made.changes.size(), 1U);
  EXPECT_TRUE(made.text.starts_with("Answer a doubt: ")) << made.text;
  apply(sample_.survey, made);
  showSample();
  EXPECT_TRUE(tree->topLevelItem(0)->text(0).startsWith(QString("\u2713 ")));
  EXPECT_EQ(answer->text(), "the trigger cable was changed after this shot");
}

TEST_F(SectionPanelTest, ManyDoubtsOfOneKindAreOneLineTheStrongestFirst) {
  auto& doubts = sample_.interpretation.doubts;
  const auto& arrivals = sample_.interpretation.times.arrivals;
  for (std::size_t i = 0; i < 40; ++i) {
    sample_.interpretation.section.predicted[i] = arrivals[i].time - (i == 25 ? 9.0 : 5.0) * arrivals[i].sigma;
    doubts.push_back(
        {"pick off the curve", "", "Pick " + std::to_string(i), "", "", arrivals[i].shot, arrivals[i].trace, 0, 0.0});
  }
  panel_.tabs().setCurrentIndex(2);
  showSample();
  auto* tree = panel_.findChild<QTreeWidget*>();
  ASSERT_EQ(tree->topLevelItemCount(), 3);
  EXPECT_EQ(tree->topLevelItem(2)->text(0), "40 \u00d7 pick off the curve, the strongest: Pick 25");
  EXPECT_EQ(tree->topLevelItem(2)->childCount(), 39);
  EXPECT_FALSE(tree->topLevelItem(2)->isExpanded());
  tree->topLevelItem(2)->setExpanded(true);
  tree->setCurrentItem(tree->topLevelItem(2)->child(3));
  log_.selections.clear();
  showSample();
  EXPECT_TRUE(tree->topLevelItem(2)->isExpanded()) << "a new answer closes nothing that was opened";
  EXPECT_TRUE(log_.selections.empty()) << "and selects nothing by itself";
}

TEST_F(SectionPanelTest, WithoutASectionTheReasonStandsInWords) {
  sample_.interpretation.section.determined = false;
  sample_.interpretation.section.reason = "all picks are direct arrivals";
  showSample();
  EXPECT_EQ(panel_.findChild<LayerTable*>()->findChild<QLabel*>()->text(),
            "No depth is determined: all picks are direct arrivals");
  QTest::mouseMove(canvas(), at(46.0, 3.0));
  QTest::mouseClick(canvas(), Qt::LeftButton, {}, at(46.0, 3.0));
  EXPECT_TRUE(log_.selections.empty());
  panel_.showScene({std::make_shared<Survey>(), nullptr, std::make_shared<std::vector<Gather>>(), {}});
  EXPECT_EQ(panel_.findChild<LayerTable*>()->findChild<QLabel*>()->text(),
            "Drop shot records on this window, or open them from the File menu.");
}

}  // namespace
}  // namespace strikeplate
