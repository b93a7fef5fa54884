#include "widgets/record_gesture.h"

#include <cmath>

#include <gtest/gtest.h>

#include "core/picking/trace_picker.h"
#include "tests/widgets/record_scene.h"

using namespace strikeplate;
using namespace strikeplate::testing;

namespace {

/// A record of 24 traces with its axes and no window.
struct Bench {
  explicit Bench(const Survey& survey = sharpLine(24))
      : scene(sceneOf(survey)), axes(gather(), 0.0, {}, {50.0, 30.0, 480.0, 400.0}, {-0.01, 0.07, 0.5, 24.5}) {}

  [[nodiscard]] const Gather& gather() const { return scene.gathers->front(); }
  [[nodiscard]] const Shot& shot() const { return scene.survey->shots.front(); }
  [[nodiscard]] double onset(int trace) const { return onsetAt(gather().offset(static_cast<std::size_t>(trace))); }
  [[nodiscard]] QPointF at(int trace, double time) const { return {axes.xOf(trace), axes.yOf(trace, time)}; }
  [[nodiscard]] RecordGesture press(const QPointF& point, int selected = -1) const {
    return {scene, axes, targetAt(axes, shot(), selected, point), point};
  }

  Scene scene;
  RecordAxes axes;
};

Survey picked(double sigma = 5e-4) {
  Survey survey = sharpLine(24);
  for (std::size_t t = 0; t < 24; ++t) {
    const double offset = 5.0 + 2.0 * static_cast<double>(t);
    survey.shots[0].traces[t].pick = Pick{onsetAt(offset), sigma, 0, PickOrigin::Automatic};
  }
  return survey;
}

const PickChange& pickOf(const Edit& edit, std::size_t i = 0) {
  return std::get<PickChange>(edit.changes.at(i));
}

}  // namespace

TEST(RecordGesture, AClickSetsThePickAtTheOnsetNearby) {
  const Bench bench;
  const QPointF point = bench.at(7, bench.onset(7) + 0.001);
  const auto edit = bench.press(point).release(bench.axes, point, false);
  ASSERT_TRUE(edit);
  EXPECT_EQ(edit->text, "Set pick, shot 1, trace 8");
  ASSERT_EQ(edit->changes.size(), 1U);
  // A sharp onset is found to two samples.
  EXPECT_NEAR(pickOf(*edit).after->time, bench.onset(7), 2 * kInterval);
  EXPECT_EQ(pickOf(*edit).after->origin, PickOrigin::Hand);
  EXPECT_DOUBLE_EQ(pickOf(*edit).after->sigma, sigmaAt(bench.gather(), 7, pickOf(*edit).after->time));
  EXPECT_FALSE(pickOf(*edit).before);
}

TEST(RecordGesture, AFreeClickSetsItExactlyThere) {
  const Bench bench;
  const QPointF point = bench.at(7, 0.0301);
  const auto edit = bench.press(point).release(bench.axes, point, true);
  ASSERT_TRUE(edit);
  EXPECT_NEAR(pickOf(*edit).after->time, 0.0301, 1e-9);
}

TEST(RecordGesture, APressOnAPickMovesItEvenAcrossItsNeighbours) {
  const Bench bench(picked());
  RecordGesture gesture = bench.press(bench.at(7, bench.onset(7)) + QPointF(2.0, 3.0));
  const auto edit = gesture.release(bench.axes, bench.at(9, bench.onset(7)) + QPointF(0.0, 43.0), true);
  ASSERT_TRUE(edit);
  EXPECT_FALSE(gesture.isStroke());
  EXPECT_EQ(edit->text, "Move pick, shot 1, trace 8");
  ASSERT_EQ(edit->changes.size(), 1U);
  // By as much as the pointer moved, not to where the pointer is: it was taken hold of 3 px below its time.
  EXPECT_NEAR(pickOf(*edit).after->time, bench.onset(7) + 40.0 * bench.axes.secondsPerPixel(), 1e-9);
}

TEST(RecordGesture, AClickOnAPickChangesNothing) {
  const Bench bench(picked());
  const QPointF point = bench.at(7, bench.onset(7)) + QPointF(1.0, 4.0);
  EXPECT_FALSE(bench.press(point).release(bench.axes, point + QPointF(1.0, 1.0), false));
}

TEST(RecordGesture, OffThePickAPressSetsItAnew) {
  const Bench bench(picked());
  const QPointF point = bench.at(7, bench.onset(7)) + QPointF(0.0, 30.0);
  const auto edit = bench.press(point).release(bench.axes, point, true);
  ASSERT_TRUE(edit);
  EXPECT_NEAR(bench.axes.yOf(7, pickOf(*edit).after->time), point.y(), 1e-6);
}

