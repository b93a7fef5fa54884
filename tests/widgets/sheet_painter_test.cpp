#include "widgets/sheet_painter.h"

#include <array>
#include <cstdio>
#include <filesystem>
#include <memory>
#include <regex>

#include <QGuiApplication>
#include <gtest/gtest.h>

#include "tests/core/report/sheet_sample.h"

namespace strikeplate {
namespace {

// Fonts need an application; the test program may have one already.
void needApplication() {
  static int count = 1;
  static std::array<char, 6> name = {"sheet"};
  static std::array<char*, 2> arguments = {name.data(), nullptr};
  static std::unique_ptr<QGuiApplication> application;
  if (QCoreApplication::instance() == nullptr) {
    application = std::make_unique<QGuiApplication>(count, arguments.data());
  }
}

std::string outputOf(const std::string& command) {
  std::string text;
  const std::unique_ptr<FILE, int (*)(FILE*)> pipe(::popen(command.c_str(), "r"), &::pclose);
  std::array<char, 4096> buffer{};
  for (std::size_t n = 1; pipe && n > 0;) {
    n = std::fread(buffer.data(), 1, buffer.size(), pipe.get());
    text.append(buffer.data(), n);
  }
  return text;
}

// Every run of blanks, line ends and unbreakable blanks as one blank.
std::string oneLine(const std::string& text) {
  return std::regex_replace(text, std::regex("(\\s|\xC2\xA0)+"), " ");
}

class SheetPainter : public ::testing::Test {
 protected:
  void SetUp() override { needApplication(); }
  void TearDown() override { std::filesystem::remove(path_); }

  // Words of one page in the order of painting.
  [[nodiscard]] std::string pageText(int page) const {
    const std::string number = std::to_string(page);
    return oneLine(outputOf("pdftotext -raw -f " + number + " -l " + number + " '" + path_ + "' -"));
  }

  void write(const testing::SheetSample& sample, QPageSize::PageSizeId size = QPageSize::A4) const {
    const Outcome outcome =
        writeSheetPdf(QString::fromStdString(path_), sample.survey, sample.interpretation, {}, size);
    ASSERT_TRUE(outcome.ok()) << outcome.message();
  }

