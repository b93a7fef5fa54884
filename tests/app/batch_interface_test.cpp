// The headless program's interface: options, tables, exit status.
#include <cmath>

#include <QProcess>
#include <gtest/gtest.h>

#include "core/survey/survey_file.h"
#include "tests/app/batch_run.h"

namespace strikeplate {
namespace {

using testing::BatchRun;
using testing::readCsvTable;
using testing::runBatchProgram;

class BatchInterface : public ::testing::Test {
 protected:
  QString path(const QString& name) const { return folder.filePath(name); }
  QTemporaryDir folder;
};

TEST_F(BatchInterface, EveryTableHasItsHeaderAndEveryFileIsWritten) {
  const BatchRun run = runBatchProgram(
      {testing::tinyRecord(), "--picks", path("picks.csv"), "--depths", path("depths.csv"), "--layers-out",
       path("layers.csv"), "--opinions", path("opinions.csv"), "--doubts", path("doubts.csv"), "--sheet",
       path("sheet.pdf"), "--section-dxf", path("section.dxf"), "--survey", path("line.splate")});
  EXPECT_EQ(run.status, 0) << run.errors.toStdString();
  EXPECT_EQ(readCsvTable(path("picks.csv")).header.join(','),
            "file,trace,shot_x_m,geophone_x_m,time_s,sigma_s,layer,origin,trigger_correction_s");
  EXPECT_EQ(readCsvTable(path("depths.csv")).header.join(','),
            "x_m,layer,depth_m,depth_sigma_m,depth_low95_m,depth_high95_m,elevation_m");
  EXPECT_EQ(readCsvTable(path("layers.csv")).header.join(','),
            "layer,velocity_m_s,velocity_sigma_m_s,velocity_low95_m_s,velocity_high95_m_s");
  EXPECT_EQ(readCsvTable(path("opinions.csv")).header.join(','),
            "route,layer,shot,x_m,depth_m,depth_sigma_m,assumes");
  EXPECT_EQ(readCsvTable(path("doubts.csv")).header.join(','), "kind,where,says,rests_on,would_settle");
  EXPECT_TRUE(testing::readFile(path("sheet.pdf")).startsWith("%PDF-"));
  EXPECT_TRUE(testing::readFile(path("section.dxf")).contains("SECTION"));
  EXPECT_TRUE(testing::readFile(path("line.splate")).startsWith("SQLite format 3"));
}

TEST_F(BatchInterface, ASurveyFileAsRecordGivesTheSameAnswer) {
  const BatchRun first = runBatchProgram({testing::tinyRecord(), "--survey", path("line.splate"), "--layers-out",
                                          path("a.csv"), "--depths", path("b.csv")});
  const BatchRun again =
      runBatchProgram({path("line.splate"), "--layers-out", path("c.csv"), "--depths", path("d.csv")});
  EXPECT_EQ(first.status, 0);
  EXPECT_EQ(again.status, 0) << again.errors.toStdString();
  EXPECT_EQ(testing::readFile(path("a.csv")), testing::readFile(path("c.csv")));
  EXPECT_EQ(testing::readFile(path("b.csv")), testing::readFile(path("d.csv")));
  EXPECT_FALSE(testing::readFile(path("a.csv")).isEmpty());
}

TEST_F(BatchInterface, PicksGivenAreUsedAndComeOutAsTheyWentIn) {
  QByteArray table = "file,trace,shot_x_m,geophone_x_m,time_s,sigma_s\r\n";
  for (int trace = 1; trace <= 8; ++trace) {
    table +=
        "1001.sg2," + QByteArray::number(trace) + ",,," + QByteArray::number(0.004 + 0.001 * trace) + ",0.0005\r\n";
  }
  testing::writeFile(path("in.csv"), table);
  const BatchRun run =
      runBatchProgram({testing::tinyRecord(), "--picks-in", path("in.csv"), "--picks", path("out.csv")});
  EXPECT_EQ(run.status, 0) << run.errors.toStdString();
  const auto rows = readCsvTable(path("out.csv")).rows;
  ASSERT_EQ(rows.size(), 8u);
  for (std::size_t i = 0; i < rows.size(); ++i) {
    EXPECT_EQ(rows[i].at("file"), testing::tinyRecord());
    EXPECT_EQ(rows[i].at("trace").toInt(), static_cast<int>(i) + 1);
    EXPECT_NEAR(rows[i].at("time_s").toDouble(), 0.004 + 0.001 * static_cast<double>(i + 1), 1e-12);
    EXPECT_EQ(rows[i].at("origin"), "imported");
  }
}

TEST_F(BatchInterface, TheNumberOfLayersCanBeAskedFor) {
  const BatchRun run = runBatchProgram(QStringList(testing::demoRecords()) << "--layers"
                                                                           << "3"
                                                                           << "--layers-out" << path("layers.csv"));
  EXPECT_LE(run.status, 1);
  const auto rows = readCsvTable(path("layers.csv")).rows;
  // Three layers, or, where the times do not bend twice, a reason and no number.
  EXPECT_TRUE(rows.size() == 3 || (rows.empty() && run.out.contains("No depth is determined"))) << rows.size();
}

TEST_F(BatchInterface, AGeometryTableStandsOverTheHeaders) {
  testing::writeFile(path("geometry.csv"), "file,trace,shot_x_m,geophone_x_m\r\n1001.sg2,1,100.0,101.0\r\n");
  const BatchRun run =
      runBatchProgram({testing::tinyRecord(), "--geometry", path("geometry.csv"), "--picks", path("picks.csv")});
  EXPECT_LE(run.status, 1) << run.errors.toStdString();
  const auto rows = readCsvTable(path("picks.csv")).rows;
  ASSERT_FALSE(rows.empty());
  EXPECT_EQ(rows[0].at("shot_x_m").toDouble(), 100.0);
  EXPECT_EQ(rows[0].at("geophone_x_m").toDouble(), 101.0);
}

TEST_F(BatchInterface, BlowsAtOneShotPointEachHaveTheirRows) {
  const BatchRun run = runBatchProgram(QStringList(testing::demoRecords()) << "--picks" << path("picks.csv"));
  EXPECT_EQ(run.status, 0) << run.errors.toStdString();
  std::map<QString, int> rows;
  for (const auto& row : readCsvTable(path("picks.csv")).rows) {
    ++rows[row.at("file")];
  }
  EXPECT_EQ(rows.size(), 9u);
  for (const auto& [file, count] : rows) {
    EXPECT_EQ(count, 48) << file.toStdString();
  }
}

TEST_F(BatchInterface, TheSheetsPaperUnitColoursAndPagesAreAskedForByName) {
  const BatchRun run = runBatchProgram({testing::tinyRecord(), "--paper", "letter", "--feet", "--black-and-white",
                                        "--records", "--tables", "--sheet", path("sheet.pdf"), "--xlsx",
                                        path("tables.xlsx"), "--svg", path("section.svg")});
  EXPECT_EQ(run.status, 0) << run.errors.toStdString();
  EXPECT_TRUE(testing::readFile(path("sheet.pdf")).contains("/MediaBox [0 0 612.000000 792.000000]")) << "8.5 x 11 inches";
  EXPECT_TRUE(testing::readFile(path("tables.xlsx")).startsWith("PK"));
  EXPECT_TRUE(testing::readFile(path("section.svg")).contains("distance along the line (ft)"));
  EXPECT_TRUE(testing::readFile(path("section-travel-times.svg")).contains("<svg"));
}

TEST_F(BatchInterface, WhatTheSurveyKeepsForTheSheetIsPrinted) {
  ASSERT_EQ(runBatchProgram({testing::tinyRecord(), "--survey", path("line.splate")}).status, 0);
  {
    auto file = SurveyFile::open(path("line.splate").toStdString());
    ASSERT_TRUE(file) << file.message();
    SurveyInfo info = file->survey().info;
    info.sheet.question = "Where is rock";
    info.sheet.signatory = "I. Vance";
    info.map = LineOnMap{{0.0, 8.5, 46.0}, {111.152, 8.5, 46.001}};
    ASSERT_TRUE(file->append(edits::setInfo(file->survey(), info)).ok());
  }
  const BatchRun run =
      runBatchProgram({path("line.splate"), "--sheet", path("sheet.pdf"), "--geojson", path("line.geojson")});
  EXPECT_EQ(run.status, 0) << run.errors.toStdString();
  EXPECT_TRUE(testing::readFile(path("line.geojson")).contains("\"FeatureCollection\""));
  QProcess reader;
  reader.start("pdftotext", {path("sheet.pdf"), "-"});
  ASSERT_TRUE(reader.waitForFinished());
  const QString text = QString::fromUtf8(reader.readAllStandardOutput());
  EXPECT_TRUE(text.contains("Where is rock.")) << text.toStdString();
  EXPECT_TRUE(text.contains("I. Vance"));
}

TEST_F(BatchInterface, GeoJsonOfALineWithoutAPlaceIsRefusedInWords) {
  const BatchRun run = runBatchProgram({testing::tinyRecord(), "--geojson", path("line.geojson")});
  EXPECT_EQ(run.status, 1);
  EXPECT_TRUE(run.errors.contains("no place on the map")) << run.errors.toStdString();
  EXPECT_TRUE(testing::readFile(path("line.geojson")).isEmpty());
}

TEST_F(BatchInterface, WrongUsageIsStatusTwoWithOneSentence) {
  for (const QStringList& arguments :
       {QStringList{}, QStringList{"--layers", "9", testing::tinyRecord()},
        QStringList{testing::tinyRecord(), "--what"}, QStringList{testing::tinyRecord(), "--paper", "a3"},
        QStringList{testing::tinyRecord(), "--sheet"}}) {
    const BatchRun run = runBatchProgram(arguments);
    EXPECT_EQ(run.status, 2) << arguments.join(' ').toStdString();
    EXPECT_EQ(run.errors.count('\n'), 1) << run.errors.toStdString();
    EXPECT_TRUE(run.out.isEmpty());
  }
}

}  // namespace
}  // namespace strikeplate
