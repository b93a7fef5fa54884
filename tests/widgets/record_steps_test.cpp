#include "widgets/record_steps.h"

#include <set>

#include <QKeyEvent>
#include <gtest/gtest.h>

#include "core/survey/gathers.h"
#include "tests/widgets/record_scene.h"
#include "widgets/record_keys.h"
#include "widgets/record_pick.h"
#include "widgets/record_traces.h"
#include "widgets/record_window.h"

using namespace strikeplate;
using namespace strikeplate::testing;

namespace {

Survey allPicked() {
  Survey survey = sharpLine(6);
  for (Shot& shot : survey.shots) {
    for (ShotTrace& trace : shot.traces) {
      trace.pick = Pick{0.02, 5e-4, 0, PickOrigin::Automatic};
    }
  }
  return survey;
}

std::optional<RecordCommand> commandOf(int key, Qt::KeyboardModifiers modifiers = Qt::NoModifier) {
  return recordCommand(QKeyEvent(QEvent::KeyPress, key, modifiers));
}

}  // namespace

TEST(RecordSteps, TracesStopAtTheEnds) {
  const Survey survey = sharpLine(6);
  EXPECT_EQ(steppedTrace(survey, {0, -1, 0}, 1)->trace, 0);
  EXPECT_EQ(steppedTrace(survey, {0, -1, 0}, -1)->trace, 5);
  EXPECT_EQ(steppedTrace(survey, {0, 5, 0}, 1)->trace, 5);
  EXPECT_EQ(steppedTrace(survey, {0, 2, 0}, -100)->trace, 0);
  EXPECT_FALSE(steppedTrace(survey, {-1, -1, 0}, 1));
}

TEST(RecordSteps, TheNextShotKeepsTheGeophone) {
  Survey survey = sharpLine(6);
  std::swap(survey.shots[1].traces[0], survey.shots[1].traces[4]);
  EXPECT_EQ(*steppedShot(survey, {0, 4, 0}, 1), (Selection{1, 0, 0}));
  EXPECT_FALSE(steppedShot(survey, {1, 4, 0}, 1));
  EXPECT_FALSE(steppedShot(survey, {0, 4, 0}, -1));
}

TEST(RecordSteps, TheNextUnpickedTraceIsFoundRoundTheLineButNotADeadOne) {
  Survey survey = allPicked();
  EXPECT_FALSE(nextUnpicked(survey, {0, 2, 0}));
  survey.shots[0].traces[1].pick.reset();
  survey.shots[1].traces[3].pick.reset();
  survey.shots[1].traces[3].state = TraceState::Dead;
  EXPECT_EQ(*nextUnpicked(survey, {0, -1, 0}), (Selection{0, 1, 0}));
  EXPECT_EQ(*nextUnpicked(survey, {0, 2, 0}), (Selection{0, 1, 0}));
  EXPECT_EQ(*nextUnpicked(survey, {0, 1, 0}), (Selection{0, 1, 0}));
}

TEST(RecordSteps, TheNextDoubtfulPickIsOneOnWhichADoubtHangs) {
  const Survey survey = allPicked();
  Interpretation interpretation;
  EXPECT_FALSE(nextDoubtful(survey, &interpretation, {0, 0, 0}));
  EXPECT_FALSE(nextDoubtful(survey, nullptr, {0, 0, 0}));
  for (const auto& [shot, trace] : {std::pair(0, -1), std::pair(1, 4), std::pair(0, 3)}) {
    Doubt doubt;
    doubt.shot = shot;
    doubt.trace = trace;
    interpretation.doubts.push_back(doubt);
  }
  EXPECT_EQ(*nextDoubtful(survey, &interpretation, {0, -1, 0}), (Selection{0, 3, 0}));
  EXPECT_EQ(*nextDoubtful(survey, &interpretation, {0, 3, 0}), (Selection{1, 4, 0}));
  EXPECT_EQ(*nextDoubtful(survey, &interpretation, {1, 4, 0}), (Selection{0, 3, 0}));
}

TEST(RecordKeys, EveryKeyIsNamedAndMeansOneThing) {
  std::set<std::pair<int, int>> seen;
  for (const RecordKey& key : recordKeys()) {
    EXPECT_FALSE(key.text().isEmpty());
    EXPECT_FALSE(key.keyText().isEmpty());
    EXPECT_TRUE(seen.insert({key.key, key.modifiers}).second) << key.keyText().toStdString();
    EXPECT_EQ(commandOf(key.key, Qt::KeyboardModifiers(key.modifiers)), key.command);
  }
}

TEST(RecordKeys, SignsAreKnownWithAndWithoutShiftAndOnTheKeypad) {
  EXPECT_EQ(commandOf(Qt::Key_Plus, Qt::ShiftModifier), RecordCommand::ZoomIn);
  EXPECT_EQ(commandOf(Qt::Key_Plus, Qt::KeypadModifier), RecordCommand::ZoomIn);
  EXPECT_EQ(commandOf(Qt::Key_3, Qt::KeypadModifier), RecordCommand::Layer3);
  EXPECT_EQ(commandOf(Qt::Key_Up, Qt::ShiftModifier), RecordCommand::NudgeUpFar);
  EXPECT_FALSE(commandOf(Qt::Key_N, Qt::AltModifier));
  EXPECT_FALSE(commandOf(Qt::Key_Q));
}

