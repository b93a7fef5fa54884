#include "core/report/csv_out.h"

#include <gtest/gtest.h>

#include "core/base/csv.h"
#include "core/base/numbers.h"
#include "tests/core/report/sheet_sample.h"

namespace strikeplate {
namespace {

CsvTable tableOf(const std::string& text) {
  auto table = parseCsv(text, "out.csv");
  EXPECT_TRUE(table.ok());
  return std::move(table).value();
}

class CsvOut : public ::testing::Test {
 protected:
  const testing::SheetSample sample_ = testing::sheetSample();
  const Survey& survey_ = sample_.survey;
  const Interpretation& interpretation_ = sample_.interpretation;
};

TEST_F(CsvOut, ColumnsAreThoseOfTheInterface) {
  EXPECT_TRUE(
      picksCsv(survey_, interpretation_)
          .starts_with("file,trace,shot_x_m,geophone_x_m,time_s,sigma_s,layer,origin,trigger_correction_s\r\n"));
  EXPECT_TRUE(depthsCsv(survey_, interpretation_)
                  .starts_with("x_m,layer,depth_m,depth_sigma_m,depth_low95_m,depth_high95_m,elevation_m\r\n"));
  EXPECT_TRUE(layersCsv(interpretation_)
                  .starts_with("layer,velocity_m_s,velocity_sigma_m_s,velocity_low95_m_s,velocity_high95_m_s\r\n"));
  EXPECT_TRUE(opinionsCsv(interpretation_).starts_with("route,layer,shot,x_m,depth_m,depth_sigma_m,assumes\r\n"));
  EXPECT_TRUE(doubtsCsv(interpretation_).starts_with("kind,where,says,rests_on,would_settle\r\n"));
}

TEST_F(CsvOut, EachBlowCarriesThePickMovedByItsLag) {
  const CsvTable table = tableOf(picksCsv(survey_, interpretation_));
  ASSERT_EQ(table.rows.size(), 7U * 2U * 48U);
  const auto& first = table.rows[0];
  const auto& second = table.rows[48];
  EXPECT_EQ(first[0], "line7_1.dat");
  EXPECT_EQ(second[0], "line7_2.dat");
  EXPECT_EQ(first[1], "1");
  EXPECT_EQ(second[1], "1");
  EXPECT_EQ(parseNumber(first[4]), survey_.shots[0].traces[0].pick->time);
  EXPECT_EQ(parseNumber(second[4]), survey_.shots[0].traces[0].pick->time + 2.5e-4);
  EXPECT_EQ(first[7], "hand");
  EXPECT_EQ(table.rows[1][7], "automatic");
}

TEST_F(CsvOut, ATraceWithoutAUsablePickHasAnEmptyTime) {
  const CsvTable table = tableOf(picksCsv(survey_, interpretation_));
  for (const std::size_t column : {4U, 5U, 6U, 7U}) {
    EXPECT_EQ(table.rows[3][column], "");           // not picked
    EXPECT_EQ(table.rows[2 * 48 + 5][column], "");  // dead
  }
  EXPECT_EQ(table.rows[3][8], "0");
}

TEST_F(CsvOut, TheLayerIsTheSettledOneAndTheTriggerCorrectionStandsBeside) {
  const CsvTable table = tableOf(picksCsv(survey_, interpretation_));
  const std::size_t row = 2 * 2 * 48 + 7;  // third shot, eighth trace
  EXPECT_EQ(parseNumber(table.rows[row][8]), -0.0015);
  EXPECT_EQ(parseNumber(table.rows[row][4]), survey_.shots[2].traces[7].pick->time);
  const int layer = testing::sampleTime(survey_.shots[2].point.x, 14.0, 3).second;
  EXPECT_EQ(table.rows[row][6], std::to_string(layer));
}

TEST_F(CsvOut, TracesCountFromOneWithinTheirFile) {
  Survey survey = survey_;
  auto record = std::make_shared<ShotRecord>(*survey.records[0]);
  record->firstTraceInFile = 49;
  survey.records[0] = record;
  EXPECT_EQ(tableOf(picksCsv(survey, interpretation_)).rows[2][1], "51");
}

TEST_F(CsvOut, AShotWithoutRecordsHasOneRowForEachTrace) {
  Survey survey = survey_;
  survey.shots[0].blows.clear();
  const CsvTable table = tableOf(picksCsv(survey, interpretation_));
  EXPECT_EQ(table.rows.size(), (7U * 2U - 1U) * 48U);
  EXPECT_EQ(table.rows[4][0], "");
  EXPECT_EQ(table.rows[4][1], "5");
}

TEST_F(CsvOut, DepthsStandAtEveryGeophoneInFullPrecision) {
  const CsvTable table = tableOf(depthsCsv(survey_, interpretation_));
  ASSERT_EQ(table.rows.size(), 48U * 2U);
  const Estimate depth = interpretation_.section.depthAt(3, 2.0);
  EXPECT_EQ(table.rows[3][1], "3");
  EXPECT_EQ(parseNumber(table.rows[3][2]), depth.value);
  EXPECT_EQ(parseNumber(table.rows[3][4]), depth.low95);
  EXPECT_EQ(parseNumber(table.rows[3][6]), survey_.geophones[1].elevation - depth.value);
}

TEST_F(CsvOut, WhatIsNotDeterminedIsAnEmptyCell) {
  const CsvTable opinions = tableOf(opinionsCsv(interpretation_));
  EXPECT_EQ(opinions.rows.back()[4], "");
  EXPECT_EQ(opinions.rows.back()[2], "");
  EXPECT_EQ(opinions.rows.front()[2], "1");
  Interpretation open = interpretation_;
  open.section.velocities[1] = Estimate::none("no head wave");
  EXPECT_EQ(tableOf(layersCsv(open)).rows[1][1], "");
  EXPECT_EQ(depthsCsv(survey_, Interpretation{}),
            "x_m,layer,depth_m,depth_sigma_m,depth_low95_m,depth_high95_m,elevation_m\r\n");
}

TEST_F(CsvOut, WordsWithCommasAndQuotesAreQuoted) {
  Interpretation odd = interpretation_;
  odd.doubts = {{"kind", "shot 1, trace 2", "He said \"late\"", "", "", -1, -1, 0, Estimate::kNaN}};
  EXPECT_EQ(doubtsCsv(odd),
            "kind,where,says,rests_on,would_settle\r\nkind,\"shot 1, trace 2\",\"He said \"\"late\"\"\",,\r\n");
}

TEST_F(CsvOut, AFileThatCannotBeWrittenIsOneSentence) {
  const Outcome outcome = writeTextFile("/no/such/folder/picks.csv", "x");
  ASSERT_FALSE(outcome.ok());
  EXPECT_NE(outcome.message().find("/no/such/folder/picks.csv could not be written"), std::string::npos);
}

}  // namespace
}  // namespace strikeplate
