#include "widgets/position_view.h"

#include <cmath>

#include <QApplication>
#include <QTest>
#include <QWheelEvent>
#include <gtest/gtest.h>
#include <qcustomplot.h>

#include "tests/widgets/table_scene.h"
#include "tests/widgets/view_log.h"
#include "widgets/travel_time_plot.h"

namespace strikeplate {
namespace {

// The travel-time plot stands for every view with the axis; its own left button marks picks.
class PositionViewTest : public ::testing::Test {
 protected:
  void SetUp() override {
    Scene scene;
    scene.survey = std::make_shared<Survey>(testing::twoLayerSurvey());
    scene.gathers = std::make_shared<std::vector<Gather>>();
    plot_.setAxisMargins(64, 18);
    plot_.resize(882, 300);
    plot_.showPositionRange(10.0, 30.0);
    plot_.showScene(scene);
    plot_.show();
    QApplication::processEvents();
  }

  [[nodiscard]] QWidget* canvas() const { return plot_.findChild<QCustomPlot*>(); }
  void turn(const QPoint& angle, Qt::KeyboardModifiers modifiers = Qt::NoModifier) {
    const QPointF at(464.0, 100.0);  // 20 m: half of 800 px over 20 m
    QWheelEvent event(at, canvas()->mapToGlobal(at), {}, angle, Qt::NoButton, modifiers, Qt::NoScrollPhase, false);
    QApplication::sendEvent(canvas(), &event);
  }

  TravelTimePlot plot_;
  testing::ViewLog log_{plot_};
};

TEST_F(PositionViewTest, TheWheelZoomsAboutThePointer) {
  turn({0, 120});
  ASSERT_EQ(log_.ranges.size(), 1U);
  EXPECT_NEAR(log_.ranges[0].first, 12.0, 1e-6);
  EXPECT_NEAR(log_.ranges[0].second, 28.0, 1e-6);
}

TEST_F(PositionViewTest, TheWheelPansWithShiftOrSideways) {
  turn({0, -120}, Qt::ShiftModifier);
  turn({-120, 0});
  ASSERT_EQ(log_.ranges.size(), 2U);
  EXPECT_NEAR(log_.ranges[0].first, 12.0, 1e-6) << "a tenth of 20 m";
  EXPECT_NEAR(log_.ranges[1].first, 12.0, 1e-6);
}

TEST_F(PositionViewTest, TheMiddleButtonPansAndEscapeGoesBack) {
  QTest::mousePress(canvas(), Qt::MiddleButton, {}, {400, 100});
  QTest::mouseMove(canvas(), {480, 100});
  ASSERT_FALSE(log_.ranges.empty());
  EXPECT_NEAR(log_.ranges.back().first, 8.0, 1e-6);
  QTest::keyClick(&plot_, Qt::Key_Escape);
  EXPECT_NEAR(log_.ranges.back().first, 10.0, 1e-6);
  const std::size_t count = log_.ranges.size();
  QTest::mouseMove(canvas(), {500, 100});
  QTest::mouseRelease(canvas(), Qt::MiddleButton, {}, {500, 100});
  EXPECT_EQ(log_.ranges.size(), count);
}

TEST_F(PositionViewTest, ThePlumbLineGoesWhenThePointerLeaves) {
  QEvent leave(QEvent::Leave);
  QApplication::sendEvent(canvas(), &leave);
  ASSERT_FALSE(log_.plumbLines.empty());
  EXPECT_TRUE(std::isnan(log_.plumbLines.back()));
}

}  // namespace
}  // namespace strikeplate
