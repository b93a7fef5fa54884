#include <algorithm>
#include <vector>

#include <gtest/gtest.h>

#include "core/section/solve.h"
#include "tests/core/section/random_survey.h"

namespace strikeplate {
namespace {

// A small version of tests/calibration/section_calibration.cpp: 16 surveys cannot tell 95 from 93 %, but they tell
// when bands or answers have gone wrong.
TEST(Coverage, BandsHoldTheTruthOnRandomSurveys) {
  int held95 = 0;
  int held68 = 0;
  int count = 0;
  int countRight = 0;
  std::vector<double> errors;
  constexpr int kSurveys = 16;
  for (unsigned i = 0; i < kSurveys; ++i) {
    std::seed_seq sequence{2026U, i};
    std::mt19937 random(sequence);
    testing::SurveyKind kind = testing::randomKind(random);
    kind.geophones = std::min(kind.geophones, 24);
    const testing::RandomSurvey s = testing::randomSurvey(kind, random);
    SectionOptions options;
    const Section section = solveSection(s.noisy, options);
    ASSERT_TRUE(section.determined) << section.reason;
    countRight += section.layers == kind.layers ? 1 : 0;
    for (int layer = 2; layer <= std::min(kind.layers, section.layers); ++layer) {
      for (const double x : s.spread.geophones) {
        const Estimate e = section.depthAt(layer, x);
        const double truth = s.scene.depth(layer, x);
        held95 += e.low95 <= truth && truth <= e.high95 ? 1 : 0;
        held68 += e.low68 <= truth && truth <= e.high68 ? 1 : 0;
        errors.push_back(std::abs(e.value / truth - 1.0));
        ++count;
      }
    }
  }
  std::sort(errors.begin(), errors.end());
  EXPECT_GE(countRight, kSurveys - 1);
  EXPECT_GT(held95, 0.88 * count);
  EXPECT_GT(held68, 0.55 * count);
  EXPECT_LT(held68, 0.90 * count);
  EXPECT_LT(errors[errors.size() / 2], 0.04);
}

}  // namespace
}  // namespace strikeplate
