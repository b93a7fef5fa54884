// Which doubts the sheet says, in which order, and how many it only counts.
#include <gtest/gtest.h>

#include "core/report/sheet.h"
#include "tests/core/report/sheet_sample.h"

namespace strikeplate {
namespace {

// Two kinds: one about the section, one about four picks whose residuals are 1, 4, 2 and 3 sigmas.
testing::SheetSample fourPicksInDoubt() {
  testing::SheetSample sample;
  Interpretation& i = sample.interpretation;
  i.doubts.push_back({"low contrast", "layer 2", "Layers differ little", "500 over 600 m/s", "a borehole"});
  const std::array<double, 4> sigmas = {1.0, 4.0, 2.0, 3.0};
  for (int p = 0; p < 4; ++p) {
    const double time = 0.02 + 0.001 * sigmas[static_cast<std::size_t>(p)];
    i.times.arrivals.push_back({0, p, p, time, 0.001, 2, false});
    i.section.predicted.push_back(0.02);
    i.doubts.push_back({"pick", "trace", "Pick " + std::to_string(p) + " is off", "", "a look", 0, p, 0, 0.0});
  }
  return sample;
}

TEST(SheetDoubts, AreGroupedByKindWithTheStrongestFirst) {
  const auto sample = fourPicksInDoubt();
  const SheetContent sheet = sheetContent(sample.survey, sample.interpretation, {});
  ASSERT_EQ(sheet.doubts.size(), 2U);
  EXPECT_EQ(sheet.doubts[0].kind, "low contrast");
  ASSERT_EQ(sheet.doubts[1].doubts.size(), 4U);
  EXPECT_EQ(sheet.doubts[1].doubts[0].says, "Pick 1 is off.");
  EXPECT_EQ(sheet.doubts[1].doubts[1].says, "Pick 3 is off.");
  EXPECT_EQ(sheet.doubts[1].doubts[3].says, "Pick 0 is off.");
}

TEST(SheetDoubts, AnAnswerIsPrintedWithItsDoubtAheadOfItsKind) {
  auto sample = fourPicksInDoubt();
  sample.survey.doubtAnswers = {{"low contrast", "layer 2", "a trial pit met the top at 2.1 m"}};
  const SheetContent sheet = sheetContent(sample.survey, sample.interpretation, {});
  EXPECT_EQ(doubtLines(sheet, 1, false).front(),
            "Layers differ little. To settle it: a borehole. Answered: a trial pit met the top at 2.1 m.");
  EXPECT_EQ(sheet.allDoubts.columns.back(), "Answered");
  EXPECT_EQ(sheet.allDoubts.rows.front().back(), "a trial pit met the top at 2.1 m.");
}

TEST(SheetDoubts, WhatIsNotPrintedIsCounted) {
  const auto sample = fourPicksInDoubt();
  const SheetContent sheet = sheetContent(sample.survey, sample.interpretation, {});
  const std::vector<std::string> expected = {"Layers differ little. 500 over 600 m/s. To settle it: a borehole.",
                                             "Pick 1 is off. To settle it: a look.", "Pick 3 is off.",
                                             "And 2 more of this kind (pick)."};
  EXPECT_EQ(doubtLines(sheet, 2, true), expected);
  EXPECT_EQ(doubtLines(sheet, 4, false).size(), 5U) << "all of them: nothing to count";
  EXPECT_EQ(doubtLines(sheet, 0, false).size(), 3U) << "never less than one of each kind";
}

TEST(SheetDoubts, TheStrongestComesWithWhatItRestsOnAndHowManyOthersThereAre) {
  const auto sample = fourPicksInDoubt();
  const SheetContent sheet = sheetContent(sample.survey, sample.interpretation, {});
  EXPECT_EQ(sheet.strongestDoubt, "Layers differ little.");
  EXPECT_EQ(sheet.strongestDoubtMore, "500 over 600 m/s. To settle it: a borehole. 4 other doubts stand on page 2.");
}

TEST(SheetDoubts, NoDoubtIsSaidToo) {
  auto sample = testing::sheetSample();
  sample.interpretation.doubts.clear();
  const SheetContent sheet = sheetContent(sample.survey, sample.interpretation, {});
  EXPECT_TRUE(sheet.strongestDoubt.empty());
  ASSERT_EQ(doubtLines(sheet, 2, true).size(), 1U);
  EXPECT_EQ(doubtLines(sheet, 2, true)[0], "The program's checks found nothing to doubt.");
}

TEST(SheetDoubts, WithoutASectionNoDoubtIsNoPraise) {
  const auto sample = testing::emptySheetSample();
  const SheetContent sheet = sheetContent(sample.survey, sample.interpretation, {});
  ASSERT_EQ(doubtLines(sheet, 2, true).size(), 1U);
  EXPECT_EQ(doubtLines(sheet, 2, true)[0], "There is no section whose doubts could be listed.");
  EXPECT_EQ(sheet.allDoubts.summary, doubtLines(sheet, 2, true)[0]);
}

TEST(SheetDoubts, AFileIsNamedWithoutItsFolders) {
  auto sample = fourPicksInDoubt();
  auto record = std::make_shared<ShotRecord>();
  record->file = "/home/someone/line 7/1001.sg2";
  sample.survey.records = {record};
  sample.interpretation.doubts[0].says = "/home/someone/line 7/1001.sg2: its trigger was late";
  const SheetContent sheet = sheetContent(sample.survey, sample.interpretation, {});
  EXPECT_EQ(sheet.strongestDoubt, "1001.sg2: its trigger was late.");
}

}  // namespace
}  // namespace strikeplate
