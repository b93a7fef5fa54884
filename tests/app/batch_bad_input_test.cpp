// What a wrong file brings: one clear sentence, the right status, nothing lost.
#include <gtest/gtest.h>

#include "core/record/seg2_reader.h"
#include "core/record/seg2_writer.h"
#include "tests/app/batch_run.h"

namespace strikeplate {
namespace {

using testing::BatchRun;
using testing::runBatchProgram;

class BatchBadInput : public ::testing::Test {
 protected:
  QString path(const QString& name) const { return folder.filePath(name); }

  /// The program's own sentences on standard error, without what Qt itself may say.
  static QStringList sentences(const BatchRun& run) {
    QStringList out;
    for (const QString& line : run.errors.split('\n', Qt::SkipEmptyParts)) {
      if (line.startsWith("strikeplate-batch: ")) {
        out << line;
      }
    }
    return out;
  }

  /// Alone the file is of no use; beside a good one it is named and the rest is done.
  void expectRefused(const QString& file, const QString& word) {
    const BatchRun alone = runBatchProgram({file});
    EXPECT_EQ(alone.status, 3) << alone.errors.toStdString();
    const BatchRun beside = runBatchProgram({testing::tinyRecord(), file, "--depths", path("depths.csv")});
    EXPECT_EQ(beside.status, 1) << beside.errors.toStdString();
    ASSERT_EQ(sentences(beside).size(), 1) << beside.errors.toStdString();
    EXPECT_TRUE(sentences(beside)[0].contains(file)) << beside.errors.toStdString();
    EXPECT_TRUE(sentences(beside)[0].contains(word)) << beside.errors.toStdString();
    EXPECT_GT(testing::readCsvTable(path("depths.csv")).rows.size(), 0u);
  }

  QTemporaryDir folder;
};

TEST_F(BatchBadInput, AnEmptyFile) {
  testing::writeFile(path("empty.sg2"), {});
  expectRefused(path("empty.sg2"), "empty");
}

TEST_F(BatchBadInput, ATextFileRenamed) {
  testing::writeFile(path("notes.sg2"), "Shot 3 was muddy.\nGeophone 7 swapped.\n");
  expectRefused(path("notes.sg2"), "text file");
}

TEST_F(BatchBadInput, AMissingFile) {
  expectRefused(path("nothing.sg2"), "does not exist");
}

TEST_F(BatchBadInput, AFolder) {
  expectRefused(folder.path(), "folder");
}

TEST_F(BatchBadInput, ATruncatedRecordIsReadAsFarAsItGoesAndSaysWhatIsMissing) {
  const QByteArray whole = testing::readFile(testing::demoRecords()[2]);
  testing::writeFile(path("cut.sg2"), whole.left(whole.size() / 2));
  const BatchRun run = runBatchProgram({path("cut.sg2"), "--picks", path("picks.csv")});
  EXPECT_EQ(run.status, 1) << run.errors.toStdString();
  EXPECT_TRUE(run.errors.contains("cut.sg2 could be read in part only")) << run.errors.toStdString();
  EXPECT_TRUE(run.errors.contains("missing")) << run.errors.toStdString();
  EXPECT_GT(testing::readCsvTable(path("picks.csv")).rows.size(), 10u);
}

TEST_F(BatchBadInput, ARecordWithOneTraceGivesAReasonAndNoDepth) {
  auto record = readSeg2(testing::tinyRecord().toStdString());
  ASSERT_TRUE(record);
  ShotRecord one = *record;
  one.traces.resize(1);
  ASSERT_TRUE(writeSeg2(path("one.sg2").toStdString(), one, {}));
  const BatchRun run = runBatchProgram({path("one.sg2"), "--depths", path("depths.csv")});
  EXPECT_EQ(run.status, 0) << run.errors.toStdString();
  EXPECT_TRUE(run.out.startsWith("No depth is determined: ")) << run.out.toStdString();
  EXPECT_EQ(testing::readCsvTable(path("depths.csv")).rows.size(), 0u);
}

TEST_F(BatchBadInput, TablesWithoutTheNeededColumn) {
  testing::writeFile(path("wrong.csv"), "a,b,c\n1,2,3\n");
  for (const char* option : {"--geometry", "--picks-in"}) {
    const BatchRun run = runBatchProgram({testing::tinyRecord(), option, path("wrong.csv")});
    EXPECT_EQ(run.status, 1) << run.errors.toStdString();
    ASSERT_EQ(sentences(run).size(), 1) << run.errors.toStdString();
    EXPECT_TRUE(sentences(run)[0].contains("wrong.csv has no column")) << run.errors.toStdString();
  }
}

TEST_F(BatchBadInput, WhatCannotBeWrittenIsNamedAndTheRestIsWritten) {
  for (const char* option : {"--sheet", "--depths", "--section-dxf", "--survey"}) {
    const BatchRun run =
        runBatchProgram({testing::tinyRecord(), option, "/no/such/folder/x", "--picks", path("picks.csv")});
    EXPECT_EQ(run.status, 1) << option << run.errors.toStdString();
    ASSERT_EQ(sentences(run).size(), 1) << option << run.errors.toStdString();
    EXPECT_TRUE(sentences(run)[0].contains("/no/such/folder/x")) << run.errors.toStdString();
    EXPECT_EQ(testing::readCsvTable(path("picks.csv")).rows.size(), 8u);
  }
}

TEST_F(BatchBadInput, AFullDiskIsSaid) {
  for (const char* option : {"--sheet", "--depths"}) {
    const BatchRun run = runBatchProgram({testing::tinyRecord(), option, "/dev/full"});
    EXPECT_EQ(run.status, 1) << option;
    EXPECT_TRUE(run.errors.contains("/dev/full could not be written")) << run.errors.toStdString();
  }
}

}  // namespace
}  // namespace strikeplate
