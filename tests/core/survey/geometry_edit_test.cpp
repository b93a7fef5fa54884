#include "core/survey/geometry_edit.h"

#include <fstream>

#include <gtest/gtest.h>

#include "core/survey/assemble.h"
#include "core/survey/edit_check.h"
#include "core/survey/lines.h"
#include "core/survey/places_edit.h"
#include "tests/core/survey/temporary_folder.h"

namespace strikeplate {
namespace {

RecordPtr record(const std::string& file, double shotX) {
  auto r = std::make_shared<ShotRecord>();
  r->file = file;
  r->source = HeaderPosition{shotX, {}, {}};
  for (int i = 0; i < 6; ++i) {
    Trace trace;
    trace.samples.assign(20, static_cast<float>(i));
    trace.sampleInterval = 0.001;
    trace.receiver = HeaderPosition{2.0 * i, {}, {}};
    r->traces.push_back(trace);
  }
  return r;
}

/// Two blows at -2 m, of which the second is left out, and one at 12 m, all with geophones every 2 m.
Survey threeRecords() {
  Survey survey = assemble({record("a.sg2", -2.0), record("b.sg2", -2.0), record("c.sg2", 12.0)});
  survey.shots[0].blows[1].used = false;
  survey.shots[0].traces[2].pick = Pick{0.012, 0.0005, 0, PickOrigin::Hand};
  return survey;
}

class GeometryEditTest : public ::testing::Test {
 protected:
  std::string table(const std::string& csv) {
    const std::string path = folder.path("geometry.csv");
    std::ofstream(path) << csv;
    return path;
  }
  testing::TemporaryFolder folder;
};

TEST_F(GeometryEditTest, WhatIsWrittenPutsTheSameRecordsWhereTheyStood) {
  const Survey asLoaded = threeRecords();
  LinePlaces places = placesOf(asLoaded);
  for (std::size_t g = 0; g < places.geophones.size(); ++g) {
    places.geophones[g] = {0.3048 * 7.0 * static_cast<double>(g), 100.0 + 0.1 * static_cast<double>(g)};
  }
  places.shots = {{-3.0, 99.9, 0.4}, {14.0, 100.7, 0.0}};
  const auto edit = placesEdit(asLoaded, places, "Change the geometry");
  ASSERT_TRUE(edit.ok());
  const auto written = geometryTableOf(applied(asLoaded, *edit));
  ASSERT_TRUE(written) << written.message();
  EXPECT_EQ(written->rows.size(), 18U);
  const auto laid = geometryEdit(asLoaded, table(geometryCsv(*written)));
  ASSERT_TRUE(laid) << laid.message();
  EXPECT_TRUE(editFits(asLoaded, *laid));
  EXPECT_EQ(placesOf(applied(asLoaded, *laid)), places);
}

TEST_F(GeometryEditTest, ADepthInTheTableIsTheShotsDepth) {
  const Survey survey = threeRecords();
  const auto laid = geometryEdit(survey, table("file,shot_depth_m\na.sg2,1.5\nb.sg2,1.5\n"));
  ASSERT_TRUE(laid) << laid.message();
  EXPECT_EQ(applied(survey, *laid).shots[0].point.depth, 1.5);
  EXPECT_EQ(applied(survey, *laid).shots[1].point.depth, 0.0);
}

TEST_F(GeometryEditTest, PicksBlowsLeftOutAndTheOtherLinesStay) {
  Survey survey = threeRecords();
  survey = applied(survey, edits::addLine(survey, assemble({record("z.sg2", 3.0)})));
  survey = applied(survey, edits::showLine(survey, 0));
  const auto laid = geometryEdit(survey, table("file,shot_x_m\na.sg2,-4\nb.sg2,-4\n"));
  ASSERT_TRUE(laid) << laid.message();
  const Survey after = applied(survey, *laid);
  EXPECT_EQ(after.shots[0].point.x, -4.0);
  EXPECT_TRUE(after.shots[0].blows[0].used);
  EXPECT_FALSE(after.shots[0].blows[1].used);
  EXPECT_EQ(after.shots[0].traces[2].pick, survey.shots[0].traces[2].pick);
  EXPECT_EQ(lineCount(after), 2);
  EXPECT_EQ(applied(after, inverted(*laid)), survey);
}

TEST_F(GeometryEditTest, ShotsWhoseTimesCameFromATableStayWithTheirGeophones) {
  Survey survey = threeRecords();
  Shot timesOnly = survey.shots[1];
  timesOnly.blows.clear();
  timesOnly.point.x = 20.0;
  timesOnly.traces.resize(2);
  timesOnly.traces[1].geophone = 5;
  timesOnly.traces[1].pick = Pick{0.02, 0.001, 0, PickOrigin::Imported};
  survey.shots.push_back(timesOnly);
  const auto laid = geometryEdit(survey, table("trace,geophone_x_m\n1,0\n2,2\n3,4\n4,6\n5,8\n6,9\n"));
  ASSERT_TRUE(laid) << laid.message();
  const Survey after = applied(survey, *laid);
  ASSERT_EQ(after.shots.size(), 3U);
  EXPECT_TRUE(after.shots[2].blows.empty());
  EXPECT_EQ(after.shots[2].traces[1].pick, timesOnly.traces[1].pick);
  EXPECT_EQ(after.geophones[static_cast<std::size_t>(after.shots[2].traces[1].geophone)].x, 10.0);
  EXPECT_EQ(after.geophones[static_cast<std::size_t>(after.shots[0].traces[5].geophone)].x, 9.0);
}

TEST_F(GeometryEditTest, ALineWithoutRecordsHasNoTableOfThem) {
  EXPECT_FALSE(geometryTableOf(Survey{}));
}

}  // namespace
}  // namespace strikeplate
