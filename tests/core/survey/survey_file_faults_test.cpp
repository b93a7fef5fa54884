// What may happen to a survey file from outside: killed programs, full disks, wrong and damaged files.
#include <csignal>
#include <cstdint>
#include <filesystem>
#include <fstream>
#include <iterator>

#include <gtest/gtest.h>
#include <sqlite3.h>
#include <sys/resource.h>
#include <sys/wait.h>
#include <unistd.h>

#include "core/survey/survey_file.h"
#include "tests/core/survey/random_survey.h"
#include "tests/core/survey/temporary_folder.h"

namespace strikeplate {
namespace {

using testing::randomEdit;
using testing::randomSurvey;
using testing::sameContent;

std::string bytesOf(const std::string& path) {
  std::ifstream file(path, std::ios::binary);
  return {std::istreambuf_iterator<char>(file), {}};
}

void writeBytes(const std::string& path, const std::string& bytes) {
  std::ofstream(path, std::ios::binary | std::ios::trunc) << bytes;
}

Survey surveyOf(unsigned seed) {
  std::mt19937 random(seed);
  return randomSurvey(random);
}

class SurveyFileFaults : public ::testing::Test {
 protected:
  [[nodiscard]] std::string path(const std::string& name = "line.splate") const { return folder_.path(name); }

  void expectRefused(const std::string& words) const {
    const std::string before = bytesOf(path());
    const auto file = SurveyFile::open(path());
    ASSERT_FALSE(file.ok());
    EXPECT_NE(file.message().find(words), std::string::npos) << file.message();
    EXPECT_NE(file.message().find("line.splate"), std::string::npos) << file.message();
    EXPECT_EQ(file.message().back(), '.');
    EXPECT_EQ(bytesOf(path()), before) << "a refused file is not changed";
  }

  void runSql(const char* sql) const {
    sqlite3* database = nullptr;
    ASSERT_EQ(sqlite3_open(path().c_str(), &database), SQLITE_OK);
    EXPECT_EQ(sqlite3_exec(database, sql, nullptr, nullptr, nullptr), SQLITE_OK) << sqlite3_errmsg(database);
    sqlite3_close(database);
  }

