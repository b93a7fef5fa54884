#include "core/survey/edit.h"

#include <cmath>

#include <gtest/gtest.h>

#include "core/survey/doubts.h"
#include "tests/core/survey/random_survey.h"

namespace strikeplate {
namespace {

TEST(Edit, AnEditTakenBackLeavesTheSurveyAsItWas) {
  for (unsigned seed = 0; seed < 400; ++seed) {
    std::mt19937 random(seed);
    const Survey survey = testing::randomSurvey(random);
    const Edit edit = testing::randomEdit(survey, random);
    const Survey after = applied(survey, edit);
    EXPECT_TRUE(applied(after, inverted(edit)) == survey) << "seed " << seed << ": " << edit.text;
    EXPECT_TRUE(applied(survey, inverted(inverted(edit))) == after) << "seed " << seed << ": " << edit.text;
  }
}

TEST(Edit, EditsInARowAreTakenBackInReverse) {
  std::mt19937 random(7);
  const Survey first = testing::randomSurvey(random);
  Survey survey = first;
  std::vector<Edit> done;
  for (int i = 0; i < 60; ++i) {
    done.push_back(testing::randomEdit(survey, random));
    survey = applied(survey, done.back());
  }
  EXPECT_FALSE(survey == first);
  for (auto edit = done.rbegin(); edit != done.rend(); ++edit) {
    survey = applied(survey, inverted(*edit));
  }
  EXPECT_TRUE(survey == first);
}

TEST(Edit, TwoChangesOfOnePickInOneEditAreTakenBackToTheFirst) {
  std::mt19937 random(3);
  const Survey survey = testing::randomSurvey(random);
  const Pick a{0.01, 1e-3, 0, PickOrigin::Hand};
  const Pick b{0.02, 1e-3, 0, PickOrigin::Hand};
  const Edit edit{"twice", {PickChange{0, 0, survey.shots[0].traces[0].pick, a}, PickChange{0, 0, a, b}}};
  EXPECT_EQ(applied(survey, edit).shots[0].traces[0].pick, b);
  EXPECT_TRUE(applied(applied(survey, edit), inverted(edit)) == survey);
}

TEST(Edit, AShotChangeLeavesThePicksAlone) {
  std::mt19937 random(5);
  const Survey survey = testing::randomSurvey(random);
  const Edit correction = edits::setTriggerCorrection(survey, 1, 0.002);
  const Pick pick{0.033, 1e-3, 2, PickOrigin::Hand};
  const Survey picked = applied(survey, edits::setPick(survey, 1, 2, pick, "Set pick"));
  const Survey both = applied(picked, correction);
  EXPECT_EQ(both.shots[1].traces[2].pick, pick);
  EXPECT_EQ(both.shots[1].triggerCorrection, 0.002);
  EXPECT_TRUE(applied(both, inverted(correction)) == picked);
}

TEST(Edit, AssigningALayerPassesOverTracesWithoutAPick) {
  std::mt19937 random(9);
  Survey survey = testing::randomSurvey(random);
  survey.shots[0].traces[0].pick = Pick{0.01, 1e-3, 0, PickOrigin::Automatic};
  survey.shots[0].traces[1].pick.reset();
  const Edit edit = edits::assignLayer(survey, 0, {0, 1}, 2);
  EXPECT_EQ(edit.changes.size(), 1U);
  EXPECT_EQ(edit.text, "Assign layer 2, shot 1, 1 pick");
  const Survey after = applied(survey, edit);
  EXPECT_EQ(after.shots[0].traces[0].pick->layer, 2);
  EXPECT_EQ(after.shots[0].traces[0].pick->origin, PickOrigin::Automatic);
  EXPECT_FALSE(after.shots[0].traces[1].pick);
}

TEST(Edit, AShotThatPassesItsNeighbourKeepsShotsInOrder) {
  std::mt19937 random(11);
  const Survey survey = testing::randomSurvey(random);
  const double beyond = survey.shots.back().point.x + 3.0;
  const Edit edit = edits::setShotPoint(survey, 0, {beyond, 1.0, 0.0});
  const Survey after = applied(survey, edit);
  EXPECT_EQ(after.shots.back().point.x, beyond);
  EXPECT_EQ(after.shots.back().traces, survey.shots.front().traces);
  EXPECT_LE(after.shots.front().point.x, after.shots[1].point.x);
  EXPECT_TRUE(applied(after, inverted(edit)) == survey);
}

TEST(Edit, LeavingABlowOutOfAStackIsNamedAndTakenBack) {
  std::mt19937 random(9);
  const Survey survey = testing::randomSurvey(random);
  std::vector<std::vector<bool>> used(survey.shots.size(), {true, false});
  EXPECT_TRUE(edits::useBlows(survey, used).changes.empty());
  used[1] = {true, true};
  const Edit edit = edits::useBlows(survey, used);
  EXPECT_EQ(edit.text, "Stack blow " + survey.records[1]->file);
  const Survey after = applied(survey, edit);
  EXPECT_TRUE(after.shots[1].blows[1].used);
  EXPECT_EQ(applied(after, inverted(edit)), survey);
  used[0] = {false, true};
  EXPECT_EQ(edits::useBlows(survey, used).text, "Choose the blows of the stacks, 3 changed");
}

TEST(Edit, TextsCountShotsAndTracesFromOneAndUseTheUsersUnit) {
  std::mt19937 random(13);
  Survey survey = testing::randomSurvey(random);
  survey.settings.feet = false;
  EXPECT_EQ(edits::setShotPoint(survey, 0, {-2.0, 0.0, 0.0}).text, "Move shot 1 to -2.00 m");
  survey.settings.feet = true;
  EXPECT_EQ(edits::setShotPoint(survey, 0, {-3.048, 0.0, 0.0}).text, "Move shot 1 to -10.0 ft");
  EXPECT_EQ(edits::setTraceState(survey, 1, 3, TraceState::Dead).text, "Mark shot 2, trace 4 as dead");
  EXPECT_EQ(edits::setTriggerCorrection(survey, 1, -0.0015).text, "Set trigger correction, shot 2: -1.50 ms");
}

TEST(Edit, AMarkTakesThePlaceOfAnEarlierOneOfItsKind) {
  std::mt19937 random(5);
  Survey survey = testing::randomSurvey(random);
  apply(survey, edits::setMark(survey, 0, {MarkKind::CriticalDistance, 6.0, 0.5}));
  apply(survey, edits::setMark(survey, 0, {MarkKind::ReflectionTime, 0.02, 0.001}));
  const Edit edit = edits::setMark(survey, 0, {MarkKind::CriticalDistance, 7.0, 0.5});
  EXPECT_EQ(edit.text, "Mark critical distance of shot 1");
  apply(survey, edit);
  ASSERT_EQ(survey.shots[0].marks.size(), 2U);
  EXPECT_EQ(survey.shots[0].marks.back().value, 7.0);
  apply(survey, edits::removeMark(survey, 0, MarkKind::ReflectionTime));
  EXPECT_EQ(survey.shots[0].marks.size(), 1U);
  EXPECT_TRUE(edits::removeMark(survey, 0, MarkKind::ReflectionTime).changes.empty());
}

TEST(Edit, ADoubtHasOneAnswerAndAnEmptyOneTakesItBack) {
  Survey survey;
  apply(survey, edits::answerDoubt(survey, "pick", "shot 1, trace 2", "a passing lorry"));
  apply(survey, edits::answerDoubt(survey, "pick", "shot 1, trace 2", "a passing train"));
  Doubt doubt;
  doubt.kind = "pick";
  doubt.where = "shot 1, trace 2";
  EXPECT_EQ(answerTo(survey, doubt), "a passing train");
  ASSERT_EQ(survey.doubtAnswers.size(), 1U);
  doubt.where = "shot 1, trace 3";
  EXPECT_EQ(answerTo(survey, doubt), "");
  apply(survey, edits::answerDoubt(survey, "pick", "shot 1, trace 2", ""));
  EXPECT_TRUE(survey.doubtAnswers.empty());
}

}  // namespace
}  // namespace strikeplate
