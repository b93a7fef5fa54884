#include "core/survey/lines.h"

#include <random>

#include <gtest/gtest.h>

#include "core/survey/edit_check.h"
#include "core/survey/survey_file.h"
#include "tests/core/survey/random_survey.h"
#include "tests/core/survey/temporary_folder.h"

namespace strikeplate {
namespace {

using testing::randomEdit;
using testing::randomSurvey;
using testing::sameContent;

Survey named(std::mt19937& random, const std::string& line) {
  Survey survey = randomSurvey(random);
  survey.info.line = line;
  return survey;
}

Survey threeLines(std::mt19937& random) {
  Survey job = named(random, "North");
  apply(job, edits::addLine(job, named(random, "")));
  apply(job, edits::addLine(job, named(random, "South")));
  return job;
}

TEST(Lines, ASurveyIsOneLineUntilAnotherIsAdded) {
  std::mt19937 random(1);
  const Survey survey = named(random, "");
  EXPECT_EQ(lineCount(survey), 1);
  EXPECT_EQ(lineName(survey, 0), "Line 1");
  EXPECT_EQ(allLines(survey).front(), survey);
}

TEST(Lines, ALineAddedComesToHandAndTheOthersAreCarriedAlong) {
  std::mt19937 random(2);
  const Survey north = named(random, "North");
  const Survey south = named(random, "South");
  const Survey job = applied(north, edits::addLine(north, south));
  EXPECT_EQ(lineCount(job), 2);
  EXPECT_EQ(job.lineAtHand, 1);
  EXPECT_EQ(job.shots, south.shots);
  EXPECT_EQ(lineName(job, 0), "North");
  EXPECT_EQ(lineName(job, 1), "South");
  EXPECT_EQ(withLineAtHand(job, 0).shots, north.shots);
  EXPECT_EQ(withLineAtHand(withLineAtHand(job, 0), 1), job);
}

TEST(Lines, ANewLineTakesOverWhatTheJobHasInCommonAndKeepsItsOwn) {
  Survey first, second;
  first.info.client = "Harbour board";
  first.info.site = "Quay 4";
  first.info.notes = "windy";
  first.settings = {3, true, false};
  second.info.site = "Quay 5";
  const Survey job = applied(first, edits::addLine(first, second));
  EXPECT_EQ(job.info.client, "Harbour board");
  EXPECT_EQ(job.info.site, "Quay 5");
  EXPECT_EQ(job.info.notes, "");
  EXPECT_TRUE(job.settings.feet);
  EXPECT_EQ(job.settings.layers, 0) << "how many layers is the ground's own";
}

TEST(Lines, AnEditChangesTheLineAtHandOnly) {
  std::mt19937 random(3);
  Survey job = threeLines(random);
  const std::vector<Survey> before = allLines(job);
  apply(job, edits::showLine(job, 1));
  apply(job, edits::setTriggerCorrection(job, 0, 0.0042));
  const std::vector<Survey> after = allLines(job);
  EXPECT_EQ(after[0].shots, before[0].shots);
  EXPECT_EQ(after[1].shots[0].triggerCorrection, 0.0042);
  EXPECT_EQ(after[2].shots, before[2].shots);
}

TEST(Lines, ShowingAddingAndRemovingAreUndone) {
  std::mt19937 random(4);
  const Survey job = threeLines(random);
  for (const Edit& edit :
       {edits::showLine(job, 0), edits::removeLine(job), edits::addLine(job, randomSurvey(random))}) {
    ASSERT_TRUE(editFits(job, edit)) << edit.text;
    EXPECT_EQ(applied(applied(job, edit), inverted(edit)), job) << edit.text;
  }
  EXPECT_EQ(edits::showLine(job, 1).text, "Show Line 2");
  EXPECT_EQ(edits::removeLine(job).text, "Remove South");
}

TEST(Lines, RemovingTheFirstLineBringsTheNextToHandAndOneLineIsAPlainSurvey) {
  std::mt19937 random(5);
  Survey job = named(random, "North");
  const Survey south = named(random, "South");
  apply(job, edits::addLine(job, south));
  apply(job, edits::showLine(job, 0));
  apply(job, edits::removeLine(job));
  EXPECT_EQ(lineCount(job), 1);
  EXPECT_EQ(job.shots, south.shots);
  EXPECT_TRUE(job.otherLines.empty());
}

TEST(Lines, ALineThatDoesNotExistDoesNotFit) {
  std::mt19937 random(6);
  const Survey job = threeLines(random);
  EXPECT_FALSE(editFits(job, {"", {LineChange{2, 3}}}));
  EXPECT_FALSE(editFits(job, {"", {LineChange{2, -1}}}));
  EXPECT_TRUE(editFits(job, {"", {LineChange{2, 1}}}));
}

TEST(Lines, AFileKeepsEveryLineAndItsHistory) {
  const testing::TemporaryFolder folder;
  const std::string path = folder.path("job.splate");
  std::mt19937 random(7);
  std::vector<Survey> states = {threeLines(random)};
  {
    auto file = SurveyFile::create(path, states.front());
    ASSERT_TRUE(file.ok()) << file.message();
    for (int i = 0; i < 60; ++i) {
      const Survey& now = file->survey();
      const Edit edit = i % 7 == 3     ? edits::showLine(now, (now.lineAtHand + 1) % lineCount(now))
                        : i % 20 == 9  ? edits::addLine(now, randomSurvey(random))
                        : i % 20 == 19 ? edits::removeLine(now)
                                       : randomEdit(now, random);
      ASSERT_TRUE(file->append(edit).ok()) << edit.text;
      states.push_back(file->survey());
    }
  }
  auto file = SurveyFile::open(path);
  ASSERT_TRUE(file.ok()) << file.message();
  for (std::size_t i = states.size(); i-- > 0;) {
    const std::vector<Survey> read = allLines(file->survey()), written = allLines(states[i]);
    ASSERT_EQ(read.size(), written.size());
    EXPECT_EQ(file->survey().lineAtHand, states[i].lineAtHand);
    for (std::size_t line = 0; line < read.size(); ++line) {
      Survey a = read[line], b = written[line];
      a.otherLines.clear();
      b.otherLines.clear();
      EXPECT_TRUE(sameContent(a, b)) << "state " << i << ", line " << line;
    }
    ASSERT_TRUE(file->undo().ok());
  }
}

}  // namespace
}  // namespace strikeplate