  const std::string path_ = (std::filesystem::path(::testing::TempDir()) /
                             (std::string(::testing::UnitTest::GetInstance()->current_test_info()->name()) + ".pdf"))
                                .string();
};

bool holds(const std::string& text, const std::string& part) {
  return text.find(part) != std::string::npos;
}

TEST_F(SheetPainter, TheNumbersOfTheSheetReadBackFromThePdf) {
  const auto sample = testing::sheetSample();
  write(sample);
  const SheetContent sheet = sheetContent(sample.survey, sample.interpretation, {});
  const std::string first = pageText(1);
  EXPECT_TRUE(holds(first, oneLine(sheet.answer))) << first;
  EXPECT_TRUE(holds(first, sheet.strongestDoubt)) << first;
  for (const SheetField& field : sheet.head) {
    EXPECT_TRUE(holds(first, field.value)) << field.label << ": " << field.value << "\n" << first;
  }
  for (const auto& row : sheet.layers.rows) {
    for (const std::string& cell : row) {
      EXPECT_TRUE(holds(first, cell)) << cell << "\n" << first;
    }
  }
  EXPECT_TRUE(holds(first, sheet.cautionShort)) << first;
}

TEST_F(SheetPainter, TheReviewersPageHoldsChecksAndCautions) {
  const auto sample = testing::sheetSample();
  write(sample);
  const SheetContent sheet = sheetContent(sample.survey, sample.interpretation, {});
  const std::string second = pageText(2);
  for (const auto* lines : {&sheet.picks, &sheet.limitations, &sheet.methods, &sheet.cautions}) {
    for (const std::string& line : *lines) {
      EXPECT_TRUE(holds(second, line)) << line << "\n" << second;
    }
  }
  for (const auto& row : sheet.shots.rows) {
    EXPECT_TRUE(holds(second, row[4])) << row[4];
  }
  EXPECT_TRUE(holds(second, sheet.reciprocals.summary)) << second;
}

TEST_F(SheetPainter, BothPaperSizesHaveTwoPagesOfTheirSize) {
  const auto sample = testing::sheetSample();
  write(sample);
  EXPECT_TRUE(holds(oneLine(outputOf("pdfinfo '" + path_ + "'")), "Pages: 2"));
  EXPECT_TRUE(holds(outputOf("pdfinfo '" + path_ + "'"), "(A4)"));
  write(sample, QPageSize::Letter);
  EXPECT_TRUE(holds(oneLine(outputOf("pdfinfo '" + path_ + "'")), "Pages: 2"));
  EXPECT_TRUE(holds(outputOf("pdfinfo '" + path_ + "'"), "(letter)"));
}

TEST_F(SheetPainter, ThePdfIsVectorWithEmbeddedFonts) {
  write(testing::sheetSample());
  const std::string images = outputOf("pdfimages -list '" + path_ + "'");
  EXPECT_EQ(std::count(images.begin(), images.end(), '\n'), 2) << "no line but the two of the header\n" << images;
  const std::string fonts = outputOf("pdffonts '" + path_ + "' | tail -n +3 | awk '{print $(NF-4)}' | sort -u");
  EXPECT_EQ(fonts, "yes\n") << "embedded";
}

TEST_F(SheetPainter, ALongLineWithLongNamesStillHasItsCautionsAndTwoPages) {
  auto sample = testing::sheetSample({120, 31, 6, 10});
  std::string longName;
  for (int i = 0; i < 30; ++i) {
    longName += "Verwaltungsgemeinschaft für Entwässerung ";
  }
  sample.survey.info.client = longName;
  sample.survey.info.title = longName;
  sample.survey.info.site = "محطة المياه";
  sample.survey.info.crew = std::string(300, 'x');
  write(sample, QPageSize::Letter);
  EXPECT_TRUE(holds(oneLine(outputOf("pdfinfo '" + path_ + "'")), "Pages: 2"));
  const SheetContent sheet = sheetContent(sample.survey, sample.interpretation, {});
  EXPECT_TRUE(holds(pageText(1), sheet.cautionShort));
  for (const std::string& line : sheet.cautions) {
    EXPECT_TRUE(holds(pageText(2), line)) << line;
  }
}

TEST_F(SheetPainter, DoubtsThatFirstPageHasNoRoomForStandOnTheSecond) {
  auto sample = testing::sheetSample();
  for (int i = 0; i < 9; ++i) {
    sample.interpretation.doubts.push_back(
        {"late pick", "shot 4", "Pick " + std::to_string(i) + " is late", "", "a second look", -1, -1, 0, 0.0});
  }
  write(sample);
  EXPECT_FALSE(holds(pageText(1), "Pick 0 is late"));
  const std::string second = pageText(2);
  EXPECT_TRUE(holds(second, "Pick 0 is late. To settle it: a second look.")) << second;
  EXPECT_TRUE(holds(second, " more of this kind (late pick).")) << second;
  EXPECT_FALSE(holds(second, "Pick 8 is late.")) << second;
}

TEST_F(SheetPainter, AnEmptySurveyPrintsThatNothingIsDetermined) {
  testing::SheetSample empty;
  empty.interpretation.section.reason = "there are no picks; pick first breaks";
  write(empty);
  EXPECT_TRUE(holds(pageText(1), "The depth is not determined: there are no picks; pick first breaks."));
}

TEST_F(SheetPainter, AFolderThatDoesNotExistIsOneSentence) {
  const auto sample = testing::sheetSample();
  const Outcome outcome = writeSheetPdf("/no/such/folder/sheet.pdf", sample.survey, sample.interpretation, {});
  ASSERT_FALSE(outcome.ok());
  EXPECT_TRUE(holds(outcome.message(), "/no/such/folder/sheet.pdf could not be written")) << outcome.message();
}

}  // namespace
}  // namespace strikeplate