TEST(RecordPick, ANudgeMovesByWholeSamples) {
  const Survey survey = allPicked();
  const auto edit = nudgedPick(survey, gatherOf(survey, 0), 0, 2, 3);
  ASSERT_TRUE(edit);
  const auto& change = std::get<PickChange>(edit->changes.front());
  EXPECT_NEAR(change.after->time, 0.02 + 3 * kInterval, 1e-12);
  EXPECT_EQ(change.after->origin, PickOrigin::Hand);
  EXPECT_FALSE(nudgedPick(survey, gatherOf(survey, 0), 0, 2, 0));
  EXPECT_FALSE(nudgedPick(sharpLine(6), gatherOf(survey, 0), 0, 2, 1));
}

TEST(RecordPick, ARangeIsDeletedInOneEdit) {
  Survey survey = allPicked();
  survey.shots[0].traces[2].pick.reset();
  const auto edit = deletedPicks(survey, 0, 1, 3);
  ASSERT_TRUE(edit);
  EXPECT_EQ(edit->changes.size(), 2U);
  EXPECT_EQ(edit->text, "Delete 2 picks, shot 1, traces 2 to 4");
  EXPECT_EQ(applied(applied(survey, *edit), inverted(*edit)), survey);
  EXPECT_FALSE(deletedPicks(sharpLine(6), 0, 0, 5));
}

TEST(RecordPick, TheSignalOfOneTraceIsPickedByItself) {
  const Survey survey = sharpLine(6);
  const auto edit = signalPick(survey, gatherOf(survey, 0), 0, 4, std::nullopt);
  ASSERT_TRUE(edit);
  EXPECT_NEAR(std::get<PickChange>(edit->changes.front()).after->time, onsetAt(13.0), 2 * kInterval);
}

TEST(RecordWindow, BeginsWithTheFirstBreaksNotTheWholeRecord) {
  Survey survey = sharpLine(24);
  const Gather gather = gatherOf(survey, 0);
  const double latest = onsetAt(51.0);
  const RecordRange guessed = homeRange(gather, survey.shots[0], 0, nullptr, {});
  EXPECT_GT(guessed.last, 1.3 * latest);
  EXPECT_LT(guessed.last, 1.8 * latest);
  for (std::size_t t = 0; t < 24; ++t) {
    survey.shots[0].traces[t].pick = Pick{onsetAt(gather.offset(t)), 5e-4, 0, PickOrigin::Hand};
  }
  const RecordRange known = homeRange(gather, survey.shots[0], 0, nullptr, {});
  EXPECT_NEAR(known.last, 1.6 * latest, 1e-9);
  EXPECT_LT(known.first, 0.0);
  EXPECT_EQ(known.left, 0.5);
  EXPECT_EQ(known.right, 24.5);
}

TEST(RecordWindow, ReducedTimesGetAWindowOfTheirOwn) {
  Survey survey = sharpLine(24);
  const Gather gather = gatherOf(survey, 0);
  for (std::size_t t = 0; t < 24; ++t) {
    survey.shots[0].traces[t].pick = Pick{onsetAt(gather.offset(t)), 5e-4, 0, PickOrigin::Hand};
  }
  RecordDisplay display;
  display.reducingVelocity = 500.0;  // half of the wave's, so reduced times fall below zero
  const RecordRange range = homeRange(gather, survey.shots[0], 0, nullptr, display);
  EXPECT_LT(range.first, onsetAt(51.0) - 51.0 / 500.0);
  EXPECT_GT(range.last, 0.0);
}

TEST(RecordTraces, RestAtZeroBeforeTheFirstBreakWhateverFollows) {
  Survey survey = sharpLine(3);
  Gather gather = gatherOf(survey, 0);
  std::vector<float> raised = gather.traces[1].values();
  for (float& sample : raised) {
    sample += 7.0F;
  }
  gather.traces[1] = std::move(raised);
  const ShownTraces traces(gather, survey.shots[0], {});
  double mean = 0.0;
  for (std::size_t i = 0; i < 80; ++i) {
    mean += static_cast<double>(traces.trace(1)[i]) / 80.0;
  }
  EXPECT_NEAR(mean, 0.0, 0.002);
}

TEST(RecordTraces, ReversedTracesAreTurnedOverAndBadValuesAreNothing) {
  Survey survey = sharpLine(3);
  Gather gather = gatherOf(survey, 0);
  std::vector<float> bad = gather.traces[0].values();
  bad[5] = std::numeric_limits<float>::quiet_NaN();
  gather.traces[0] = std::move(bad);
  survey.shots[0].traces[2].state = TraceState::Reversed;
  const ShownTraces traces(gather, survey.shots[0], {});
  EXPECT_TRUE(std::isfinite(traces.trace(0)[5]));
  const auto live = ShownTraces(gather, sharpLine(3).shots[0], {});
  EXPECT_FLOAT_EQ(traces.trace(2)[200], -live.trace(2)[200]);
  const auto units = traces.units(0.0, 0.1, TraceScale::Trace);
  EXPECT_GT(units[0], 0.5F);
}