 private:
  testing::TemporaryFolder folder_;
};

// In the child: edits without end, each told to the parent when append has said that it is on the disk.
[[noreturn]] void editUntilKilled(const std::string& path, unsigned seed, int pipe) {
  std::mt19937 random(seed);
  auto file = SurveyFile::open(path);
  while (file.ok()) {
    const Edit edit = randomEdit(file->survey(), random);
    if (!file->append(edit).ok() || ::write(pipe, "x", 1) != 1) {
      break;
    }
  }
  ::_exit(1);
}

// Kills the child a random while after a random number of edits; how many were told in all.
std::size_t killInTheMiddle(const std::string& path, unsigned seed, std::mt19937& random) {
  int ends[2];
  EXPECT_EQ(::pipe(ends), 0);
  const pid_t child = ::fork();
  if (child == 0) {
    ::close(ends[0]);
    editUntilKilled(path, seed, ends[1]);
  }
  ::close(ends[1]);
  const auto wait = std::uniform_int_distribution<std::size_t>(1, 12)(random);
  std::size_t told = 0;
  char byte = 0;
  while (told < wait && ::read(ends[0], &byte, 1) == 1) {
    ++told;
  }
  ::usleep(std::uniform_int_distribution<unsigned>(0, 4000)(random));
  ::kill(child, SIGKILL);
  int status = 0;
  ::waitpid(child, &status, 0);
  EXPECT_TRUE(WIFSIGNALED(status)) << "the child ended by itself";
  while (::read(ends[0], &byte, 1) == 1) {
    ++told;
  }
  ::close(ends[0]);
  return told;
}

TEST_F(SurveyFileFaults, KilledAtAnyMomentItOpensWithEveryFinishedEdit) {
  std::mt19937 random(20260504);
  ASSERT_TRUE(SurveyFile::create(path(), surveyOf(1)).ok());
  Survey expected = SurveyFile::open(path())->survey();
  std::size_t finished = 0;
  for (unsigned round = 0; round < 25; ++round) {
    const std::size_t told = killInTheMiddle(path(), round, random);
    const auto file = SurveyFile::open(path());
    ASSERT_TRUE(file.ok()) << file.message();
    const std::size_t now = file->history().entries().size();
    ASSERT_GE(now, finished + told) << "round " << round << ": a finished edit is lost";
    ASSERT_LE(now, finished + told + 1) << "round " << round;
    std::mt19937 same(round);
    for (std::size_t i = finished; i < now; ++i) {
      expected = applied(expected, randomEdit(expected, same));
    }
    EXPECT_TRUE(sameContent(file->survey(), expected)) << "round " << round;
    finished = now;
  }
}

TEST_F(SurveyFileFaults, ASecondProgramIsRefusedAndTheFirstGoesOn) {
  auto file = SurveyFile::create(path(), surveyOf(2));
  ASSERT_TRUE(file.ok());
  const auto second = SurveyFile::open(path());
  ASSERT_FALSE(second.ok());
  EXPECT_NE(second.message().find("open in another program"), std::string::npos) << second.message();
  EXPECT_FALSE(SurveyFile::create(path(), surveyOf(3)).ok());
  EXPECT_TRUE(file->append(edits::setTriggerCorrection(file->survey(), 0, 0.001)).ok());
}

TEST_F(SurveyFileFaults, ANewerFileIsRefusedUnchanged) {
  ASSERT_TRUE(SurveyFile::create(path(), surveyOf(4)).ok());
  runSql("PRAGMA user_version = 4");
  expectRefused("newer program");
}

TEST_F(SurveyFileFaults, AFileOfTheFirstFormatOpensAndIsWrittenOnInTheNewest) {
  const Survey survey = surveyOf(4);
  ASSERT_TRUE(SurveyFile::create(path(), survey).ok());
  runSql("PRAGMA user_version = 1");
  {
    auto file = SurveyFile::open(path());
    ASSERT_TRUE(file.ok()) << file.message();
    EXPECT_TRUE(sameContent(file->survey(), survey));
    ASSERT_TRUE(file->append(edits::setTriggerCorrection(file->survey(), 0, 0.001)).ok());
  }
  EXPECT_TRUE(SurveyFile::open(path()).ok());
  std::ifstream file(path(), std::ios::binary);
  file.seekg(63);
  EXPECT_EQ(file.get(), 2);
}

TEST_F(SurveyFileFaults, WhatIsNoSurveyFileIsRefusedInWords) {
  writeBytes(path(), "");
  expectRefused("is empty");
  writeBytes(path(), "x,elevation\r\n0,1\r\n");
  expectRefused("not a survey file");
  writeBytes(path(), std::string(5000, 'a'));
  expectRefused("not a survey file");
  std::filesystem::remove(path());
  runSql("CREATE TABLE other (x)");
  expectRefused("not a survey file");
  std::filesystem::remove(path());
  EXPECT_NE(SurveyFile::open(path()).message().find("does not exist"), std::string::npos);
  std::filesystem::create_directory(path());
  EXPECT_NE(SurveyFile::open(path()).message().find("cannot be read"), std::string::npos);
}

TEST_F(SurveyFileFaults, AFileWithoutItsTablesIsRefused) {
  ASSERT_TRUE(SurveyFile::create(path(), surveyOf(5)).ok());
  runSql("DELETE FROM start");
  expectRefused("it holds no survey");
  runSql("DROP TABLE start");
  EXPECT_FALSE(SurveyFile::open(path()).ok());
}

TEST_F(SurveyFileFaults, ATruncatedFileIsRefusedOrWhole) {
  ASSERT_TRUE(SurveyFile::create(path(), surveyOf(6)).ok());
  const std::string whole = bytesOf(path());
  for (std::size_t size = 0; size < whole.size(); size += 701) {
    writeBytes(path(), whole.substr(0, size));
    const auto file = SurveyFile::open(path());
    ASSERT_FALSE(file.ok()) << size;
    EXPECT_EQ(bytesOf(path()).size(), size);
  }
}

TEST_F(SurveyFileFaults, AChangedByteIsFoundOrHarmless) {
  {
    auto file = SurveyFile::create(path(), surveyOf(7));
    std::mt19937 random(7);
    for (int i = 0; i < 10; ++i) {
      ASSERT_TRUE(file->append(randomEdit(file->survey(), random)).ok());
    }
  }
  const std::string whole = bytesOf(path());
  const Survey survey = SurveyFile::open(path())->survey();
  std::mt19937 random(8);
  int found = 0;
  for (int i = 0; i < 300; ++i) {
    std::string bytes = whole;
    bytes[std::uniform_int_distribution<std::size_t>(0, bytes.size() - 1)(random)] ^=
        static_cast<char>(1U << std::uniform_int_distribution<unsigned>(0, 7)(random));
    writeBytes(path(), bytes);
    const auto file = SurveyFile::open(path(), Access::Read);
    found += file.ok() ? 0 : 1;
    EXPECT_TRUE(!file.ok() || sameContent(file->survey(), survey)) << "a silent change, draw " << i;
  }
  EXPECT_GT(found, 100);
}

TEST_F(SurveyFileFaults, IndicesBeyondTheSurveyAreRefused) {
  ASSERT_TRUE(SurveyFile::create(path(), surveyOf(9)).ok());
  // The digest of this text, FNV-1a, 64 bits, as a signed number: from the definition, by another program.
  runSql(
      "INSERT INTO edit VALUES (1, '', '', 'far', 'done', '', "
      "'[{\"after\":null,\"before\":null,\"kind\":\"pick\",\"shot\":700,\"trace\":0}]', -4789999751634874021)");
  expectRefused("edit 1");
}

TEST_F(SurveyFileFaults, ReadOnlyEditsStayInMemoryAndAreSavedElsewhere) {
  ASSERT_TRUE(SurveyFile::create(path(), surveyOf(10)).ok());
  const std::string before = bytesOf(path());
  auto file = SurveyFile::open(path(), Access::Read);
  ASSERT_TRUE(file.ok());
  EXPECT_TRUE(file->readOnly());
  const Outcome outcome = file->append(edits::setTriggerCorrection(file->survey(), 0, 0.004));
  ASSERT_FALSE(outcome.ok());
  EXPECT_NE(outcome.message().find("may not be written"), std::string::npos) << outcome.message();
  EXPECT_TRUE(file->unsaved());
  EXPECT_EQ(file->survey().shots[0].triggerCorrection, 0.004);
  ASSERT_TRUE(file->saveAs(path("elsewhere.splate")).ok());
  EXPECT_FALSE(file->unsaved());
  EXPECT_EQ(file->survey().shots[0].triggerCorrection, 0.004);
  EXPECT_EQ(bytesOf(path()), before);
}

TEST_F(SurveyFileFaults, AFileThatWasDeletedWhileOpenIsNoticedAndSavedElsewhere) {
  auto file = SurveyFile::create(path(), surveyOf(11));
  std::filesystem::remove(path());
  const Outcome outcome = file->append(edits::setTriggerCorrection(file->survey(), 0, 0.004));
  ASSERT_FALSE(outcome.ok());
  EXPECT_NE(outcome.message().find("moved or deleted"), std::string::npos) << outcome.message();
  ASSERT_TRUE(file->saveAs(path()).ok()) << "its old name is free";
  EXPECT_EQ(SurveyFile::open(path(), Access::Read).ok(), false) << "locked by the first";
  EXPECT_FALSE(file->unsaved());
}

// The limit on the size of files stands for the full disk. Run in a child, whose exit code tells what failed.
int editOnAFullDisk(const std::string& path) {
  std::signal(SIGXFSZ, SIG_IGN);
  auto file = SurveyFile::open(path);
  const rlimit small{std::filesystem::file_size(path), RLIM_INFINITY};
  if (!file.ok() || ::setrlimit(RLIMIT_FSIZE, &small) != 0) {
    return 1;
  }
  SurveyInfo info = file->survey().info;
  info.notes = std::string(100000, 'n');
  if (file->append(edits::setInfo(file->survey(), info)).ok() || !file->unsaved()) {
    return 2;
  }
  const rlimit large{RLIM_INFINITY, RLIM_INFINITY};
  ::setrlimit(RLIMIT_FSIZE, &large);
  return file->append(edits::setTriggerCorrection(file->survey(), 0, 0.003)).ok() && !file->unsaved() ? 0 : 3;
}

TEST_F(SurveyFileFaults, WhatDidNotFitOnTheDiskIsWrittenWithTheNextEdit) {
  ASSERT_TRUE(SurveyFile::create(path(), surveyOf(12)).ok());
  const pid_t child = ::fork();
  if (child == 0) {
    ::_exit(editOnAFullDisk(path()));
  }
  int status = 0;
  ::waitpid(child, &status, 0);
  ASSERT_TRUE(WIFEXITED(status));
  EXPECT_EQ(WEXITSTATUS(status), 0);
  const auto file = SurveyFile::open(path());
  ASSERT_TRUE(file.ok()) << file.message();
  EXPECT_EQ(file->survey().info.notes.size(), 100000U);
  EXPECT_EQ(file->survey().shots[0].triggerCorrection, 0.003);
}

}  // namespace
}  // namespace strikeplate
