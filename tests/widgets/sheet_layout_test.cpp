// The sheet's geometry as plain functions of numbers.
#include <numeric>

#include <gtest/gtest.h>

#include "tests/core/report/sheet_sample.h"
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

}  // namespace
}  // namespace strikeplate
