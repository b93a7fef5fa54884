// A line longer than its spread: the same shot points recorded by one spread after the other, from file to depth.
#include <cmath>
#include <random>
#include <set>

#include <gtest/gtest.h>

#include "core/record/seg2_writer.h"
#include "core/survey/load.h"
#include "core/survey/merge.h"
#include "core/survey/places_edit.h"
#include "tests/app/batch_run.h"

namespace strikeplate {
namespace {

using testing::readCsvTable;

constexpr double kV1 = 500.0, kV2 = 2000.0, kDepth = 4.0;  // m/s, m: two flat layers
constexpr double kSpacing = 2.0;

/// First arrival over two flat layers, s; the intercept time formula of every textbook (Telford, Geldart & Sheriff,
/// Applied Geophysics, 2nd ed. 1990, section 4.3).
double arrival(double offset) {
  const double intercept = 2.0 * kDepth * std::sqrt(1.0 / (kV1 * kV1) - 1.0 / (kV2 * kV2));
  return std::min(offset / kV1, offset / kV2 + intercept);
}

class RollAlong : public ::testing::Test {
 protected:
  /// A blow at `shot` on twelve geophones from `first`, m; the name of the file.
  QString blow(double shot, double first) {
    ShotRecord record;
    record.source = HeaderPosition{shot, {}, {}};
    std::normal_distribution<double> noise(0.0, 0.005);
    for (int t = 0; t < 12; ++t) {
      Trace trace;
      trace.sampleInterval = 0.00025;
      trace.delay = -0.02;
      trace.receiver = HeaderPosition{first + kSpacing * t, {}, {}};
      const double offset = std::abs(trace.receiver->x - shot);
      for (int i = 0; i < 600; ++i) {
        const double u = (trace.timeOf(i) - arrival(offset)) / 0.003;
        const double wave = u > 0.0 ? u * u * std::exp(2.0 * (1.0 - u)) * std::cos(1.2 * (u - 1.0)) : 0.0;
        trace.samples.push_back(static_cast<float>(wave / (1.0 + 0.1 * offset) + noise(random)));
      }
      record.traces.push_back(std::move(trace));
    }
    const QString path = folder.filePath(QString("%1.sg2").arg(1000 + files++));
    EXPECT_TRUE(writeSeg2(path.toStdString(), record, {}));
    return path;
  }

  /// Every shot point on one spread after the other; the spreads overlap by two geophones.
  QStringList spread(double first) {
    QStringList paths;
    for (const double shot : {-1.0, 11.0, 21.0, 31.0, 43.0}) {
      paths << blow(shot, first);
    }
    return paths;
  }

  QTemporaryDir folder;
  int files = 0;
  std::mt19937 random{7};
};

std::vector<std::string> names(const QStringList& paths) {
  std::vector<std::string> out;
  for (const QString& path : paths) {
    out.push_back(path.toStdString());
  }
  return out;
}

TEST_F(RollAlong, TwoSpreadsAreOneLineAndBlowsOnDifferentGeophonesAreNotStacked) {
  const QStringList a = spread(0.0), b = spread(20.0);
  const Survey line = loadLine(names(a + b), "").survey;
  EXPECT_EQ(line.geophones.size(), 22U);
  ASSERT_EQ(line.shots.size(), 10U);
  for (const Shot& shot : line.shots) {
    EXPECT_EQ(shot.blows.size(), 1U);
    EXPECT_EQ(shot.traces.size(), 12U);
  }
  const Survey added = merged(loadLine(names(a), "").survey, loadLine(names(b), "").survey);
  EXPECT_EQ(placesOf(added), placesOf(line));
}

TEST_F(RollAlong, AThirdBlowOnTheSecondSpreadIsStackedThereOnly) {
  const QStringList paths = {blow(11.0, 0.0), blow(11.0, 20.0), blow(11.0, 20.0)};
  const Survey line = loadLine(names(paths), "").survey;
  ASSERT_EQ(line.shots.size(), 2U);
  EXPECT_EQ(line.shots[0].blows.size(), 1U);
  EXPECT_EQ(line.shots[1].blows.size(), 2U);
}

TEST_F(RollAlong, TheBatchProgramFindsTheRockUnderTheWholeLine) {
  const QStringList paths = spread(0.0) + spread(20.0);
  const QString depths = folder.filePath("depths.csv"), layers = folder.filePath("layers.csv"),
                picks = folder.filePath("picks.csv");
  const testing::BatchRun run =
      testing::runBatchProgram(paths + QStringList{"--depths", depths, "--layers-out", layers, "--picks", picks});
  EXPECT_EQ(run.status, 0) << run.errors.toStdString();
  int picked = 0;
  std::set<QString> seen;
  for (const auto& row : readCsvTable(picks).rows) {
    seen.insert(row.at("file"));
    if (row.at("time_s").isEmpty()) {
      continue;
    }
    const double offset = std::abs(row.at("geophone_x_m").toDouble() - row.at("shot_x_m").toDouble());
    picked += std::abs(row.at("time_s").toDouble() - arrival(offset)) < 0.001 ? 1 : 0;
  }
  EXPECT_EQ(seen.size(), 10U);
  EXPECT_GE(picked, 108) << "of 120 within 1 ms";
  const auto velocities = readCsvTable(layers).rows;
  ASSERT_EQ(velocities.size(), 2U) << run.out.toStdString();
  EXPECT_NEAR(velocities[0].at("velocity_m_s").toDouble(), kV1, 0.05 * kV1);
  EXPECT_NEAR(velocities[1].at("velocity_m_s").toDouble(), kV2, 0.05 * kV2);
  int stations = 0, close = 0;
  for (const auto& row : readCsvTable(depths).rows) {
    ++stations;
    close += std::abs(row.at("depth_m").toDouble() - kDepth) < 0.1 * kDepth ? 1 : 0;
  }
  EXPECT_GE(stations, 22);
  EXPECT_GE(10 * close, 9 * stations) << close << " of " << stations;
}

}  // namespace
}  // namespace strikeplate
