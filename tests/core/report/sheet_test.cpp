#include "core/report/sheet.h"

#include <gtest/gtest.h>

#include "tests/core/report/sheet_sample.h"

namespace strikeplate {
namespace {

std::string valueOf(const SheetContent& sheet, const std::string& label) {
  for (const SheetField& field : sheet.head) {
    if (field.label == label) {
      return field.value;
    }
  }
  return "no such label";
}

bool contains(const std::string& text, const std::string& part) {
  return text.find(part) != std::string::npos;
}

// Level ground and an interface at 5.0 m with known intervals under three geophones.
testing::SheetSample threeGeophones() {
  testing::SheetSample sample;
  sample.survey.geophones = {{0.0, 10.0}, {5.0, 10.0}, {10.0, 10.0}};
  Section& section = sample.interpretation.section;
  section.determined = section.converged = true;
  section.layers = 2;
  section.x = {0.0, 5.0, 10.0};
  section.ground = {10.0, 10.0, 10.0};
  section.velocities = {Estimate::normal(500.0, 10.0), Estimate::normal(2003.0, 51.02)};
  SectionInterface interface;
  interface.depth = {Estimate::normal(5.0, 0.5), Estimate::normal(6.0, 0.25), Estimate::normal(4.0, 0.5)};
  interface.meanDip = Estimate::normal(-1.2, 0.2);
  section.interfaces = {interface};
  return sample;
}

TEST(Sheet, TheAnswerHoldsRangesWithTheirIntervalsInTwoSentences) {
  const auto sample = threeGeophones();
  const SheetContent sheet = sheetContent(sample.survey, sample.interpretation, {});
  EXPECT_EQ(
      sheet.answer,
      "Between 0.0 m and 10.0 m along the line the top of layer 2 lies 4.0 to 6.0 m below the ground (95 % "
      "interval over the line 3.0 to 6.5 m). The wave velocity is 500 m/s (480 to 520 m/s) in layer 1; 2000 m/s "
      "(1900 to 2100 m/s) in layer 2.");
}

TEST(Sheet, TheLayerTableHoldsLeastMeanAndMostAlongTheGeophones) {
  const auto sample = threeGeophones();
  const SheetContent sheet = sheetContent(sample.survey, sample.interpretation, {});
  ASSERT_EQ(sheet.layers.rows.size(), 2U);
  const std::vector<std::string> expected = {"2",
                                             "2000 m/s",
                                             "1900 to 2100 m/s",
                                             "4.0 m (3.0 to 5.0 m) at 10.0 m",
                                             "5.0 m (4.2 to 5.8 m)",
                                             "6.0 m (5.5 to 6.5 m) at 5.0 m",
                                             "-1.2° (-1.6 to -0.8°)"};
  EXPECT_EQ(sheet.layers.rows[1], expected);
}

TEST(Sheet, FeetAreOneFactorEverywhere) {
  auto sample = threeGeophones();
  sample.survey.settings.feet = true;
  const SheetContent sheet = sheetContent(sample.survey, sample.interpretation, {});
  // 4.0 m and 6.0 m over 0.3048; 500 m/s over 0.3048, to 10 ft/s above 1000.
  EXPECT_TRUE(contains(sheet.answer, "13.1 to 19.7 ft below the ground")) << sheet.answer;
  EXPECT_TRUE(contains(sheet.answer, "1640 ft/s")) << sheet.answer;
  EXPECT_FALSE(contains(sheet.answer, " m ")) << sheet.answer;
}

TEST(Sheet, AShallowInterfaceGetsTwoDecimals) {
  auto sample = threeGeophones();
  sample.interpretation.section.interfaces[0].depth[2] = Estimate::normal(1.234, 0.01);
  const SheetContent sheet = sheetContent(sample.survey, sample.interpretation, {});
  EXPECT_TRUE(contains(sheet.answer, "1.23 to 6.00 m")) << sheet.answer;
}

TEST(Sheet, WhatIsNotGivenSaysSoAndIsListedAsMissing) {
  const auto sample = threeGeophones();
  const SheetContent sheet = sheetContent(sample.survey, sample.interpretation, {});
  EXPECT_EQ(valueOf(sheet, "Client"), "not given");
  EXPECT_EQ(valueOf(sheet, "Sample interval"), "not given");
  EXPECT_EQ(valueOf(sheet, "Geophones"), "3, 5.00 m apart, at 0.0 to 10.0 m");
  EXPECT_NE(std::find(sheet.missing.begin(), sheet.missing.end(), "Client"), sheet.missing.end());
  EXPECT_EQ(std::find(sheet.missing.begin(), sheet.missing.end(), "Geophones"), sheet.missing.end());
}

TEST(Sheet, AnUndeterminedSectionIsSaidWithItsReasonAndWithoutNumbers) {
  auto sample = threeGeophones();
  sample.interpretation.section = Section{};
  sample.interpretation.section.reason = "one shot only; a second from the other end would help";
  const SheetContent sheet = sheetContent(sample.survey, sample.interpretation, {});
  EXPECT_EQ(sheet.answer, "The depth is not determined: one shot only; a second from the other end would help.");
  EXPECT_TRUE(sheet.layers.rows.empty());
  EXPECT_TRUE(contains(sheet.layers.summary, "not determined"));
}

TEST(Sheet, AnUndeterminedVelocityOrDepthIsSaidInItsCell) {
  auto sample = threeGeophones();
  Section& section = sample.interpretation.section;
  section.velocities[1] = Estimate::none("no picks");
  for (Estimate& depth : section.interfaces[0].depth) {
    depth = Estimate::none("no ray");
  }
  const SheetContent sheet = sheetContent(sample.survey, sample.interpretation, {});
  EXPECT_EQ(sheet.layers.rows[1][1], "not determined");
  EXPECT_EQ(sheet.layers.rows[1][4], "not determined");
  EXPECT_TRUE(contains(sheet.answer, "the depth of the top of layer 2 is not determined"));
}

TEST(Sheet, AnIntervalWithoutAnUpperBoundSaysAbove) {
  auto sample = threeGeophones();
  Estimate& velocity = sample.interpretation.section.velocities[1];
  velocity.high95 = std::numeric_limits<double>::infinity();
  const SheetContent sheet = sheetContent(sample.survey, sample.interpretation, {});
  EXPECT_EQ(sheet.layers.rows[1][2], "above 1900 m/s");
}

TEST(Sheet, TheHeadTellsHowTheLineWasRecorded) {
  const auto sample = testing::sheetSample();
  const SheetContent sheet = sheetContent(sample.survey, sample.interpretation, {});
  EXPECT_EQ(valueOf(sheet, "Sample interval"), "0.1250 ms");
  EXPECT_EQ(valueOf(sheet, "Record length"), "250.0 ms");
  EXPECT_EQ(valueOf(sheet, "Recording delay"), "-10.00 ms");
  EXPECT_EQ(valueOf(sheet, "Blows summed"), "4 at each shot point");
  EXPECT_EQ(valueOf(sheet, "Shot points"), "7, at -4.0 to 98.0 m");
}

TEST(Sheet, SecondOpinionsAreSummedUpByRoute) {
  auto sample = threeGeophones();
  sample.interpretation.opinions = {{"intercept time", 2, 0, 0.0, Estimate::normal(5.5, 0.5), ""},
                                    {"intercept time", 2, 1, 5.0, Estimate::normal(6.5, 0.01), ""},
                                    {"intercept time", 2, 1, 10.0, Estimate::normal(9.0, 0.1), ""},
                                    {"intercept time", 2, 2, 5.0, Estimate::none("no branch"), ""}};
  const SheetContent sheet = sheetContent(sample.survey, sample.interpretation, {});
  ASSERT_EQ(sheet.opinions.rows.size(), 1U);
  // The middle of 5.5, 6.5 and 9.0 is 6.5; minus 5, 6 and 4 they are 0.5, 0.5 and 5.0, the middle 0.5; the second
  // touches 6.0 + 0.49 from above at 6.48.
  const std::vector<std::string> expected = {"intercept time", "2",     "3 of 4", "5.5 to 9.0 m",
                                             "6.5 m",          "0.5 m", "2 of 3"};
  EXPECT_EQ(sheet.opinions.rows[0], expected);
}

TEST(Sheet, TheWorstReciprocalPairStandsFirst) {
  const auto sample = testing::sheetSample();
  const SheetContent sheet = sheetContent(sample.survey, sample.interpretation, {});
  ASSERT_EQ(sheet.reciprocals.rows.size(), 21U);
  EXPECT_EQ(sheet.reciprocals.rows[0][0].substr(0, 6), "3 and ");
  EXPECT_EQ(sheet.reciprocals.rows[0][5], "no");
  EXPECT_EQ(sheet.reciprocals.rows[20][5], "yes");
  EXPECT_EQ(sheet.reciprocals.summary, "17 of 21 pairs within the tolerance.");
}

TEST(Sheet, ResidualsAreThoseOfEachShotAndOfAll) {
  auto sample = threeGeophones();
  Shot shot;
  shot.point = {-1.0, 10.0, 0.0};
  shot.triggerCorrection = 0.002;
  for (int g = 0; g < 3; ++g) {
    shot.traces.push_back({g, TraceState::Live, "", Pick{0.01, 1e-3, 0, PickOrigin::Imported}});
  }
  sample.survey.shots = {shot};
  sample.interpretation.times.geophones = sample.survey.geophones;
  sample.interpretation.times.shots = {shot.point};
  sample.interpretation.times.arrivals = {
      {0, 0, 0, 0.010, 1e-3, 1, false}, {0, 1, 1, 0.021, 1e-3, 2, false}, {0, 2, 2, 0.030, 1e-3, 2, false}};
  sample.interpretation.section.predicted = {0.009, 0.020, 0.032};
  const SheetContent sheet = sheetContent(sample.survey, sample.interpretation, {});
  // Residuals 1, 1 and -2 ms: mean 0, rms sqrt(6/3) = 1.41 ms.
  const std::vector<std::string> expected = {"1 at -1.0 m", "none", "3 of 3", "0", "1.41 ms", "0.00 ms", "2.00 ms"};
  EXPECT_EQ(sheet.shots.rows[0], expected);
  EXPECT_TRUE(contains(sheet.fit[0], "3 used picks: 1.41 ms")) << sheet.fit[0];
}

TEST(Sheet, PicksAreCountedByTheirOriginAndEditsWhenThereIsAHistory) {
  const auto sample = testing::sheetSample();
  SheetOptions options;
  options.edits = 12;
  const SheetContent sheet = sheetContent(sample.survey, sample.interpretation, options);
  int hand = 0;
  for (const Shot& shot : sample.survey.shots) {
    for (const ShotTrace& trace : shot.traces) {
      hand += trace.pick && trace.pick->origin == PickOrigin::Hand ? 1 : 0;
    }
  }
  EXPECT_TRUE(contains(sheet.picks[0], std::to_string(hand) + " by hand")) << sheet.picks[0];
  EXPECT_EQ(sheet.picks.back(), "12 edits are kept in the survey's history.");
  options.edits = -1;
  EXPECT_EQ(sheetContent(sample.survey, sample.interpretation, options).picks.size(), 2U);
}

TEST(Sheet, EveryRowHasAsManyCellsAsThereAreColumns) {
  const auto sample = testing::sheetSample({120, 31, 6, 10});
  const SheetContent sheet = sheetContent(sample.survey, sample.interpretation, {});
  for (const SheetTable* table :
       {&sheet.layers, &sheet.boreholes, &sheet.opinions, &sheet.reciprocals, &sheet.shots}) {
    EXPECT_FALSE(table->rows.empty()) << table->title;
    for (const auto& row : table->rows) {
      EXPECT_EQ(row.size(), table->columns.size()) << table->title;
    }
  }
}

TEST(Sheet, BoreholesSayWhetherTheyWereUsed) {
  const auto sample = testing::sheetSample();
  const SheetContent sheet = sheetContent(sample.survey, sample.interpretation, {});
  ASSERT_EQ(sheet.boreholes.rows.size(), 2U);
  EXPECT_EQ(sheet.boreholes.rows[0].back(), "compared only");
  EXPECT_EQ(sheet.boreholes.rows[1].back(), "used as a datum");
  EXPECT_EQ(sheet.boreholes.rows[0][5], "-0.20 m");
}

TEST(Sheet, TheUsersAnswerTakesThePlaceOfTheDraft) {
  const auto sample = threeGeophones();
  SheetOptions options;
  options.answer = "Rock at 5 m.";
  EXPECT_EQ(sheetContent(sample.survey, sample.interpretation, options).answer, "Rock at 5 m.");
}

TEST(Sheet, MethodsNameTheirSourcesAndOnlyWhatWasUsed) {
  auto sample = threeGeophones();
  sample.interpretation.opinions = {{"plus-minus", 2, 0, 0.0, Estimate::normal(5.5, 0.5), ""}};
  const SheetContent sheet = sheetContent(sample.survey, sample.interpretation, {});
  ASSERT_EQ(sheet.methods.size(), 3U);
  EXPECT_TRUE(contains(sheet.methods[1], "Soske (1959)"));
  EXPECT_TRUE(contains(sheet.methods[2], "Hagedoorn (1959)"));
}

}  // namespace
}  // namespace strikeplate
