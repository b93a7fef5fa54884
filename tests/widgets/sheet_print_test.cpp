// What a printer draws is what was laid out: every word of the PDF stands within the box that was measured for it.
#include <array>
#include <cstdio>
#include <memory>
#include <regex>

#include <QImage>
#include <QMarginsF>
#include <QPageSize>
#include <QPdfWriter>
#include <QTemporaryDir>
#include <gtest/gtest.h>

#include "tests/core/report/sheet_sample.h"
#include "widgets/sheet_painter.h"

namespace strikeplate {
namespace {

constexpr double kInch = 25.4;   // mm
constexpr double kPoint = 72.0;  // to the inch

struct PrintedWord {
  QRectF box;  // mm
  std::string word;
};

std::vector<PrintedWord> wordsOf(const QString& pdf) {
  std::string text;
  const std::string command = "pdftotext -bbox '" + pdf.toStdString() + "' -";
  const std::unique_ptr<FILE, int (*)(FILE*)> pipe(::popen(command.c_str(), "r"), &::pclose);
  std::array<char, 4096> buffer{};
  for (std::size_t n = 1; pipe && n > 0;) {
    n = std::fread(buffer.data(), 1, buffer.size(), pipe.get());
    text.append(buffer.data(), n);
  }
  static const std::regex kWord(
      "<word xMin=\"([-0-9.]+)\" yMin=\"([-0-9.]+)\" xMax=\"([-0-9.]+)\" yMax=\"([-0-9.]+)\">(.*)</word>");
  std::vector<PrintedWord> words;
  for (std::sregex_iterator found(text.begin(), text.end(), kWord), end; found != end; ++found) {
    const auto at = [&](int i) { return std::stod((*found)[static_cast<std::size_t>(i)]) * kInch / kPoint; };
    words.push_back({{QPointF(at(1), at(2)), QPointF(at(3), at(4))}, (*found)[5]});
  }
  return words;
}

struct Printed {
  std::vector<PrintedWord> words;
  std::vector<SheetMark> marks;
};

Printed printed(const testing::SheetSample& sample, QPageSize::PageSizeId size, int page,
                const SheetOptions& options) {
  const QTemporaryDir folder;
  const QString path = folder.filePath("sheet.pdf");
  QPdfWriter writer(path);
  writer.setPageSize(QPageSize(size));
  writer.setPageMargins(QMarginsF(0, 0, 0, 0));
  writer.setResolution(1200);
  Printed result;
  QPainter painter(&writer);
  paintSheetPage(painter, 1200 / kInch, QPageSize(size).size(QPageSize::Millimeter), page, sample.survey,
                 sample.interpretation, sheetContent(sample.survey, sample.interpretation, options), &result.marks);
  painter.end();
  result.words = wordsOf(path);
  return result;
}

TEST(SheetPrint, EveryWordStandsWithinTheBoxMeasuredForIt) {
  SheetOptions options;
  options.signatory = "مهندس محمد";
  testing::SheetSample feet = testing::sheetSample();
  feet.survey.settings.feet = true;
  for (const testing::SheetSample& sample :
       {testing::sheetSample(), feet, testing::fullSheetSample(), testing::emptySheetSample()}) {
    for (const auto size : {QPageSize::A4, QPageSize::Letter}) {
      for (const int page : {1, 2}) {
        const Printed sheet = printed(sample, size, page, options);
        EXPECT_GT(sheet.words.size(), 60U);
        for (const PrintedWord& word : sheet.words) {
          const bool within = std::any_of(sheet.marks.begin(), sheet.marks.end(), [&](const SheetMark& mark) {
            // Sideways a third of a millimetre, less than a letter; up and down the fonts' own ideas of a line
            // differ.
            return mark.box.adjusted(-0.35, -1.0, 0.35, 1.0).contains(word.box);
          });
          EXPECT_TRUE(within) << word.word << " at " << word.box.left() << " to " << word.box.right() << " mm, "
                              << word.box.top() << " mm down, page " << page;
        }
      }
    }
  }
}

TEST(SheetPrint, NothingIsDrawnInTheMargins) {
  constexpr double kPerMillimetre = 6.0;
  constexpr double kMargin = 10.0;  // mm; the sheet keeps 13, plots' labels and marks may reach out a little
  for (const testing::SheetSample& sample :
       {testing::sheetSample(), testing::fullSheetSample(), testing::sheetSample({2, 1, 2, 0})}) {
    SheetOptions options;
    options.records = options.places = options.tables = true;
    const SheetContent sheet = sheetContent(sample.survey, sample.interpretation, options);
    for (const QSizeF& paper : {QSizeF(210.0, 297.0), QSizeF(215.9, 279.4)}) {
      for (const int page : {1, 2, 3}) {
        QImage image((paper * kPerMillimetre).toSize(), QImage::Format_RGB32);
        image.fill(Qt::white);
        {
          QPainter painter(&image);
          paintSheetPage(painter, kPerMillimetre, paper, page, sample.survey, sample.interpretation, sheet);
        }
        constexpr int kEdge = static_cast<int>(kMargin * kPerMillimetre);
        const QRect room = image.rect().adjusted(kEdge, kEdge, -kEdge, -kEdge);
        int ink = 0;
        for (int y = 0; y < image.height(); ++y) {
          for (int x = 0; x < image.width(); ++x) {
            ink += !room.contains(x, y) && image.pixel(x, y) != qRgb(255, 255, 255) ? 1 : 0;
          }
        }
        EXPECT_EQ(ink, 0) << "page " << page << ", width " << paper.width();
      }
    }
  }
}

}  // namespace
}  // namespace strikeplate
