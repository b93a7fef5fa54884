#include <gtest/gtest.h>

#include "core/survey/interpretation.h"

namespace strikeplate {
namespace {

// The workstation interprets a line before anything is picked; line starts need arrivals and once crashed without.
TEST(Interpret, ASurveyWithoutPicksGivesAReasonAndNoDepth) {
  Survey survey;
  survey.geophones = {{0.0, 0.0}, {2.0, 0.0}};
  survey.shots.emplace_back();
  survey.shots[0].traces.resize(2);
  survey.shots[0].traces[1].geophone = 1;
  const Interpretation interpretation = interpret(survey);
  EXPECT_FALSE(interpretation.section.determined);
  EXPECT_FALSE(interpretation.section.reason.empty());
  EXPECT_TRUE(interpretation.opinions.empty());
}

}  // namespace
}  // namespace strikeplate
