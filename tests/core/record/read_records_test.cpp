#include "core/record/read_records.h"

#include <cstdlib>
#include <filesystem>
#include <fstream>

#include <gtest/gtest.h>
#include <unistd.h>

#include "tests/core/record/test_files.h"

namespace strikeplate {
namespace {

namespace fs = std::filesystem;

class ReadRecords : public testing::Test {
 protected:
  void SetUp() override {
    folder_ = fs::temp_directory_path() / ("strikeplate_read_records_" + std::to_string(::getpid()));
    fs::create_directories(folder_);
  }
  void TearDown() override { fs::remove_all(folder_); }

  std::string write(const std::string& name, const std::string& content) {
    const fs::path path = folder_ / name;
    std::ofstream(path, std::ios::binary) << content;
    return path.string();
  }
  static std::string refusal(const std::string& path) {
    const auto records = readRecords(path);
    EXPECT_FALSE(records);
    return records ? std::string() : records.message();
  }

  fs::path folder_;
};

TEST_F(ReadRecords, EmptyFileIsNamed) {
  const std::string path = write("a.sg2", "");
  EXPECT_EQ(refusal(path), path + " is empty; copy it again from the recorder.");
}

TEST_F(ReadRecords, TextFileUnderARecordsNameIsToldApart) {
  const std::string path = write("a.sg2", std::string(9000, 'a') + "\n");
  EXPECT_EQ(refusal(path),
            path + " is a text file, not a shot record; give the SEG-2 or SEG-Y file of the recorder.");
}

TEST_F(ReadRecords, FolderAndMissingFileAreNamed) {
  EXPECT_EQ(refusal(folder_.string()), folder_.string() + " is a folder; name the files in it.");
  const std::string path = (folder_ / "none.sg2").string();
  EXPECT_EQ(refusal(path), path + " does not exist; check its name and folder.");
}

TEST_F(ReadRecords, FileThatMayNotBeReadIsNamed) {
  const std::string path = write("a.sg2", "U:");
  fs::permissions(path, fs::perms::none);
  // The superuser may read every file, so the test steps down for the moment.
  constexpr uid_t kNobody = 65534;
  const bool superuser = ::geteuid() == 0;
  ASSERT_TRUE(!superuser || ::seteuid(kNobody) == 0);
  const std::string message = refusal(path);
  ASSERT_TRUE(!superuser || ::seteuid(0) == 0);
  EXPECT_EQ(message, path + " may not be read by you; ask its owner for the right to read it.");
}

TEST_F(ReadRecords, ContentTellsTheFormatNotTheName) {
  const fs::path seg2 = folder_ / "a.sgy";
  fs::copy_file(kFormats + "20180307_031245000.0.seg2", seg2);
  const auto one = readRecords(seg2.string());
  ASSERT_TRUE(one) << one.message();
  EXPECT_EQ(one->at(0).format, "SEG-2");
  const fs::path segy = folder_ / "a.txt";
  fs::copy_file(kFormats + "shot-gather.sgy", segy);
  const auto four = readRecords(segy.string());
  ASSERT_TRUE(four) << four.message();
  EXPECT_EQ(four->size(), 4u);
}

TEST_F(ReadRecords, OtherFilesAreRefused) {
  const std::string path = kFormats + "one_trace_delay.npy";
  EXPECT_NE(refusal(path).find("neither a SEG-2 nor a SEG-Y file"), std::string::npos);
}

}  // namespace
}  // namespace strikeplate
