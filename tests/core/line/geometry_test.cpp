#include <gtest/gtest.h>

#include "core/line/geometry_checks.h"
#include "core/line/geometry_table.h"
#include "core/line/make_gather.h"

namespace strikeplate {
namespace {

ShotRecord recordOf(const std::string& file, int first, int traces) {
  ShotRecord record;
  record.file = file;
  record.firstTraceInFile = first;
  record.source = HeaderPosition{-2.0, {}, {}};
  for (int i = 0; i < traces; ++i) {
    Trace trace;
    trace.samples = {0.0F, 1.0F, static_cast<float>(i), 0.5F};
    trace.sampleInterval = 0.001;
    trace.receiver = HeaderPosition{2.0 * i, {}, {}};
    record.traces.push_back(std::move(trace));
  }
  return record;
}

GeometryTable tableOf(const std::string& csv) {
  const auto table = parseGeometryTable(csv, "geo.csv");
  EXPECT_TRUE(table) << table.message();
  return *table;
}

TEST(GeometryTable, RowsGoOverTheHeadersAndBlankCellsLeaveThem) {
  const auto table = tableOf(
      "file,trace,shot_x_m,shot_elevation_m,shot_depth_m,geophone_x_m,geophone_elevation_m\n"
      ",,,100.5,,,\n"
      "a.sg2,,-5,,0.5,,\n"
      "a.sg2,2,,,,2.5,101\n");
  const auto out = applyGeometry(table, recordOf("line/a.sg2", 1, 3));
  ASSERT_TRUE(out.matched);
  EXPECT_EQ(out.record.source->x, -5.0);
  EXPECT_EQ(out.record.source->z, 100.5);
  EXPECT_EQ(out.record.sourceDepth, 0.5);
  EXPECT_EQ(out.record.traces[0].receiver->x, 0.0);
  EXPECT_EQ(out.record.traces[1].receiver->x, 2.5);
  EXPECT_EQ(out.record.traces[1].receiver->z, 101.0);
  EXPECT_EQ(out.remarks,
            (std::vector<std::string>{
                "line/a.sg2: the header puts the shot at -2.00 m, geo.csv at -5.00 m, which is used.",
                "line/a.sg2: geo.csv moves the geophones of trace 2 by up to 0.50 m against the header."}));
  const auto other = applyGeometry(table, recordOf("b.sg2", 1, 3));
  EXPECT_EQ(other.record.source->x, -2.0);
  EXPECT_EQ(other.record.source->z, 100.5);
}

TEST(GeometryTable, FeetAndMissingTraceColumnAreUnderstood) {
  const auto table = tableOf("File;Geophone_X_ft\na.sg2;0\na.sg2;10\na.sg2;20\n");
  const auto out = applyGeometry(table, recordOf("a.sg2", 1, 3));
  EXPECT_NEAR(out.record.traces[2].receiver->x, 6.096, 1e-12);
}

TEST(GeometryTable, ShotsOfOneFileAreToldApartByTheirTraces) {
  const auto table = tableOf("file,trace,shot_x_m\nall.sgy,1,-1\nall.sgy,4,25\n");
  EXPECT_EQ(applyGeometry(table, recordOf("all.sgy", 1, 3)).record.source->x, -1.0);
  EXPECT_EQ(applyGeometry(table, recordOf("all.sgy", 4, 3)).record.source->x, 25.0);
}

TEST(GeometryTable, WhatIsWrittenIsReadBack) {
  const ShotRecord record = recordOf("a,b.sg2", 1, 3);
  const auto table = tableOf(geometryCsv(geometryOf({&record})));
  ASSERT_EQ(table.rows.size(), 3u);
  EXPECT_EQ(table.rows[2].file, "a,b.sg2");
  EXPECT_EQ(table.rows[2].geophoneX, 4.0);
  EXPECT_EQ(table.rows[2].shotX, -2.0);
  EXPECT_FALSE(table.rows[2].geophoneElevation);
}

TEST(GeometryTable, MistakesAreNamedWithTheirLine) {
  EXPECT_NE(parseGeometryTable("file,time\na,1\n", "geo.csv").message().find("geo.csv has no column of positions"),
            std::string::npos);
  EXPECT_EQ(parseGeometryTable("trace,geophone_x_m\n1,2.0\n2,4 m\n", "geo.csv").message(),
            "geophone_x_m in line 3 of geo.csv is \"4 m\", which is not a number with a decimal point.");
  EXPECT_EQ(parseGeometryTable("trace,geophone_x_m\n,2.0\n", "geo.csv").message(),
            "line 2 of geo.csv gives a geophone but no trace that it belongs to; fill in the trace.");
  EXPECT_EQ(parseGeometryTable("trace,geophone_x_m\n0,2.0\n", "geo.csv").message(),
            "trace in line 2 of geo.csv is \"0\", which is not a trace number (1, 2, ...).");
}

TEST(GeometryTable, RowsThatFitNothingAreListed) {
  const ShotRecord record = recordOf("a.sg2", 1, 3);
  const auto table = tableOf("file,trace,geophone_x_m\na.sg2,3,1\na.sg2,4,1\na.sg2,5,1\nb.sg2,1,1\n");
  EXPECT_EQ(unusedRows(table, {&record}),
            (std::vector<std::string>{
                "Lines 3 and 4 of geo.csv fit no trace of the files read (a.sg2); check file and trace.",
                "Line 5 of geo.csv fit no trace of the files read (b.sg2); check file and trace."}));
}

std::vector<Geophone> spread(int count, double spacing) {
  std::vector<Geophone> out;
  for (int i = 0; i < count; ++i) {
    out.push_back({spacing * i, 10.0 + 0.05 * i});
  }
  return out;
}

TEST(GeometryChecks, RegularLineHasNothingToSay) {
  EXPECT_TRUE(checkGeometry(spread(24, 2.0), {{-2.0, 10.0, 0.0}, {23.0, 10.575, 0.0}, {10.0, 10.25, 0.0}}).empty());
  EXPECT_TRUE(checkGeometry({}, {}).empty());
  EXPECT_TRUE(checkGeometry({{1.0, 0.0}}, {{1.0, 0.0, 0.0}}).empty());
}

TEST(GeometryChecks, EachFaultIsNamedOnce) {
  auto line = spread(12, 2.0);
  line[5].x = 10.7;  // gaps of 2.7 and 1.3
  EXPECT_EQ(checkGeometry(line, {}).size(), 0u);
  line[5].x = 11.5;
  EXPECT_EQ(checkGeometry(line, {}).size(), 2u);
  line = spread(12, 2.0);
  line[5].x = line[4].x;
  EXPECT_EQ(checkGeometry(line, {}).front(), "Two geophones stand at 8.00 m; check their positions.");
  line = spread(12, 2.0);
  line[6].elevation += 3.0;
  const auto said = checkGeometry(line, {});
  ASSERT_EQ(said.size(), 1u);
  EXPECT_EQ(said[0],
            "The geophone at 12.00 m stands 3.00 m above the line between its neighbours; check its elevation.");
  EXPECT_EQ(checkGeometry(spread(12, 2.0), {{4.1, 10.1, 0.0}}).size(), 1u);
  EXPECT_EQ(checkGeometry(spread(12, 2.0), {{5.0, 0.0, 0.0}}).size(), 1u);
}

TEST(GeometryChecks, HeadersThatRunBackAndForthAreNamed) {
  ShotRecord record = recordOf("a.sg2", 1, 6);
  EXPECT_TRUE(checkHeaders(record).empty());
  record.traces[3].receiver->x = 1.0;
  EXPECT_EQ(checkHeaders(record).size(), 1u);
  record = recordOf("a.sg2", 1, 6);
  record.source->x = 500.0;
  EXPECT_EQ(checkHeaders(record).size(), 1u);
}

TEST(MakeGather, OneBlowGivesItsOwnSamples) {
  const ShotRecord record = recordOf("a.sg2", 1, 3);
  const auto gather = makeGather({&record}, {0.0}, {-2.0, 0.0, 0.0}, spread(3, 2.0));
  ASSERT_TRUE(gather) << gather.message();
  EXPECT_EQ(gather->traces[2].values(), record.traces[2].samples);
  EXPECT_EQ(gather->offset(2), 6.0);
  EXPECT_EQ(gather->states[0], TraceState::Live);
}

TEST(MakeGather, OneBlowOnOneTimeAxisIsSharedWithItsRecordAndOtherwiseTheSame) {
  const auto record = std::make_shared<const ShotRecord>(recordOf("a.sg2", 1, 3));
  const auto shared = gatherOfOneBlow(record, {-2.0, 0.0, 0.0}, spread(3, 2.0));
  const auto made = makeGather({record.get()}, {0.0}, {-2.0, 0.0, 0.0}, spread(3, 2.0));
  ASSERT_TRUE(shared && made);
  EXPECT_EQ(shared->start, made->start);
  EXPECT_EQ(shared->sampleInterval, made->sampleInterval);
  EXPECT_EQ(shared->states, made->states);
  for (std::size_t t = 0; t < 3; ++t) {
    EXPECT_EQ(shared->traces[t].values(), made->traces[t].values());
    EXPECT_TRUE(shared->traces[t].sharedWith(record->traces[t].samples));
  }
  ShotRecord other = *record;
  other.traces[1].delay += 0.001;
  EXPECT_FALSE(gatherOfOneBlow(std::make_shared<const ShotRecord>(other), {}, spread(3, 2.0)));
}

}  // namespace
}  // namespace strikeplate
