#include "widgets/section_content.h"

#include <algorithm>
#include <cmath>

#include <gtest/gtest.h>

#include "core/methods/blind_zone.h"
#include "tests/core/report/sheet_sample.h"
#include "widgets/opinion_summary.h"
#include "widgets/section_drawing.h"

namespace strikeplate {
namespace {

Scene sceneOf(const testing::SheetSample& sample) {
  Scene scene;
  scene.survey = std::make_shared<Survey>(sample.survey);
  scene.interpretation = std::make_shared<Interpretation>(sample.interpretation);
  scene.gathers = std::make_shared<std::vector<Gather>>();
  return scene;
}

TEST(SectionContent, TheElevationsHoldGroundAndDeepestInterface) {
  const auto sample = testing::sheetSample();
  const ElevationRange range = elevationRange(sceneOf(sample));
  EXPECT_GE(range.top, 101.79) << "the ground is highest near 47 m";
  double lowest = 1e9;
  for (std::size_t i = 0; i < sample.interpretation.section.x.size(); ++i) {
    lowest = std::min(lowest, sample.interpretation.section.interfaces[1].elevation[i].value);
  }
  EXPECT_LT(range.bottom, lowest);
  EXPECT_GT(range.bottom, lowest - 0.65 * (range.top - lowest)) << "an unbounded band takes half the height at most";
}

TEST(SectionContent, TheHiddenLayerAllowanceIsThatOfTheWorstHiddenLayer) {
  const auto sample = testing::sheetSample();
  const Section& section = sample.interpretation.section;
  const auto allowances = hiddenAllowances(section);
  ASSERT_EQ(allowances.size(), 2U);
  const double top = section.interfaces[0].depth[30].value;
  const double depth = section.interfaces[1].depth[30].value;
  const auto worst = worstHiddenLayer(section.velocities[1].value, section.velocities[2].value, depth - top);
  ASSERT_TRUE(worst.has_value());
  EXPECT_NEAR(allowances[1].depth[30], top + worst->deepest, 1e-9);
}

TEST(SectionContent, ADepthBelongsToTheLayerAroundIt) {
  const auto sample = testing::sheetSample();
  const Section& section = sample.interpretation.section;
  EXPECT_EQ(layerAt(section, 40.0, 0.5), 1);
  EXPECT_EQ(layerAt(section, 40.0, section.depthAt(2, 40.0).value + 0.1), 2);
  EXPECT_EQ(layerAt(section, 40.0, 90.0), 3);
  EXPECT_EQ(layerAt(section, 40.0, -1.0), 0) << "air";
  EXPECT_EQ(layerAt(section, 900.0, 5.0), 0) << "beyond the section";
}

TEST(SectionContent, LabelsAreMovedApartAndStayInside) {
  std::vector<double> tops = {10.0, 12.0, 95.0};
  spreadApart(tops, 20.0, QRectF(0, 0, 50, 100));
  EXPECT_EQ(tops, (std::vector<double>{10.0, 30.0, 80.0}));
}

TEST(OpinionSummary, MeansAreTheWeightedAndThePlainOne) {
  Interpretation interpretation;
  interpretation.opinions = {{"one", 2, -1, 10.0, Estimate::normal(4.0, 0.1), ""},
                             {"one", 2, -1, 50.0, Estimate::normal(9.0, 0.1), ""},
                             {"two", 2, -1, 12.0, Estimate::normal(6.0, 0.2), ""},
                             {"three", 2, -1, 10.0, Estimate::none("too few picks"), ""},
                             {"other layer", 3, -1, 10.0, Estimate::normal(20.0, 1.0), ""}};
  const OpinionSummary summary = opinionsAt(interpretation, 2, 11.0);
  ASSERT_EQ(summary.rows.size(), 2U) << "each route at the position nearest to 11 m";
  EXPECT_EQ(summary.count, 2);
  EXPECT_NEAR(summary.mean, 5.0, 1e-12);
  EXPECT_NEAR(summary.weightedMean, (4.0 * 100.0 + 6.0 * 25.0) / 125.0, 1e-12);
  EXPECT_NEAR(summary.deviation, std::sqrt(2.0), 1e-12) << "sample standard deviation of 4 and 6";
  ASSERT_EQ(summary.undetermined.size(), 1U);
  EXPECT_EQ(summary.undetermined[0]->route, "three");
}

TEST(OpinionSummary, ARouteDisagreesBeyondBothErrorsTogether) {
  auto sample = testing::sheetSample();
  const Estimate section = sample.interpretation.section.depthAt(2, 40.0);
  const double sigma = 0.3;
  const double allowed = 1.96 * std::hypot(sigma, section.sigma);
  sample.interpretation.opinions = {
      {"near", 2, -1, 40.0, Estimate::normal(section.value + 0.98 * allowed, sigma), ""},
      {"far", 2, -1, 40.0, Estimate::normal(section.value + 1.02 * allowed, sigma), ""}};
  const OpinionSummary summary = opinionsAt(sample.interpretation, 2, 40.0);
  ASSERT_EQ(summary.rows.size(), 2U);
  EXPECT_FALSE(summary.rows[0].disagrees);
  EXPECT_TRUE(summary.rows[1].disagrees);
}

}  // namespace
}  // namespace strikeplate
