#include "widgets/record_axes.h"

#include <cmath>

#include <gtest/gtest.h>

#include "core/survey/gathers.h"
#include "tests/widgets/record_scene.h"
#include "widgets/record_frame.h"

using namespace strikeplate;
using namespace strikeplate::testing;

namespace {

const QRectF kPlot(50.0, 30.0, 480.0, 400.0);

RecordAxes axesOf(const RecordDisplay& display, const RecordRange& range, double correction = 0.0) {
  return {gatherOf(sharpLine(24), 0), correction, display, kPlot, range};
}

}  // namespace

TEST(RecordAxes, NumberedTracesShareTheWidthEvenly) {
  const RecordAxes axes = axesOf({}, {0.0, 0.1, 0.5, 24.5});
  EXPECT_DOUBLE_EQ(axes.spacing(), 20.0);
  EXPECT_DOUBLE_EQ(axes.xOf(0), 60.0);
  EXPECT_DOUBLE_EQ(axes.xOf(23), 520.0);
  EXPECT_EQ(axes.traceAt(69.0), 0);
  EXPECT_EQ(axes.traceAt(71.0), 1);
  EXPECT_EQ(axes.traceAt(1000.0), 23);
}

TEST(RecordAxes, TracesAtTruePositionFollowTheSharedAxis) {
  RecordDisplay display;
  display.truePosition = true;
  const RecordAxes axes = axesOf(display, {0.0, 0.1, -10.0, 50.0});
  EXPECT_DOUBLE_EQ(axes.xOf(0), 50.0 + 480.0 * 10.0 / 60.0);
  EXPECT_DOUBLE_EQ(axes.metresAt(axes.xOf(7)), 14.0);
  EXPECT_DOUBLE_EQ(axes.spacing(), 16.0);
}

TEST(RecordAxes, TimeRunsDownOrUpAndComesBack) {
  for (const bool up : {false, true}) {
    RecordDisplay display;
    display.timeUp = up;
    const RecordAxes axes = axesOf(display, {-0.01, 0.09, 0.5, 24.5});
    EXPECT_DOUBLE_EQ(axes.yOf(3, -0.01), up ? kPlot.bottom() : kPlot.top());
    EXPECT_DOUBLE_EQ(axes.yOf(3, 0.09), up ? kPlot.top() : kPlot.bottom());
    EXPECT_NEAR(axes.timeAt(3, axes.yOf(3, 0.0234)), 0.0234, 1e-12);
  }
}

TEST(RecordAxes, ShownTimeIsAfterTheBlowAndReducedByTheOffset) {
  // t - x / v, as travel times are reduced in refraction work; trace 11 stands at 20 m, 25 m from the shot.
  RecordDisplay display;
  display.reducingVelocity = 1000.0;
  const RecordAxes axes = axesOf(display, {-0.01, 0.09, 0.5, 24.5}, 0.002);
  EXPECT_NEAR(axes.shownTime(10, 0.040), 0.040 + 0.002 - 0.025, 1e-12);
  EXPECT_NEAR(axes.recorderTime(10, axes.shownTime(10, 0.040)), 0.040, 1e-12);
}

TEST(RecordAxes, PositionsBetweenNumberedTracesAreInterpolated) {
  const RecordAxes axes = axesOf({}, {0.0, 0.1, 0.5, 24.5});
  EXPECT_DOUBLE_EQ(axes.xOfMetres(3.0), 0.5 * (axes.xOf(1) + axes.xOf(2)));
  EXPECT_DOUBLE_EQ(axes.xOfMetres(46.0), axes.xOf(23));
  EXPECT_DOUBLE_EQ(axes.xOfMetres(-1.0), axes.xOf(0) - 10.0);
  EXPECT_TRUE(std::isnan(axes.xOfMetres(-5.0)));
}

TEST(RecordAxes, ZoomKeepsWhatIsUnderThePointer) {
  const RecordRange range{0.0, 0.1, 0.5, 24.5};
  const RecordRange nearer = zoomedTime(range, 2.0, 0.03);
  EXPECT_NEAR((0.03 - nearer.first) / (nearer.last - nearer.first), 0.3, 1e-12);
  EXPECT_NEAR(nearer.last - nearer.first, 0.05, 1e-12);
  EXPECT_EQ(nearer.left, range.left);
}

TEST(RecordAxes, RangesStayWithinTheRecordAndDoNotVanish) {
  const RecordRange limits{-0.02, 0.12, 0.5, 24.5};
  EXPECT_EQ(within({-1.0, 2.0, -50.0, 90.0}, limits, 0.005, 2.0), limits);
  const RecordRange moved = within(panned({0.0, 0.05, 1.0, 5.0}, 1.0, -20.0), limits, 0.005, 2.0);
  EXPECT_NEAR(moved.last, 0.12, 1e-12);
  EXPECT_NEAR(moved.last - moved.first, 0.05, 1e-12);
  EXPECT_NEAR(moved.left, 0.5, 1e-12);
  const RecordRange tiny = within({0.03, 0.0301, 3.0, 3.1}, limits, 0.005, 2.0);
  EXPECT_NEAR(tiny.last - tiny.first, 0.005, 1e-12);
  EXPECT_NEAR(tiny.right - tiny.left, 2.0, 1e-12);
}

TEST(RecordAxes, LabelsOfTracesNeverMeet) {
  for (const int traces : {12, 24, 48, 120}) {
    for (const double width : {230.0, 480.0, 1330.0}) {
      const RecordAxes axes(gatherOf(sharpLine(traces), 0), 0.0, {}, {0.0, 0.0, width, 400.0},
                            {0.0, 0.1, 0.5, traces + 0.5});
      const std::vector<int> labels = labelledTraces(axes, 30.0);
      ASSERT_FALSE(labels.empty());
      for (std::size_t i = 1; i < labels.size(); ++i) {
        EXPECT_GE(axes.xOf(labels[i]) - axes.xOf(labels[i - 1]), 30.0) << traces << " traces, " << width << " px";
      }
    }
  }
}
