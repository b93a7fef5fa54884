// What page 1 must say first, what the section moved by itself, how far the line sees, and the input files.
#include <algorithm>
#include <cmath>
#include <filesystem>
#include <fstream>

#include <gtest/gtest.h>

#include "core/base/checksum.h"
#include "core/report/sheet_parts.h"
#include "core/report/sheet_reach.h"
#include "core/survey/edit.h"
#include "tests/core/report/sheet_sample.h"

namespace strikeplate {
namespace {

SheetContent contentOf(const testing::SheetSample& sample) {
  return sheetContent(sample.survey, sample.interpretation, {});
}

bool contains(const std::string& text, const std::string& part) {
  return text.find(part) != std::string::npos;
}

TEST(SheetState, AnInversionThatHasNotSettledIsTheFirstWarning) {
  auto sample = testing::sheetSample();
  EXPECT_TRUE(contentOf(sample).warnings.empty());
  sample.interpretation.section.converged = false;
  ASSERT_EQ(contentOf(sample).warnings.size(), 1U);
  EXPECT_TRUE(contains(contentOf(sample).warnings[0], "The inversion has not settled"));
  sample.interpretation.section.finished = false;
  EXPECT_TRUE(contains(contentOf(sample).warnings[0], "stopped before its end"));
}

TEST(SheetState, GeophonesWithoutADepthAreCountedAndPlaced) {
  auto sample = testing::sheetSample();
  Section& section = sample.interpretation.section;
  for (std::size_t i = 0; i < section.x.size(); ++i) {
    if (section.x[i] >= 4.0 && section.x[i] <= 8.0) {
      section.interfaces[1].depth[i] = Estimate::none("no ray");
    }
  }
  ASSERT_EQ(contentOf(sample).warnings.size(), 1U);
  EXPECT_EQ(contentOf(sample).warnings[0],
            "The depth to the top of layer 3 is not determined under 3 of 48 geophones (between 4.0 m and 8.0 m).");
  for (Estimate& depth : section.interfaces[1].depth) {
    depth = Estimate::none("no ray");
  }
  EXPECT_EQ(contentOf(sample).warnings[0],
            "The depth to the top of layer 3 is not determined anywhere under the line.");
}

TEST(SheetState, DelaysThatTheSectionSolvedForAreSaidByShot) {
  auto sample = testing::sheetSample();
  ASSERT_EQ(contentOf(sample).triggers.size(), 1U);
  EXPECT_TRUE(contains(contentOf(sample).triggers[0], "The times of 1 of 7 shots were corrected"));
  auto& delays = sample.interpretation.section.triggerDelays;
  delays.assign(7, Estimate::none("not solved for"));
  delays[1] = Estimate::normal(-0.0035, 0.00015);
  ASSERT_EQ(contentOf(sample).triggers.size(), 2U);
  EXPECT_TRUE(contains(contentOf(sample).triggers[1], "shot 2 at 13.0 m: -3.50 ms (-3.79 ms to -3.21 ms)"))
      << contentOf(sample).triggers[1];
}

TEST(SheetState, TheHiddenLayerAllowanceHasTheNumbersOfItsDoubt) {
  const auto sample = testing::sheetSample();
  const SheetContent sheet = contentOf(sample);
  EXPECT_TRUE(contains(sheet.limitations[0], "Hidden-layer allowance at 48.0 m")) << sheet.limitations[0];
  EXPECT_TRUE(contains(sheet.limitations[1], "above layer 3")) << sheet.limitations[1];
  EXPECT_TRUE(contains(sheet.limitations[2], "Reach: the longest offset with a used pick is "))
      << sheet.limitations[2];
}

TEST(SheetState, TheReachOfOneLayerIsTheCrossoverDepth) {
  // h = x/2 sqrt((v2 - v1)/(v2 + v1)): Sheriff and Geldart, Exploration Seismology (1995). 500 over 1500 m/s at
  // 40 m: 20 sqrt(1/2) = 14.142 m.
  const auto depth = unseenBelow({500.0}, {}, 40.0, 1500.0);
  ASSERT_TRUE(depth);
  EXPECT_NEAR(*depth, 14.1421356, 1e-6);
}

TEST(SheetState, TheReachOfTwoLayersIsWhereBothHeadWavesArriveTogether) {
  // 500, 1500, 3000 m/s with 5 m over 10 m: the second and third branches cross at 37.2333 m, own golden case of the
  // flat three-layer travel times.
  const auto depth = unseenBelow({500.0, 1500.0}, {5.0}, 37.2333, 3000.0);
  ASSERT_TRUE(depth);
  EXPECT_NEAR(*depth, 15.0, 1e-3);
}

TEST(SheetState, ThereIsNoReachWithoutRisingVelocitiesOrAnOffset) {
  EXPECT_FALSE(unseenBelow({500.0, 400.0}, {5.0}, 40.0, 3000.0));
  EXPECT_FALSE(unseenBelow({500.0, 1500.0}, {}, 40.0, 3000.0));
  EXPECT_FALSE(unseenBelow({500.0}, {}, 0.0, 3000.0));
  EXPECT_FALSE(unseenBelow({500.0}, {}, 40.0, 500.0));
  EXPECT_FALSE(unseenBelow({}, {}, 40.0, 500.0));
}

TEST(SheetState, MaterialsAreAHintWithRangesAndSource) {
  auto sample = testing::sheetSample();
  sample.interpretation.section.velocities[0] = Estimate::normal(420.0, 5.0);
  const std::string hint = contentOf(sample).materials;
  // Both ranges as core/methods/material_hint.h gives them.
  EXPECT_TRUE(contains(hint, "layer 1: vegetal soil (300 to 700), dry sand (400 to 1200)")) << hint;
  EXPECT_TRUE(contains(hint, "a hint and not a finding")) << hint;
  EXPECT_TRUE(contains(hint, "Source: GeoSci.xyz")) << hint;
  sample.survey.settings.feet = true;
  EXPECT_TRUE(contains(contentOf(sample).materials, "vegetal soil (984 to 2300)")) << "300 and 700 over 0.3048";
  sample.interpretation.section.velocities[0] = Estimate::none("no picks");
  EXPECT_TRUE(contains(contentOf(sample).materials, "layer 1: not determined"));
  EXPECT_EQ(contentOf(testing::emptySheetSample()).materials, "");
}

TEST(SheetAnswer, OfTheUsersOwnSaysWhenTheInterpretationHasChanged) {
  auto sample = testing::sheetSample();
  sample.survey.info.sheet.answer = "Rock lies at 5 m.";
  sample.survey.info.sheet.answerTo = sheetDraft(sample.survey, sample.interpretation);
  const auto content = [&] {
    return sheetContent(sample.survey, sample.interpretation, sheetOptionsOf(sample.survey));
  };
  EXPECT_EQ(content().answer, "Rock lies at 5 m.");
  EXPECT_TRUE(content().warnings.empty());
  sample.survey.settings.feet = true;
  EXPECT_TRUE(content().warnings.empty()) << "another unit is no other interpretation";
  sample.survey.settings.feet = false;
  sample.interpretation.section.velocities[0] = Estimate::normal(600.0, 10.0);
  EXPECT_EQ(content().answer, "Rock lies at 5 m.") << "the user's words are not dropped";
  ASSERT_EQ(content().warnings.size(), 1U) << "nor silently kept";
  EXPECT_TRUE(contains(content().warnings[0], "written before the interpretation changed")) << content().warnings[0];
  EXPECT_TRUE(contains(content().warnings[0], "600 m/s")) << "what it says now: " << content().warnings[0];
}

TEST(SheetAnswer, ChoicesComeBackFromTheSurveyAsTheyWent) {
  Survey survey;
  SheetOptions options;
  options.question = "How deep?";
  options.answer = "Deep.";
  options.answerTo = "a draft";
  options.signatory = "I. Vance";
  options.records = options.tables = options.places = true;
  survey = applied(survey, edits::setSheet(survey, sheetChoicesOf(options)));
  EXPECT_TRUE(sheetChoicesOf(sheetOptionsOf(survey)) == sheetChoicesOf(options));
}

TEST(SheetFiles, TheChecksumIsTheCommonCrc32) {
  // The check value of CRC-32 (IEEE 802.3) for the nine digits is cbf43926 in every catalogue of such codes.
  const std::string path = (std::filesystem::path(::testing::TempDir()) / "sheet checksum.dat").string();
  std::ofstream(path, std::ios::binary) << "123456789";
  EXPECT_EQ(fileChecksum(path).value_or("none"), "cbf43926");
  std::ofstream(path, std::ios::binary | std::ios::trunc).flush();
  EXPECT_EQ(fileChecksum(path).value_or("none"), "00000000");
  std::filesystem::remove(path);
  EXPECT_FALSE(fileChecksum(path));
  EXPECT_FALSE(fileChecksum(::testing::TempDir())) << "a folder";
}

TEST(SheetFiles, AreNamedOnceWithoutFolders) {
  auto sample = testing::sheetSample();
  auto record = std::make_shared<ShotRecord>(*sample.survey.records[0]);
  record->file = "C:\\Users\\someone\\line7_1.dat";
  std::fill(sample.survey.records.begin(), sample.survey.records.end(), record);
  sample.survey.info.tables = {{"/home/someone/places.csv", ""}};
  const SheetContent sheet = contentOf(sample);
  ASSERT_EQ(sheet.files.size(), 2U);
  EXPECT_EQ(sheet.files[0].name, "line7_1.dat");
  EXPECT_EQ(sheet.files[1].name, "places.csv");
  EXPECT_EQ(filesLine(sheet.files, 2), "line7_1.dat, places.csv.");
  EXPECT_EQ(filesLine(sheet.files, 1), "line7_1.dat and 1 more.");
  EXPECT_EQ(filesLine({}, 5), "No input file.");
}

}  // namespace
}  // namespace strikeplate
