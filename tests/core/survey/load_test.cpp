#include "core/survey/load.h"

#include <gtest/gtest.h>

#include "core/record/seg2_writer.h"
#include "tests/core/survey/temporary_folder.h"

namespace strikeplate {
namespace {

ShotRecord recordWith(std::vector<HeaderEntry> header) {
  ShotRecord record;
  record.source = HeaderPosition{-2.0, {}, {}};
  record.header = std::move(header);
  for (int i = 0; i < 4; ++i) {
    Trace trace;
    trace.samples = {0.0F, 1.0F, 0.5F, -1.0F};
    trace.sampleInterval = 1e-3;
    trace.receiver = HeaderPosition{2.0 * i, {}, {}};
    record.traces.push_back(std::move(trace));
  }
  return record;
}

// A recorder that nobody told anything fills its job's name with zeros; it stood as the title of the sheet.
TEST(Load, WhatARecorderFillsInForNothingIsNoName) {
  const testing::TemporaryFolder folder;
  const std::string path = folder.path("1.sg2");
  ASSERT_TRUE(writeSeg2(path, recordWith({{"JOB_ID", "0000"}, {"CLIENT", "Harrow 0"}}), {}));
  const LoadedLine line = loadLine({path}, "");
  EXPECT_EQ(line.survey.info.title, "");
  EXPECT_EQ(line.survey.info.client, "Harrow 0");
}

TEST(Load, TheChecksumIsThatOfTheFileWhenItWasRead) {
  const testing::TemporaryFolder folder;
  const std::string path = folder.path("1.sg2");
  ASSERT_TRUE(writeSeg2(path, recordWith({}), {}));
  const LoadedLine line = loadLine({path}, "");
  ASSERT_EQ(line.survey.records.size(), 1U);
  EXPECT_EQ(line.survey.records[0]->checksum.size(), 8U);
  const std::string before = line.survey.records[0]->checksum;
  ASSERT_TRUE(writeSeg2(path, recordWith({{"CLIENT", "another"}}), {}));
  EXPECT_NE(loadLine({path}, "").survey.records[0]->checksum, before);
  EXPECT_EQ(line.survey.records[0]->checksum, before);
}

}  // namespace
}  // namespace strikeplate