TEST(RecordGesture, AStrokePicksEveryTraceItCrosses) {
  const Bench bench;
  RecordGesture gesture = bench.press(bench.at(2, bench.onset(2) + 0.001));
  EXPECT_FALSE(gesture.moveTo(bench.axes, bench.at(2, bench.onset(2) + 0.001) + QPointF(1.0, 0.0), false));
  for (const int t : {5, 9, 14, 20}) {
    EXPECT_TRUE(gesture.moveTo(bench.axes, bench.at(t, bench.onset(t) + 0.001), false));
  }
  const auto edit = gesture.release(bench.axes, bench.at(20, bench.onset(20) + 0.001), false);
  ASSERT_TRUE(edit);
  EXPECT_TRUE(gesture.isStroke());
  EXPECT_EQ(edit->text, "Pick shot 1, traces 3 to 21");
  ASSERT_EQ(edit->changes.size(), 19U);
  for (std::size_t i = 0; i < 19; ++i) {
    EXPECT_EQ(pickOf(*edit, i).trace, static_cast<int>(i) + 2);
    EXPECT_NEAR(pickOf(*edit, i).after->time, bench.onset(static_cast<int>(i) + 2), 2 * kInterval) << i;
  }
}

TEST(RecordGesture, AFreeStrokeFollowsThePathAndItsLastCrossingCounts) {
  const Bench bench;
  RecordGesture gesture = bench.press(bench.at(2, 0.010));
  gesture.moveTo(bench.axes, bench.at(12, 0.030), true);
  gesture.moveTo(bench.axes, bench.at(12, 0.050), true);
  const auto edit = gesture.release(bench.axes, bench.at(8, 0.050), true);
  ASSERT_TRUE(edit);
  ASSERT_EQ(edit->changes.size(), 11U);
  EXPECT_NEAR(pickOf(*edit, 1).after->time, 0.012, 1e-9);
  EXPECT_NEAR(pickOf(*edit, 5).after->time, 0.020, 1e-9);
  EXPECT_NEAR(pickOf(*edit, 8).after->time, 0.050, 1e-9);
}

TEST(RecordGesture, DeadTracesArePassedOver) {
  Survey survey = sharpLine(24);
  survey.shots[0].traces[6].state = TraceState::Dead;
  const Bench bench(survey);
  RecordGesture gesture = bench.press(bench.at(4, 0.02));
  gesture.moveTo(bench.axes, bench.at(8, 0.02), true);
  const auto edit = gesture.release(bench.axes, bench.at(8, 0.02), true);
  ASSERT_TRUE(edit);
  ASSERT_EQ(edit->changes.size(), 4U);
  EXPECT_EQ(pickOf(*edit, 2).trace, 7);
  EXPECT_FALSE(bench.press(bench.at(6, 0.02)).release(bench.axes, bench.at(6, 0.02), true));
}

TEST(RecordGesture, TheBracketOfTheSelectedTraceSetsSigma) {
  const Bench bench(picked(0.002));
  const double late = bench.axes.yOf(7, bench.onset(7) + 0.002);
  const QPointF end(bracketX(bench.axes, 7), late);
  EXPECT_EQ(targetAt(bench.axes, bench.shot(), 7, end).on, RecordTarget::On::Bracket);
  EXPECT_NE(targetAt(bench.axes, bench.shot(), -1, end).on, RecordTarget::On::Bracket);
  const auto edit = bench.press(end + QPointF(0.0, 2.0), 7).release(bench.axes, end + QPointF(0.0, 12.0), false);
  ASSERT_TRUE(edit);
  EXPECT_EQ(edit->text, "Set sigma, shot 1, trace 8");
  EXPECT_NEAR(pickOf(*edit).after->sigma, 0.002 + 10.0 * bench.axes.secondsPerPixel(), 1e-9);
  EXPECT_DOUBLE_EQ(pickOf(*edit).after->time, pickOf(*edit).before->time);
}

TEST(RecordGesture, ASigmaGivenByHandStaysWhenThePickIsMoved) {
  Survey survey = picked();
  survey.shots[0].traces[7].pick->origin = PickOrigin::Hand;
  survey.shots[0].traces[7].pick->sigma = 0.00123;
  const Bench bench(survey);
  const QPointF point = bench.at(7, bench.onset(7));
  const auto byHand = bench.press(point).release(bench.axes, point + QPointF(0.0, 20.0), true);
  ASSERT_TRUE(byHand);
  EXPECT_DOUBLE_EQ(pickOf(*byHand).after->sigma, 0.00123);
  const QPointF other = bench.at(8, bench.onset(8));
  const auto automatic = bench.press(other).release(bench.axes, other + QPointF(0.0, 20.0), true);
  ASSERT_TRUE(automatic);
  EXPECT_DOUBLE_EQ(pickOf(*automatic).after->sigma, sigmaAt(bench.gather(), 8, pickOf(*automatic).after->time));
}

TEST(RecordGesture, PicksStayAfterTheBlowAndWithinTheRecord) {
  const Bench bench;
  const QPointF before = bench.at(3, -0.008);
  const auto edit = bench.press(before).release(bench.axes, before, true);
  ASSERT_TRUE(edit);
  EXPECT_GT(pickOf(*edit).after->time, 0.0);
}

TEST(RecordGesture, EndsWhenTheSurveyUnderItIsAnother) {
  const Bench bench;
  const RecordGesture gesture = bench.press(bench.at(3, 0.02));
  EXPECT_TRUE(gesture.fits(bench.scene));
  EXPECT_FALSE(gesture.fits(sceneOf(sharpLine(12))));
}
