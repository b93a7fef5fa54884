#include "core/record/read_files.h"

#include <filesystem>

#include <gtest/gtest.h>
#include <unistd.h>

#include "core/record/seg2_writer.h"
#include "tests/core/record/allocation_count.h"
#include "tests/core/record/test_files.h"

namespace strikeplate {
namespace {

TEST(ReadFiles, BadFileDoesNotKeepTheOthersBack) {
  const auto read = readFiles({kTestData + "/hammer_line/6.dat", "/no/such.dat", kFormats + "shot-gather.sgy"});
  EXPECT_EQ(read.records.size(), 5u);
  EXPECT_EQ(read.failures, std::vector<std::string>{"/no/such.dat does not exist; check its name and folder."});
  EXPECT_FALSE(read.unfinished);
}

TEST(ReadFiles, StopsWhenAskedAndKeepsWhatItHas) {
  const auto read = readFiles({kTestData + "/hammer_line/6.dat", kTestData + "/hammer_line/7.dat"},
                              [](double fraction) { return fraction < 0.4; });
  EXPECT_EQ(read.records.size(), 1u);
  EXPECT_TRUE(read.unfinished);
}

TEST(ReadFiles, LargeRecordsTakeLittleMoreMemoryThanTheirSamples) {
  ShotRecord record;
  record.file = "large";
  record.source = HeaderPosition{};
  record.traces.resize(48);
  for (Trace& trace : record.traces) {
    trace.samples.assign(16000, 1.0F);
    trace.sampleInterval = 0.000125;
    trace.receiver = HeaderPosition{};
  }
  const std::size_t samples = 2 * 48 * 16000 * sizeof(float);
  const auto folder = std::filesystem::temp_directory_path();
  for (const int code : {2, 4}) {
    const std::string path = (folder / ("strikeplate_large_" + std::to_string(::getpid()) + ".sg2")).string();
    Seg2WriteOptions options;
    options.formatCode = code;
    ASSERT_TRUE(writeSeg2(path, record, options));
    AllocationCount::restart();
    const auto read = readFiles({path, path});
    EXPECT_LE(AllocationCount::highest(), samples + samples / 4);
    EXPECT_EQ(read.records.size(), 2u);
    std::filesystem::remove(path);
  }
}

}  // namespace
}  // namespace strikeplate
