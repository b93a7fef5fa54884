#include "core/survey/times_table.h"

#include <cmath>
#include <fstream>

#include <gtest/gtest.h>

#include "core/report/csv_out.h"
#include "core/survey/interpretation.h"
#include "core/survey/load.h"
#include "tests/core/survey/temporary_folder.h"

namespace strikeplate {
namespace {

Survey read(const std::string& text) {
  const auto table = parseTimesTable(text, "times.csv");
  EXPECT_TRUE(table.ok()) << (table.ok() ? "" : table.message());
  const auto survey = surveyFromTimes(*table, guessTimesColumns(*table));
  EXPECT_TRUE(survey.ok()) << (survey.ok() ? "" : survey.message());
  return survey.ok() ? *survey : Survey{};
}

std::string refusal(const std::string& text) {
  const auto table = parseTimesTable(text, "times.csv");
  if (!table) {
    return table.message();
  }
  const auto survey = surveyFromTimes(*table, guessTimesColumns(*table));
  return survey.ok() ? "" : survey.message();
}

/// Exact first arrivals of 400 over 2000 m/s, rock at 4 m, from shots at these places to 24 geophones 2 m apart.
std::string flatTable(const std::vector<double>& shots) {
  std::string text = "Shot (m);Geophone (m);Time (ms)\n";
  const double intercept = 2.0 * 4.0 * std::sqrt(1.0 / (400.0 * 400.0) - 1.0 / (2000.0 * 2000.0));
  for (const double shot : shots) {
    for (int g = 0; g < 24; ++g) {
      const double x = std::abs(2.0 * g - shot);
      const double time = std::min(x / 400.0, x / 2000.0 + intercept);
      text += std::to_string(shot) + ";" + std::to_string(2 * g) + ";" + std::to_string(1e3 * time) + "\n";
    }
  }
  return text;
}

TEST(TimesTable, RowsOfOneShotAreOneShotAndOfOneGeophoneOneGeophone) {
  const Survey survey = read(
      "shot_x_m,geophone_x_m,time_s,sigma_s\n"
      "10,4,0.010,0.0005\n-2,4,0.012,\n-2,0,0.005,\n10,0,,\n");
  ASSERT_EQ(survey.geophones.size(), 2U);
  EXPECT_EQ(survey.geophones[0].x, 0.0);
  ASSERT_EQ(survey.shots.size(), 2U);
  EXPECT_EQ(survey.shots[0].point.x, -2.0);
  EXPECT_EQ(survey.shots[0].traces[0].pick, (Pick{0.005, 1e-3, 0, PickOrigin::Imported}));
  EXPECT_EQ(survey.shots[1].traces[1].pick, (Pick{0.010, 5e-4, 0, PickOrigin::Imported}));
  EXPECT_FALSE(survey.shots[1].traces[0].pick) << "an empty time is a trace without a first break";
  EXPECT_TRUE(survey.records.empty());
}

TEST(TimesTable, UnitsFollowTheNamesAndTheSizeOfTheTimes) {
  const Survey feet = read("source ft,receiver ft,first break (ms)\n0,100,25\n");
  EXPECT_NEAR(feet.geophones[0].x, 30.48, 1e-12);
  EXPECT_NEAR(feet.shots[0].traces[0].pick->time, 0.025, 1e-15);
  EXPECT_TRUE(feet.settings.feet);
  EXPECT_NEAR(read("shot,geophone,time\n0,10,25\n").shots[0].traces[0].pick->time, 0.025, 1e-15);
  EXPECT_NEAR(read("shot,geophone,time\n0,10,0.025\n").shots[0].traces[0].pick->time, 0.025, 1e-15);
}

TEST(TimesTable, OffsetsStandForGeophones) {
  const Survey survey = read("shot,offset,time_ms,geophone elevation\n10,-4,8,101.5\n10,6,11,102\n");
  ASSERT_EQ(survey.geophones.size(), 2U);
  EXPECT_EQ(survey.geophones[0], (Geophone{6.0, 101.5}));
  EXPECT_EQ(survey.geophones[1], (Geophone{16.0, 102.0}));
  EXPECT_NEAR(survey.shots[0].point.elevation, 101.7, 1e-9) << "a shot stands on the ground between its geophones";
}

TEST(TimesTable, AColumnOfTimesForEachShotIsUnderstood) {
  const Survey survey = read("geophone\tshot at 0 m\t46\n2\t5\t40\n4\t9.5\t38\n");
  ASSERT_EQ(survey.shots.size(), 2U);
  EXPECT_EQ(survey.shots[1].point.x, 46.0);
  EXPECT_NEAR(survey.shots[1].traces[0].pick->time, 0.040, 1e-15);
  EXPECT_EQ(survey.geophones[1].x, 4.0);
}

TEST(TimesTable, ADecimalCommaIsUnderstoodBetweenSemicolons) {
  EXPECT_EQ(read("Shot;Geophone;Time ms\n0;2,5;7,25\n").geophones[0].x, 2.5);
}

TEST(TimesTable, SeveralTimesForOneTraceAreAveragedAndSaid) {
  const Survey survey = read("shot,geophone,time_ms\n0,2,5\n0,2,7\n0,4,9\n");
  EXPECT_NEAR(survey.shots[0].traces[0].pick->time, 0.006, 1e-15);
  EXPECT_EQ(survey.remarks[0], "times.csv: 1 trace has several times; their mean is used.");
}

TEST(TimesTable, ARowThatCannotBeUsedIsPassedOverAndSaid) {
  const Survey survey = read("shot,geophone,time_ms\n0,2,5\n0,4,late\n,6,9\n");
  EXPECT_EQ(survey.geophones.size(), 1U);
  EXPECT_EQ(survey.remarks[0], "line 3 of times.csv: \"late\" under time_ms is no number; the row was passed over.");
  EXPECT_EQ(survey.remarks[1],
            "line 4 of times.csv: the place of the shot or of the geophone is missing; the row was passed over.");
}

TEST(TimesTable, WhatIsNoTableOfTimesIsRefusedInOneSentence) {
  EXPECT_NE(refusal("a,b\n1,2\n").find("name the columns of shot, geophone (or offset) and time. There are: a, b."),
            std::string::npos);
  EXPECT_NE(refusal("shot,geophone,time\nx,y,z\n").find("no row holds"), std::string::npos);
  const auto table = parseTimesTable("shot,geophone,time\n0,1,2\n", "t.csv");
  TimesColumns twice = guessTimesColumns(*table);
  twice.fields[1] = TimesField::Time;
  twice.fields[2] = TimesField::Time;
  EXPECT_NE(surveyFromTimes(*table, twice).message().find("two columns"), std::string::npos);
}

TEST(TimesTable, AFlatLineFromATableGivesItsDepth) {
  const Survey survey = read(flatTable({-2, 23, 48}));
  const Interpretation answer = interpret(survey);
  ASSERT_TRUE(answer.section.determined) << answer.section.reason;
  EXPECT_NEAR(answer.section.velocities[1].value, 2000.0, 2.0);
  EXPECT_NEAR(answer.section.depthAt(2, 23.0).value, 4.0, 0.01);
}

TEST(TimesTable, ThePicksThatAreWrittenReadBackAsTheSameLine) {
  const testing::TemporaryFolder folder;
  const std::string path = folder.path("picks.csv");
  const Survey survey = read(flatTable({-2, 48}));
  {
    std::ofstream file(path, std::ios::binary);
    file << picksCsv(survey, interpret(survey));
  }
  const LoadedLine line = loadLine({path}, "");
  EXPECT_TRUE(line.problems.empty());
  EXPECT_EQ(line.filesRead, 1);
  EXPECT_EQ(line.survey.geophones, survey.geophones);
  ASSERT_EQ(line.survey.shots.size(), survey.shots.size());
  for (std::size_t s = 0; s < survey.shots.size(); ++s) {
    for (std::size_t t = 0; t < survey.shots[s].traces.size(); ++t) {
      EXPECT_EQ(line.survey.shots[s].traces[t].pick->time, survey.shots[s].traces[t].pick->time);
    }
  }
}

// Table of Geldart & Sheriff 2004, Problem 14.1 (a dam site, 12 geophones, one shot): reference W15. The velocity of
// the rock is 4330 m/s by a straight line through the last seven times; the book's two readings of the depth differ
// by 9 m or 17 %, and lie at 25.4 and 32.3 m for the two readings of the upper velocity.
TEST(TimesTable, TheDamSiteOfOneShotGivesItsRockVelocityAndADepthBetweenTheTwoReadings) {
  const Survey survey = read(
      "offset m,time ms\n15,19\n30,29\n45,39\n60,50\n75,59\n90,62\n105,65\n120,68\n135,72\n150,76\n165,78\n180,83\n");
  ASSERT_EQ(survey.shots.size(), 1U);
  EXPECT_EQ(survey.remarks[0], "times.csv names no shot; its offsets are taken from one shot at 0 m.");
  Survey two = survey;
  two.settings.layers = 2;
  const Interpretation answer = interpret(two);
  ASSERT_TRUE(answer.section.determined) << answer.section.reason;
  EXPECT_LT(answer.section.velocities[1].low95, 4330.0);
  EXPECT_GT(answer.section.velocities[1].high95, 4330.0);
  const Estimate depth = answer.section.depthAt(2, 90.0);
  EXPECT_LT(depth.low95, 32.3);
  EXPECT_GT(depth.high95, 25.4);
}

}  // namespace
}  // namespace strikeplate
