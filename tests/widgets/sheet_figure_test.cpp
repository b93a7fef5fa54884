// The sheet's plots as files of their own.
#include "widgets/sheet_figure.h"

#include <cmath>
#include <filesystem>
#include <limits>

#include <QFile>
#include <QImage>
#include <QPainter>
#include <QSvgRenderer>
#include <gtest/gtest.h>

#include "tests/core/report/sheet_sample.h"

namespace strikeplate {
namespace {

class SheetFigureTest : public ::testing::Test {
 protected:
  void TearDown() override { std::filesystem::remove(path_); }
  Outcome write(const std::string& name, const SheetFigure& figure, const SheetOptions& options = {}) {
    path_ = (std::filesystem::path(::testing::TempDir()) /
             (::testing::UnitTest::GetInstance()->current_test_info()->name() + name))
                .string();
    return writeSheetFigure(QString::fromStdString(path_), figure, sample_.survey, sample_.interpretation, options);
  }
  [[nodiscard]] QByteArray bytes() const {
    QFile file(QString::fromStdString(path_));
    return file.open(QIODevice::ReadOnly) ? file.readAll() : QByteArray();
  }

  testing::SheetSample sample_ = testing::sheetSample();
  std::string path_;
};

TEST_F(SheetFigureTest, AnSvgIsVectorWithItsTextAsText) {
  ASSERT_TRUE(write("section.svg", {}).ok());
  EXPECT_TRUE(bytes().contains("distance along the line (m)"));
  EXPECT_TRUE(bytes().contains("top of layer 3"));
  EXPECT_FALSE(bytes().contains("<image")) << "no picture made of dots";
  EXPECT_TRUE(QSvgRenderer(QString::fromStdString(path_)).isValid()) << "another reader takes it";
}

TEST_F(SheetFigureTest, AnSvgLooksLikeThePngAlsoWhereABoundHasNoEnd) {
  auto& depths = sample_.interpretation.section.interfaces[1].depth;
  depths[10].high95 = std::numeric_limits<double>::infinity();
  depths[40].high95 = 1e6;
  for (const auto kind : {SheetFigure::Kind::Section, SheetFigure::Kind::TravelTimes}) {
    const SheetFigure figure{kind, 0, {150.0, 90.0}};
    ASSERT_TRUE(write("same.png", figure).ok());
    const QImage png =
        QImage(QString::fromStdString(path_)).scaled(750, 450, Qt::IgnoreAspectRatio, Qt::SmoothTransformation);
    std::filesystem::remove(path_);
    ASSERT_TRUE(write("same.svg", figure).ok());
    QSvgRenderer renderer(QString::fromStdString(path_));
    QImage svg(png.size(), QImage::Format_RGB32);
    svg.fill(Qt::white);
    QPainter painter(&svg);
    renderer.render(&painter);
    painter.end();
    std::filesystem::remove(path_);
    int different = 0;
    for (int y = 0; y < png.height(); ++y) {
      for (int x = 0; x < png.width(); ++x) {
        different += std::abs(qGray(png.pixel(x, y)) - qGray(svg.pixel(x, y))) > 60 ? 1 : 0;
      }
    }
    EXPECT_LT(different, png.width() * png.height() / 50) << "letters and thin lines may differ, areas may not";
    for (int x = 0; x < svg.width(); ++x) {
      EXPECT_EQ(svg.pixelColor(x, svg.height() - 3), QColor(Qt::white)) << "below the legend, at " << x;
    }
  }
}

TEST_F(SheetFigureTest, APngHas300DotsToTheInch) {
  ASSERT_TRUE(write("times.png", {SheetFigure::Kind::TravelTimes, 0, {127.0, 76.2}}).ok());
  const QImage image(QString::fromStdString(path_));
  EXPECT_EQ(image.size(), QSize(1500, 900)) << "5 by 3 inches";
  EXPECT_NEAR(image.dotsPerMeterX(), 11811, 1);
}

TEST_F(SheetFigureTest, EveryPlotPaintsSomething) {
  for (const auto kind : {SheetFigure::Kind::Section, SheetFigure::Kind::TravelTimes, SheetFigure::Kind::Residuals,
                          SheetFigure::Kind::Record}) {
    ASSERT_TRUE(write("figure.png", {kind, 2, {120.0, 70.0}}).ok());
    const QImage image(QString::fromStdString(path_));
    int inked = 0;
    for (int y = 0; y < image.height(); y += 3) {
      for (int x = 0; x < image.width(); x += 3) {
        inked += qGray(image.pixel(x, y)) < 200 ? 1 : 0;
      }
    }
    EXPECT_GT(inked, 400) << static_cast<int>(kind);
  }
}

TEST_F(SheetFigureTest, ColoursAndUnitsAreThoseOfTheSheet) {
  sample_.survey.settings.feet = true;
  SheetOptions options;
  options.blackAndWhite = true;
  ASSERT_TRUE(write("grey.png", {}, options).ok());
  EXPECT_TRUE(QImage(QString::fromStdString(path_)).allGray());
  ASSERT_TRUE(write("feet.svg", {}, options).ok());
  EXPECT_TRUE(bytes().contains("distance along the line (ft)"));
}

TEST_F(SheetFigureTest, MistakesAreOneSentence) {
  const Outcome kind = write("section.gif", {});
  ASSERT_FALSE(kind.ok());
  EXPECT_TRUE(kind.message().ends_with("names no kind of picture; let its name end in .svg or .png."));
  const Outcome shot = write("record.svg", {SheetFigure::Kind::Record, 9, {180.0, 110.0}});
  ASSERT_FALSE(shot.ok());
  EXPECT_EQ(shot.message(), "There is no shot 10; choose one of the line's 7.");
}

}  // namespace
}  // namespace strikeplate
