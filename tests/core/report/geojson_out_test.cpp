// GeoJSON as RFC 7946 has it, read back by Python's own JSON reader: longitude first, degrees, WGS 84 and nothing
// else.
#include "core/report/geojson_out.h"

#include <cstdlib>
#include <filesystem>
#include <fstream>

#include <gtest/gtest.h>

#include "core/report/csv_out.h"
#include "tests/core/report/sheet_sample.h"

namespace strikeplate {
namespace {

TEST(GeoJson, HoldsStationsAndDepthsOfTheTables) {
  auto sample = testing::sheetSample();
  sample.survey.info.map = testing::sampleMap();
  sample.survey.info.title = "not UTF-8: \xFF";
  const auto text = geoJson(sample.survey, sample.interpretation);
  ASSERT_TRUE(text) << text.message();
  const std::filesystem::path folder(::testing::TempDir());
  const std::string line = (folder / "geojson_out_test.geojson").string();
  const std::string depths = (folder / "geojson_out_test.csv").string();
  const std::string script = (folder / "geojson_out_test.py").string();
  ASSERT_TRUE(writeTextFile(line, *text));
  ASSERT_TRUE(writeTextFile(depths, depthsCsv(sample.survey, sample.interpretation)));
  std::ofstream(script) << R"(
import csv, json, sys
d = json.load(open(sys.argv[1], encoding='utf-8'))
assert d['type'] == 'FeatureCollection' and 'crs' not in d
f = d['features']
kinds = [x['properties']['kind'] for x in f]
assert (kinds.count('line'), kinds.count('geophone'), kinds.count('shot'), kinds.count('borehole')) == (1, 48, 7, 2)
assert all(x['type'] == 'Feature' for x in f)
g = {x['properties']['x_m']: x for x in f if x['properties']['kind'] == 'geophone'}
assert g[0]['geometry'] == {'type': 'Point', 'coordinates': [8.5, 46.0]}, g[0]
assert abs(g[94]['geometry']['coordinates'][1] - 46.0 - 94 / 111152) < 2e-8
n = 0
for row in csv.DictReader(open(sys.argv[2])):
    p = g[float(row['x_m'])]['properties']
    for name in ('depth', 'low95', 'high95'):
        c = row['depth_m' if name == 'depth' else 'depth_%s_m' % name]
        assert p['layer_%s_%s_m' % (row['layer'], name)] == float(c), (row, p)
        n += 1
assert n == 48 * 2 * 3, n
assert {x['properties']['in_section'] for x in f if x['properties']['kind'] == 'borehole'} == {'used', 'compared'}
)";
  EXPECT_EQ(std::system(("python3 '" + script + "' '" + line + "' '" + depths + "'").c_str()), 0);
  for (const std::string& path : {line, depths, script}) {
    std::filesystem::remove(path);
  }
}

TEST(GeoJson, WhatIsNotDeterminedIsNull) {
  auto sample = testing::sheetSample();
  sample.survey.info.map = testing::sampleMap();
  for (Estimate& depth : sample.interpretation.section.interfaces[0].depth) {
    depth = Estimate::none("no ray");
  }
  EXPECT_NE(geoJson(sample.survey, sample.interpretation)->find("\"layer_2_depth_m\": null"), std::string::npos);
}

TEST(GeoJson, ALineWithoutAPlaceOrWithAWrongOneIsRefusedInOneSentence) {
  auto sample = testing::sheetSample();
  EXPECT_NE(geoJson(sample.survey, sample.interpretation).message().find("no place on the map"), std::string::npos);
  sample.survey.info.map = testing::sampleMap();
  sample.survey.info.map->first.longitude = 9.5;
  EXPECT_NE(geoJson(sample.survey, sample.interpretation).message().find("apart on the map"), std::string::npos);
}

}  // namespace
}  // namespace strikeplate
