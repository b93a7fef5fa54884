// The sheet's geometry: plain functions of numbers, and where every text of a whole page comes to stand.
#include <algorithm>
#include <numeric>

#include <QImage>
#include <gtest/gtest.h>

#include "tests/core/report/sheet_sample.h"
#include "widgets/sheet_painter.h"
#include "widgets/sheet_plots.h"
#include "widgets/sheet_tables.h"

namespace strikeplate {
namespace {

TEST(SheetLayout, TicksAreRoundAndWithinTheSpan) {
  const SheetTicks ticks = sheetTicks(-4.2, 98.3, 10);
  EXPECT_EQ(ticks.at, (std::vector<double>{0, 20, 40, 60, 80}));
  EXPECT_EQ(ticks.decimals, 0);
  const SheetTicks fine = sheetTicks(0.11, 0.29, 5);
  EXPECT_EQ(fine.decimals, 2);
  ASSERT_EQ(fine.at.size(), 3U);
  EXPECT_NEAR(fine.at[0], 0.15, 1e-12);
  EXPECT_TRUE(sheetTicks(1.0, 1.0, 5).at.empty());
  EXPECT_TRUE(sheetTicks(0.0, std::nan(""), 5).at.empty());
}

TEST(SheetLayout, LinesAreCutAtTheEdgeOfTheirPlot) {
  const QRectF area(0.0, 0.0, 10.0, 10.0);
  const auto line = [](std::initializer_list<QPointF> points) { return QPolygonF(QList<QPointF>(points)); };
  const QPolygonF inside = line({{1.0, 1.0}, {5.0, 5.0}, {9.0, 1.0}});
  ASSERT_EQ(lineWithin(inside, area).size(), 1U);
  EXPECT_EQ(lineWithin(inside, area)[0], inside);
  // Down through the lower edge at x = 3 and up again at x = 7.
  const auto parts = lineWithin(line({{1.0, 8.0}, {5.0, 12.0}, {9.0, 8.0}}), area);
  ASSERT_EQ(parts.size(), 2U);
  EXPECT_EQ(parts[0], line({{1.0, 8.0}, {3.0, 10.0}}));
  EXPECT_EQ(parts[1], line({{7.0, 10.0}, {9.0, 8.0}}));
  EXPECT_TRUE(lineWithin(line({{1.0, 12.0}, {9.0, 12.0}}), area).empty());
  EXPECT_EQ(lineWithin(line({{-1.0, 5.0}, {11.0, 5.0}}), area).size(), 1U);
}

TEST(SheetLayout, ColumnsFillTheWidthAndTheWidestAreNarrowed) {
  const std::vector<double> roomy = columnWidths({{10.0, 5.0}, {20.0, 5.0}}, 60.0);
  EXPECT_NEAR(std::accumulate(roomy.begin(), roomy.end(), 0.0), 60.0, 1e-9);
  const std::vector<double> tight = columnWidths({{10.0, 5.0}, {80.0, 5.0}, {70.0, 5.0}}, 100.0);
  EXPECT_NEAR(tight[0], 10.0, 1e-9);
  EXPECT_NEAR(tight[1], 45.0, 1e-6);
  EXPECT_NEAR(tight[2], 45.0, 1e-6);
  const std::vector<double> wordy = columnWidths({{10.0, 5.0}, {80.0, 5.0}, {70.0, 60.0}}, 100.0);
  EXPECT_NEAR(wordy[1], 30.0, 1e-6);
  EXPECT_NEAR(wordy[2], 60.0, 1e-6) << "its longest word";
}

TEST(SheetLayout, ExaggerationIsTheLargestRoundOneThatFits) {
  EXPECT_EQ(verticalExaggeration(10.0, 80.0, 2.0), 4.0);
  EXPECT_EQ(verticalExaggeration(10.0, 19.0, 2.0), 0.9);
  EXPECT_NEAR(verticalExaggeration(30.0, 75.0, 2.0), 1.25, 1e-12);
  EXPECT_EQ(verticalExaggeration(1.0, 1000.0, 2.0), 20.0) << "beyond that a slope says nothing any more";
}

TEST(SheetLayout, ExaggerationFillsAtLeastFourFifthsOfTheRoom) {
  for (double depth = 2.5; depth < 60.0; depth *= 1.037) {
    const double used = verticalExaggeration(depth, 80.0, 2.0) * depth * 2.0;
    EXPECT_LE(used, 80.0 + 1e-9);
    EXPECT_GE(used, 0.8 * 80.0 - 1e-9) << depth;
  }
}

TEST(SheetLayout, TheSpanHoldsEveryPlace) {
  const auto sample = testing::sheetSample();
  const SheetContent sheet = sheetContent(sample.survey, sample.interpretation, {});
  const SheetSpan span = sheetSpan({sample.survey, sample.interpretation, sheet});
  EXPECT_LT(span.left, -4.0);
  EXPECT_GT(span.right, 98.0);
  const Survey none;
  EXPECT_LT(sheetSpan({none, sample.interpretation, sheet}).left,
            sheetSpan({none, sample.interpretation, sheet}).right);
}

constexpr QSizeF kA4(210.0, 297.0);
constexpr QSizeF kLetter(215.9, 279.4);

std::vector<SheetMark> marksOf(const testing::SheetSample& sample, const QSizeF& paper, int page, bool grey = false) {
  constexpr double kPerMillimetre = 12.0;  // about 300 dots per inch
  SheetOptions options;
  options.edits = 12;
  options.blackAndWhite = grey;
  options.signatory = "Dr. Agnieszka Featherstonehaugh-Grzegorzewska, Chartered and European Geologist";
  options.builtOn = {"Qt 6.4.2", "Eigen 3.4.0", "SQLite 3.45.1"};
  QImage image((paper * kPerMillimetre).toSize(), QImage::Format_RGB32);
  image.fill(Qt::white);
  std::vector<SheetMark> marks;
  QPainter painter(&image);
  paintSheetPage(painter, kPerMillimetre, paper, page, sample.survey, sample.interpretation,
                 sheetContent(sample.survey, sample.interpretation, options), &marks);
  return marks;
}

// What is wrong with a page, one line each: texts over one another, beyond the margins, or cut.
std::string faults(const std::vector<SheetMark>& marks, const QSizeF& paper) {
  constexpr double kMargin = 9.0;  // mm
  const QRectF room(kMargin, kMargin - 2.0, paper.width() - 2.0 * kMargin, paper.height() - 2.0 * kMargin + 4.0);
  QString text;
  for (std::size_t a = 0; a < marks.size(); ++a) {
    if (!room.contains(marks[a].box)) {
      text += "beyond the margins: " + marks[a].words + "\n";
    }
    if (marks[a].cut) {
      text += "cut: " + marks[a].words + "\n";
    }
    // Boxes reach from the highest to the lowest letter of a font, so those of two rows may just touch.
    const QRectF box = marks[a].box.adjusted(0.1, 0.45, -0.1, -0.45);
    for (std::size_t b = a + 1; b < marks.size(); ++b) {
      if (box.intersects(marks[b].box.adjusted(0.1, 0.45, -0.1, -0.45))) {
        text += marks[a].words + " | over | " + marks[b].words + "\n";
      }
    }
  }
  return text.toStdString();
}

TEST(SheetLayout, TheFaultsOfAPageAreFound) {
  const SheetMark whole{{20.0, 20.0, 30.0, 3.0}, "whole", false};
  EXPECT_EQ(faults({whole, {{20.0, 23.0, 30.0, 3.0}, "next row", false}}, kA4), "");
  EXPECT_EQ(faults({whole, {{45.0, 21.5, 30.0, 3.0}, "too near", false}}, kA4), "whole | over | too near\n");
  EXPECT_EQ(faults({{{190.0, 20.0, 30.0, 3.0}, "wide", false}}, kA4), "beyond the margins: wide\n");
  EXPECT_EQ(faults({{{20.0, 20.0, 30.0, 3.0}, "long", true}}, kA4), "cut: long\n");
}

TEST(SheetLayout, NoTextLiesOverAnotherBeyondTheMarginsOrIsCut) {
  const std::vector<testing::SheetSample> samples = {testing::sheetSample(), testing::fullSheetSample(),
                                                     testing::emptySheetSample(), testing::sheetSample({2, 1, 2, 0})};
  for (std::size_t s = 0; s < samples.size(); ++s) {
    for (const QSizeF& paper : {kA4, kLetter}) {
      for (const bool feet : {false, true}) {
        testing::SheetSample sample = samples[s];
        sample.survey.settings.feet = feet;
        for (const int page : {1, 2}) {
          const std::vector<SheetMark> marks = marksOf(sample, paper, page, feet);
          EXPECT_GT(marks.size(), 20U);
          EXPECT_EQ(faults(marks, paper), "")
              << "sample " << s << ", page " << page << ", width " << paper.width() << (feet ? " ft" : " m");
        }
      }
    }
  }
}

TEST(SheetLayout, ResidualsHaveAScaleAlsoWhereThereIsLittleRoom) {
  for (const testing::SheetSample& sample : {testing::sheetSample(), testing::fullSheetSample()}) {
    for (const QSizeF& paper : {kA4, kLetter}) {
      const std::vector<SheetMark> marks = marksOf(sample, paper, 2);
      const auto title = std::find_if(marks.begin(), marks.end(), [](const SheetMark& mark) {
        return mark.words.startsWith("Residuals, picked minus predicted (ms), along the line (m)");
      });
      ASSERT_NE(title, marks.end());
      // The numbers at its left: below the title, within the plot's height, at least one above and one below zero.
      int numbers = 0;
      for (const SheetMark& mark : marks) {
        const double down = mark.box.center().y() - title->box.bottom();
        bool number = false;
        mark.words.toDouble(&number);
        numbers += number && mark.box.right() < title->box.left() + 12.0 && down > 0.0 && down < 22.0 ? 1 : 0;
      }
      EXPECT_GE(numbers, 3) << "width " << paper.width();
    }
  }
}

TEST(SheetLayout, AnAnswerAsLongAsTheChecklistAllowsIsNotCut) {
  constexpr double kPerMillimetre = 12.0;
  const auto sample = testing::fullSheetSample();
  SheetOptions options;
  while (options.answer.size() < 1380) {
    options.answer += "Rock lies deep here. ";
  }
  QImage image((kLetter * kPerMillimetre).toSize(), QImage::Format_RGB32);
  QPainter painter(&image);
  std::vector<SheetMark> marks;
  paintSheetPage(painter, kPerMillimetre, kLetter, 1, sample.survey, sample.interpretation,
                 sheetContent(sample.survey, sample.interpretation, options), &marks);
  EXPECT_EQ(faults(marks, kLetter), "");
}

TEST(SheetLayout, FurtherPagesHoldEveryShotAndGeophoneAndNothingIsCut) {
  constexpr double kPerMillimetre = 12.0;
  const auto sample = testing::fullSheetSample();
  SheetOptions options;
  options.records = options.places = options.tables = true;
  const SheetContent sheet = sheetContent(sample.survey, sample.interpretation, options);
  for (const QSizeF& paper : {kA4, kLetter}) {
    QImage image((paper * kPerMillimetre).toSize(), QImage::Format_RGB32);
    QPainter painter(&image);
    const int pages = sheetPageCount(painter, kPerMillimetre, paper, sample.survey, sample.interpretation, sheet);
    EXPECT_GE(pages, 2 + 16 + 3 + 2);
    QStringList titles, numbers;
    std::vector<int> looked = {3};
    for (int page = 2 + 16 + 1; page <= pages; ++page) {
      looked.push_back(page);
    }
    for (const int page : looked) {
      std::vector<SheetMark> marks;
      paintSheetPage(painter, kPerMillimetre, paper, page, sample.survey, sample.interpretation, sheet, &marks);
      EXPECT_EQ(faults(marks, paper), "") << "page " << page;
      for (const SheetMark& mark : marks) {
        titles << mark.words;
      }
    }
    EXPECT_TRUE(titles.contains("Shot 1 at -4.0 m: line7_1.dat + line7_2.dat"));
    EXPECT_TRUE(titles.contains("line7_61.dat, line7_62.dat")) << "the last shot's place";
    EXPECT_TRUE(titles.contains("No. 10: Observation well BH-10 by the mill"));
    EXPECT_TRUE(titles.contains("line7_62.dat")) << "the last file";
    EXPECT_TRUE(titles.contains("1 and 2")) << "a pair of shots";
    for (int g = 1; g <= 120; ++g) {
      EXPECT_TRUE(titles.contains(QString::number(g))) << g;
    }
  }
}

TEST(SheetLayout, BlackAndWhiteHasNoColourAndTheSameTexts) {
  constexpr double kPerMillimetre = 4.0;
  const auto sample = testing::sheetSample();
  SheetOptions options;
  options.blackAndWhite = true;
  for (const int page : {1, 2}) {
    QImage image((kA4 * kPerMillimetre).toSize(), QImage::Format_RGB32);
    image.fill(Qt::white);
    {
      QPainter painter(&image);
      paintSheetPage(painter, kPerMillimetre, kA4, page, sample.survey, sample.interpretation,
                     sheetContent(sample.survey, sample.interpretation, options));
    }
    int coloured = 0;
    for (int y = 0; y < image.height(); ++y) {
      for (int x = 0; x < image.width(); ++x) {
        const QRgb p = image.pixel(x, y);
        coloured += qRed(p) != qGreen(p) || qGreen(p) != qBlue(p) ? 1 : 0;
      }
    }
    EXPECT_EQ(coloured, 0) << "page " << page;
    EXPECT_EQ(marksOf(sample, kA4, page, true).size(), marksOf(sample, kA4, page, false).size());
  }
}

}  // namespace
}  // namespace strikeplate
