#include "widgets/record_extremes.h"

#include <algorithm>
#include <cmath>
#include <random>

#include <gtest/gtest.h>

#include "widgets/record_trace_paint.h"

using namespace strikeplate;

namespace {

/// Weak noise with one sample of 1 at `peak`.
std::vector<float> onePeak(std::size_t count, std::size_t peak) {
  std::mt19937 random(3);
  std::uniform_real_distribution<float> noise(-0.01F, 0.01F);
  std::vector<float> samples(count);
  std::generate(samples.begin(), samples.end(), [&] { return noise(random); });
  samples[peak] = 1.0F;
  return samples;
}

}  // namespace

TEST(RecordExtremes, NoPeakVanishesAtAnyZoom) {
  // A single sample among 16 000, from 40 rows for the whole record to 50 rows for a sample.
  RowExtremes rows;
  for (std::size_t peak : {0U, 1U, 4321U, 8000U, 15998U, 15999U}) {
    const auto samples = onePeak(16000, peak);
    for (const double perRow : {400.0, 37.3, 7.0, 1.0, 0.31, 0.02}) {
      const std::size_t count = 900;
      const double first = static_cast<double>(peak) - 0.37 * perRow * static_cast<double>(count);
      rowExtremes(samples, first, perRow, count, rows);
      EXPECT_FLOAT_EQ(*std::max_element(rows.high.begin(), rows.high.end()), 1.0F)
          << "peak at sample " << peak << ", " << perRow << " samples in a row";
    }
  }
}

TEST(RecordExtremes, EqualTheExtremesOfTheLineThroughTheSamples) {
  // Against a scan of the trace at 200 points a row.
  const auto samples = onePeak(300, 117);
  const double first = 12.34, perRow = 1.7;
  RowExtremes rows;
  rowExtremes(samples, first, perRow, 150, rows);
  for (std::size_t row = 0; row < 150; ++row) {
    float low = 2.0F, high = -2.0F;
    for (int k = 0; k <= 2000; ++k) {
      const double at = first + (static_cast<double>(row) + k / 2000.0) * perRow;
      const auto i = static_cast<std::size_t>(at);
      const auto f = static_cast<float>(at - static_cast<double>(i));
      const float value = samples[i] + f * (samples[i + 1] - samples[i]);
      low = std::min(low, value);
      high = std::max(high, value);
    }
    EXPECT_NEAR(rows.low[row], low, 2e-3F);
    EXPECT_NEAR(rows.high[row], high, 2e-3F);
    EXPECT_LE(rows.low[row], low + 1e-6F);
    EXPECT_GE(rows.high[row], high - 1e-6F);
  }
}

TEST(RecordExtremes, NeighboursMeetSoThatTheLineHasNoGaps) {
  const auto samples = onePeak(500, 250);
  RowExtremes rows;
  rowExtremes(samples, 0.0, 0.123, 4000, rows);
  for (std::size_t row = 1; row < 4000; ++row) {
    EXPECT_LE(rows.low[row], rows.high[row - 1]);
    EXPECT_GE(rows.high[row], rows.low[row - 1]);
  }
}

TEST(RecordExtremes, RowsOutsideTheTraceAreEmpty) {
  RowExtremes rows;
  rowExtremes(std::vector<float>{1.0F, 2.0F, 3.0F}, -4.0, 1.0, 10, rows);
  for (std::size_t row = 0; row < 10; ++row) {
    EXPECT_EQ(rows.has(row), row == 4 || row == 5) << row;
  }
  rowExtremes({}, 0.0, 1.0, 10, rows);
  EXPECT_FALSE(rows.has(0));
  rowExtremes(std::vector<float>{1.0F}, 5.0, 1.0, 10, rows);
  EXPECT_FALSE(rows.has(0));
}

TEST(RecordTracePaint, AOneSamplePeakIsSeenOnTheWholeRecord) {
  const auto samples = onePeak(16000, 9000);
  for (const auto style : {TraceStyle::Wiggle, TraceStyle::Area, TraceStyle::WiggleAndArea, TraceStyle::Density}) {
    for (const bool up : {false, true}) {
      QImage image(100, 300, QImage::Format_RGB32);
      image.fill(Qt::white);
      TracePainter painter(image, image.rect(), {style, 0xff000000, 0xffffffff, 1.0}, up);
      RowExtremes rows;
      const std::size_t count = 300 * kRowsPerPixel;
      rowExtremes(samples, 0.0, 16000.0 / static_cast<double>(count), count, rows);
      painter.paint(rows, {50.0, 40.0, 45.0, 5.0, 95.0});
      const int y = up ? 299 - 9000 * 300 / 16000 : 9000 * 300 / 16000;
      int darkest = 255;
      for (int near = y - 1; near <= y + 1; ++near) {
        darkest = std::min(darkest, qGray(image.pixel(85, near)));
      }
      EXPECT_LT(darkest, 160) << "style " << static_cast<int>(style);
    }
  }
}

TEST(RecordTracePaint, SwingsEndAtTheClipAndAtTheArea) {
  QImage image(100, 40, QImage::Format_RGB32);
  image.fill(Qt::white);
  const QRect area(20, 0, 60, 40);
  TracePainter painter(image, area, {TraceStyle::WiggleAndArea, 0xff000000, 0xffffffff, 1.0}, false);
  std::vector<float> samples(400);
  for (std::size_t i = 0; i < samples.size(); ++i) {
    samples[i] = i % 2 == 0 ? 1000.0F : -1000.0F;
  }
  RowExtremes rows;
  rowExtremes(samples, 0.0, 400.0 / (40.0 * kRowsPerPixel), 40 * kRowsPerPixel, rows);
  painter.paint(rows, {50.0, 100.0, 10.0, 40.0, 60.0});
  EXPECT_LT(qGray(image.pixel(58, 20)), 50);
  EXPECT_EQ(qGray(image.pixel(62, 20)), 255);
  painter.paint(rows, {50.0, 100.0, 0.0, 40.0, 60.0});
  EXPECT_LT(qGray(image.pixel(79, 20)), 50);
  EXPECT_EQ(qGray(image.pixel(80, 20)), 255);
  EXPECT_EQ(qGray(image.pixel(19, 20)), 255);
}
