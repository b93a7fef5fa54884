#include "core/base/numbers.h"

#include <limits>

#include <gtest/gtest.h>

namespace strikeplate {
namespace {

TEST(Numbers, WholeTextsAreReadAndLeftoversAreNot) {
  EXPECT_EQ(parseNumber(" 1.5 "), 1.5);
  EXPECT_EQ(parseNumber("+2e-3"), 2e-3);
  EXPECT_EQ(parseNumber("-0.5"), -0.5);
  EXPECT_FALSE(parseNumber("1,5"));
  EXPECT_FALSE(parseNumber("1.5 m"));
  EXPECT_FALSE(parseNumber(""));
  EXPECT_FALSE(parseNumber("+-1"));
  EXPECT_FALSE(parseNumber("nan"));
  EXPECT_FALSE(parseNumber("inf"));
  EXPECT_EQ(parseInteger("12"), 12);
  EXPECT_FALSE(parseInteger("12.0"));
}

TEST(Numbers, FullPrecisionReadsBackAsTheSameDouble) {
  for (const double value : {0.1, 1.0 / 3.0, -1e-300, 123456789.123456789, 5e-324}) {
    EXPECT_EQ(parseNumber(fullPrecision(value)), value);
  }
  EXPECT_EQ(fullPrecision(std::numeric_limits<double>::quiet_NaN()), "");
}

TEST(Numbers, FixedNeverShowsMinusZero) {
  EXPECT_EQ(fixed(-0.0004, 2), "0.00");
  EXPECT_EQ(fixed(-0.006, 2), "-0.01");
  EXPECT_EQ(fixed(std::numeric_limits<double>::infinity(), 1), "n/d");
}

}  // namespace
}  // namespace strikeplate
