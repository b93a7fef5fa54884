// What a report should hold and a survey lacks. The items are those of reference works in own words; each test gives
// the survey what an item asks for, or takes it away.
#include "core/report/sheet_checklist.h"

#include <gtest/gtest.h>

#include "tests/core/report/sheet_sample.h"

namespace strikeplate {
namespace {

std::string missing(const testing::SheetSample& sample, const std::string& item, const SheetOptions& options = {}) {
  for (const SheetCheck& check : sheetChecklist(sample.survey, sample.interpretation, options)) {
    if (check.item == item) {
      return check.missing;
    }
  }
  return "no such item";
}

TEST(SheetChecklist, NamesTheFieldsThatAreNotGiven) {
  auto sample = testing::sheetSample();
  EXPECT_EQ(missing(sample, "Client, site, line, date"), "");
  sample.survey.info.client = "  ";
  sample.survey.info.date = "";
  EXPECT_EQ(missing(sample, "Client, site, line, date"), "Not given: client, date (Edit, Job, client and crew).");
}

TEST(SheetChecklist, WantsTheClientsQuestionAndAName) {
  const auto sample = testing::sheetSample();
  EXPECT_NE(missing(sample, "Purpose: the client's question"), "");
  EXPECT_NE(missing(sample, "Responsible person"), "");
  SheetOptions options;
  options.question = "How deep is rock?";
  options.signatory = "I. Vance";
  options.records = true;
  EXPECT_EQ(missing(sample, "Purpose: the client's question", options), "");
  EXPECT_EQ(missing(sample, "Responsible person", options), "");
  EXPECT_EQ(missing(sample, "Records with picks shown", options), "");
}

TEST(SheetChecklist, SaysWhenTheUsersAnswerIsTooLongForThePage) {
  const auto sample = testing::sheetSample();
  SheetOptions options;
  options.answer = "Rock at 5 m.";
  EXPECT_EQ(missing(sample, "An answer that fits page and section", options), "");
  options.answer.assign(2000, 'x');
  EXPECT_NE(missing(sample, "An answer that fits page and section", options), "");
}

TEST(SheetChecklist, WantsTheLineOnTheMapAndLooksAtIt) {
  auto sample = testing::sheetSample();
  EXPECT_NE(missing(sample, "Line on the map").find("no place on the map"), std::string::npos);
  sample.survey.info.map = testing::sampleMap();
  EXPECT_EQ(missing(sample, "Line on the map"), "");
  sample.survey.info.map->second.x = 50.0;
  EXPECT_NE(missing(sample, "Line on the map").find("one of them is not right"), std::string::npos);
}

TEST(SheetChecklist, WantsAnAnswerReadAgainWhenTheInterpretationHasChanged) {
  auto sample = testing::sheetSample();
  SheetOptions options;
  options.answer = "Rock at 5 m.";
  options.answerTo = sheetDraft(sample.survey, sample.interpretation);
  EXPECT_EQ(missing(sample, "An answer that fits page and section", options), "");
  sample.interpretation.section.velocities[1] = Estimate::normal(2000.0, 20.0);
  EXPECT_NE(missing(sample, "An answer that fits page and section", options).find("has changed"), std::string::npos);
}

TEST(SheetChecklist, WantsShotsAtBothEnds) {
  auto sample = testing::sheetSample();
  EXPECT_EQ(missing(sample, "Shots at both ends"), "");
  sample.survey.shots.resize(3);
  EXPECT_NE(missing(sample, "Shots at both ends").find("Shots at one end only"), std::string::npos);
}

TEST(SheetChecklist, CountsLiveTracesWithoutAFirstBreak) {
  auto sample = testing::sheetSample();
  // The sample leaves out every seventeenth geophone from the fourth on: 3 of 48 on each of 7 shots.
  EXPECT_EQ(missing(sample, "First breaks"), "21 live traces have no first break; pick them or set their state.");
  for (Shot& shot : sample.survey.shots) {
    for (ShotTrace& trace : shot.traces) {
      trace.pick = Pick{0.01, 1e-3, 0, PickOrigin::Automatic};
    }
  }
  EXPECT_EQ(missing(sample, "First breaks"),
            "Every pick is the program's own; look at the records before the sheet leaves.");
  sample.survey.shots[0].traces[0].pick->origin = PickOrigin::Imported;
  EXPECT_EQ(missing(sample, "First breaks"), "");
}

TEST(SheetChecklist, CountsPairsBeyondTheirTolerance) {
  auto sample = testing::sheetSample();
  EXPECT_EQ(missing(sample, "Reciprocal times"),
            "4 reciprocal pairs lie beyond the tolerance; look at those shots' triggers and picks.");
  sample.interpretation.reciprocals.clear();
  EXPECT_NE(missing(sample, "Reciprocal times").find("No two shots"), std::string::npos);
}

TEST(SheetChecklist, SaysWhenTheResultHasNotSettledOrIsNotDetermined) {
  auto sample = testing::sheetSample();
  EXPECT_EQ(missing(sample, "Depths with intervals"), "");
  sample.interpretation.section.converged = false;
  EXPECT_NE(missing(sample, "Depths with intervals").find("has not settled"), std::string::npos);
  sample.interpretation.section.determined = false;
  sample.interpretation.section.reason = "one shot only";
  EXPECT_EQ(missing(sample, "Depths with intervals"), "The depth is not determined: one shot only.");
}

TEST(SheetChecklist, AnEmptySurveyLacksNearlyAllAndCrashesNothing) {
  const auto sample = testing::emptySheetSample();
  int there = 0;
  for (const SheetCheck& check : sheetChecklist(sample.survey, sample.interpretation, {})) {
    there += check.missing.empty() ? 1 : 0;
  }
  EXPECT_EQ(there, 2) << "no correction needs no reason, and the draft fits";
}

}  // namespace
}  // namespace strikeplate
