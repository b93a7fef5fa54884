// The whole job on the demo line, from records to depths, against the truth that made the records.
#include <algorithm>
#include <cmath>
#include <fstream>

#include <gtest/gtest.h>
#include <nlohmann/json.hpp>

#include "tests/app/batch_run.h"

namespace strikeplate {
namespace {

double interpolated(const std::vector<double>& x, const std::vector<double>& y, double at) {
  const auto after = std::upper_bound(x.begin(), x.end(), at);
  if (after == x.begin()) {
    return y.front();
  }
  if (after == x.end()) {
    return y.back();
  }
  const auto i = static_cast<std::size_t>(after - x.begin());
  return y[i - 1] + (at - x[i - 1]) / (x[i] - x[i - 1]) * (y[i] - y[i - 1]);
}

TEST(DemoLine, DepthsAreWithinTenPercentAtNineStationsInTenAndVelocitiesWithinFive) {
  QTemporaryDir folder;
  const auto run =
      testing::runBatchProgram(QStringList(testing::demoRecords())
                               << "--depths" << folder.filePath("depths.csv") << "--layers-out"
                               << folder.filePath("layers.csv") << "--doubts" << folder.filePath("doubts.csv"));
  ASSERT_EQ(run.status, 0) << run.errors.toStdString();
  std::ifstream file(STRIKEPLATE_SAMPLE_DATA "/demo_line/truth.json");
  const nlohmann::json truth = nlohmann::json::parse(file);
  const auto layers = testing::readCsvTable(folder.filePath("layers.csv")).rows;
  ASSERT_EQ(layers.size(), truth["layers"].size()) << run.out.toStdString();
  for (std::size_t n = 0; n < layers.size(); ++n) {
    const double vp = truth["layers"][n]["vp"];
    EXPECT_NEAR(layers[n].at("velocity_m_s").toDouble(), vp, 0.05 * vp);
  }
  const auto x = truth["interfaces"][0]["x"].get<std::vector<double>>();
  const auto z = truth["interfaces"][0]["elevation"].get<std::vector<double>>();
  int stations = 0, near = 0, covered = 0;
  for (const auto& row : testing::readCsvTable(folder.filePath("depths.csv")).rows) {
    const double at = row.at("x_m").toDouble();
    if (at < 0.0 || at > 94.0) {  // the geophones' reach
      continue;
    }
    const double depth = -interpolated(x, z, at);
    ++stations;
    near += std::abs(row.at("depth_m").toDouble() - depth) <= 0.1 * depth ? 1 : 0;
    covered += row.at("depth_low95_m").toDouble() <= depth && depth <= row.at("depth_high95_m").toDouble() ? 1 : 0;
  }
  ASSERT_GE(stations, 48);
  EXPECT_GE(near, 0.9 * stations) << near << " of " << stations;
  RecordProperty("covered_percent", 100 * covered / stations);
  // The late trigger that was put in is named.
  EXPECT_TRUE(testing::readFile(folder.filePath("doubts.csv")).contains("trigger,shot 2 at -1.0 m"));
}

}  // namespace
}  // namespace strikeplate
