#include "tests/widgets/table_scene.h"

#include <algorithm>
#include <cmath>

namespace strikeplate::testing {

Survey twoLayerSurvey() {
  constexpr double kV1 = 400.0, kV2 = 2000.0, kDepth = 4.0;
  Survey survey;
  for (int i = 0; i < 24; ++i) {
    survey.geophones.push_back({2.0 * i, 0.0});
  }
  for (const double x : {-1.0, 23.0, 47.0}) {
    Shot shot;
    shot.point.x = x;
    for (int i = 0; i < 24; ++i) {
      const double offset = std::abs(2.0 * i - x);
      const double intercept = 2.0 * kDepth * std::sqrt(1.0 / (kV1 * kV1) - 1.0 / (kV2 * kV2));
      ShotTrace trace;
      trace.geophone = i;
      trace.pick = Pick{std::min(offset / kV1, intercept + offset / kV2), 0.3e-3, 0, PickOrigin::Imported};
      shot.traces.push_back(trace);
    }
    survey.shots.push_back(shot);
  }
  return survey;
}

Scene sceneOfTimes(const Survey& survey) {
  Scene scene;
  scene.survey = std::make_shared<Survey>(survey);
  scene.interpretation = std::make_shared<Interpretation>(interpret(survey));
  scene.gathers = std::make_shared<std::vector<Gather>>(survey.shots.size());
  scene.selection.shot = 0;
  return scene;
}

}  // namespace strikeplate::testing
