#include "core/survey/survey_file.h"

#include <cmath>
#include <filesystem>

#include <gtest/gtest.h>

#include "tests/core/survey/random_survey.h"
#include "tests/core/survey/temporary_folder.h"

namespace strikeplate {
namespace {

using testing::randomEdit;
using testing::randomSurvey;
using testing::sameContent;

class SurveyFileTest : public ::testing::Test {
 protected:
  [[nodiscard]] std::string path(const std::string& name = "line.splate") const { return folder_.path(name); }

 private:
  testing::TemporaryFolder folder_;
};

TEST_F(SurveyFileTest, ASurveyReadsBackAsItWas) {
  for (unsigned seed = 0; seed < 20; ++seed) {
    std::mt19937 random(seed);
    const Survey survey = randomSurvey(random);
    ASSERT_TRUE(SurveyFile::create(path(), survey).ok());
    const auto file = SurveyFile::open(path());
    ASSERT_TRUE(file.ok()) << file.message();
    EXPECT_TRUE(sameContent(file->survey(), survey)) << "seed " << seed;
    EXPECT_TRUE(file->history().entries().empty());
    EXPECT_FALSE(file->unsaved());
  }
}

TEST_F(SurveyFileTest, EveryKindOfEditReadsBackAndCanBeUndoneAfterReopening) {
  std::mt19937 random(1);
  std::vector<Survey> states = {randomSurvey(random)};
  {
    auto file = SurveyFile::create(path(), states.front());
    ASSERT_TRUE(file.ok()) << file.message();
    file->setAuthor("A. Noether");
    for (int i = 0; i < 100; ++i) {
      ASSERT_TRUE(file->append(randomEdit(file->survey(), random)).ok());
      states.push_back(file->survey());
    }
  }
  for (std::size_t i = states.size(); i > 1; i -= 20) {
    auto file = SurveyFile::open(path());
    ASSERT_TRUE(file.ok()) << file.message();
    ASSERT_TRUE(sameContent(file->survey(), states[i - 1])) << i;
    EXPECT_EQ(file->history().entries()[i - 2].author, "A. Noether");
    for (int step = 0; step < 20; ++step) {
      ASSERT_TRUE(file->undo().ok());
    }
  }
  auto file = SurveyFile::open(path());
  EXPECT_TRUE(sameContent(file->survey(), states.front()));
  while (file->history().canRedo()) {
    ASSERT_TRUE(file->redo().ok());
  }
  EXPECT_TRUE(sameContent(file->survey(), states.back()));
}

TEST_F(SurveyFileTest, ANewEditAfterAnUndoLeavesTheUndoneOneInTheHistory) {
  std::mt19937 random(2);
  const Survey survey = randomSurvey(random);
  {
    auto file = SurveyFile::create(path(), survey);
    ASSERT_TRUE(file->append(edits::setTriggerCorrection(file->survey(), 0, 0.001)).ok());
    ASSERT_TRUE(file->undo().ok());
    EXPECT_EQ(file->history().redoText(), "Set trigger correction, shot 1: 1.00 ms");
    ASSERT_TRUE(file->append(edits::setTriggerCorrection(file->survey(), 0, 0.002)).ok());
  }
  const auto file = SurveyFile::open(path());
  ASSERT_TRUE(file.ok());
  ASSERT_EQ(file->history().entries().size(), 2U);
  EXPECT_EQ(file->history().entries()[0].state, EditState::Abandoned);
  EXPECT_EQ(file->history().entries()[1].state, EditState::Done);
  EXPECT_FALSE(file->history().canRedo());
  EXPECT_EQ(file->survey().shots[0].triggerCorrection, 0.002);
}

TEST_F(SurveyFileTest, RecordsReadAgainAreStoredOnce) {
  std::mt19937 random(3);
  Survey survey = randomSurvey(random);
  auto large = std::make_shared<ShotRecord>(*survey.records[0]);
  large->traces[0].samples.assign(500000, 1.25F);
  survey.records[0] = large;
  auto file = SurveyFile::create(path(), survey);
  ASSERT_TRUE(file.ok());
  const auto before = std::filesystem::file_size(path());
  for (int i = 0; i < 5; ++i) {
    Survey again = file->survey();
    again.records[0] = std::make_shared<ShotRecord>(*large);
    ASSERT_TRUE(file->append({"Load again", {ContentChange{file->survey(), again}}}).ok());
  }
  EXPECT_LT(std::filesystem::file_size(path()), before + 500000);
  file = Failure{"closed"};
  const auto back = SurveyFile::open(path());
  ASSERT_TRUE(back.ok());
  EXPECT_TRUE(sameContent(back->survey(), survey));
}

TEST_F(SurveyFileTest, HeaderBytesThatAreNoUtf8AreKept) {
  std::mt19937 random(4);
  Survey survey = randomSurvey(random);
  auto record = std::make_shared<ShotRecord>(*survey.records[0]);
  std::string all;
  for (int byte = 0; byte < 256; ++byte) {
    all += static_cast<char>(byte);
  }
  record->header = {{"NOTE", "M\xfcller"}, {"ALL", all}, {"\xed\xa0\x80", "\xf4\x90\x80\x80"}, {"\xc0\xaf", "ü€𝄞"}};
  survey.records[0] = record;
  ASSERT_TRUE(SurveyFile::create(path(), survey).ok());
  const auto back = SurveyFile::open(path());
  ASSERT_TRUE(back.ok()) << back.message();
  EXPECT_TRUE(sameContent(back->survey(), survey));
}

TEST_F(SurveyFileTest, ACopyHoldsTheWholeHistoryAndTheFirstFileStaysOpen) {
  std::mt19937 random(5);
  auto file = SurveyFile::create(path(), randomSurvey(random));
  ASSERT_TRUE(file->append(randomEdit(file->survey(), random)).ok());
  ASSERT_TRUE(file->append(randomEdit(file->survey(), random)).ok());
  ASSERT_TRUE(file->undo().ok());
  ASSERT_TRUE(file->copyTo(path("copy.splate")).ok());
  EXPECT_EQ(file->path(), path());
  const auto copy = SurveyFile::open(path("copy.splate"));
  ASSERT_TRUE(copy.ok()) << copy.message();
  EXPECT_TRUE(sameContent(copy->survey(), file->survey()));
  EXPECT_EQ(copy->history().entries().size(), 2U);
  EXPECT_TRUE(copy->history().canRedo());
  EXPECT_FALSE(file->copyTo(path()).ok());
}

TEST_F(SurveyFileTest, SaveAsGoesOnWithTheNewName) {
  std::mt19937 random(6);
  auto file = SurveyFile::create(path(), randomSurvey(random));
  ASSERT_TRUE(file->saveAs(path("other.splate")).ok());
  EXPECT_EQ(file->path(), path("other.splate"));
  ASSERT_TRUE(file->append(randomEdit(file->survey(), random)).ok());
  EXPECT_TRUE(SurveyFile::open(path())->history().entries().empty());
  EXPECT_TRUE(file->saveAs(path("other.splate")).ok());
  EXPECT_FALSE(file->saveAs(path("no/such/folder.splate")).ok());
  EXPECT_EQ(file->path(), path("other.splate"));
}

TEST_F(SurveyFileTest, AnEditThatDoesNotFitIsRefused) {
  std::mt19937 random(7);
  auto file = SurveyFile::create(path(), randomSurvey(random));
  const Survey before = file->survey();
  const Pick notANumber{std::nan(""), 1e-3, 0, PickOrigin::Hand};
  EXPECT_FALSE(file->append({"far", {PickChange{99, 0, std::nullopt, std::nullopt}}}).ok());
  EXPECT_FALSE(file->append(edits::setPick(before, 0, 0, notANumber, "no time")).ok());
  EXPECT_TRUE(file->survey() == before);
  EXPECT_TRUE(file->history().entries().empty());
}

TEST_F(SurveyFileTest, MarksAndAnswersReadBackWithTheirHistory) {
  std::mt19937 random(11);
  Survey expected;
  {
    auto file = SurveyFile::create(path(), randomSurvey(random));
    ASSERT_TRUE(file.ok()) << file.message();
    ASSERT_TRUE(file->append(edits::setMark(file->survey(), 0, {MarkKind::CriticalDistance, 6.5, 0.5})).ok());
    ASSERT_TRUE(file->append(edits::setMark(file->survey(), 0, {MarkKind::ReflectionTime, 0.021, 0.001})).ok());
    ASSERT_TRUE(file->append(edits::answerDoubt(file->survey(), "pick", "shot 1", "a passing lorry")).ok());
    expected = file->survey();
  }
  auto file = SurveyFile::open(path());
  ASSERT_TRUE(file.ok()) << file.message();
  EXPECT_EQ(file->survey().shots, expected.shots);
  EXPECT_EQ(file->survey().doubtAnswers, expected.doubtAnswers);
  ASSERT_TRUE(file->undo().ok());
  EXPECT_TRUE(file->survey().doubtAnswers.empty());
  ASSERT_TRUE(file->undo().ok());
  EXPECT_EQ(file->survey().shots[0].marks.size(), 1U);
}

}  // namespace
}  // namespace strikeplate
