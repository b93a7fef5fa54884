#include "tests/widgets/record_scene.h"

#include <cmath>
#include <random>

#include "core/survey/gathers.h"

namespace strikeplate::testing {

double onsetAt(double offset) {
  return 0.004 + offset / 1000.0;
}

Survey sharpLine(int geophones) {
  constexpr int kSamples = 560;
  Survey survey;
  for (int g = 0; g < geophones; ++g) {
    survey.geophones.push_back({2.0 * g, 0.0});
  }
  std::mt19937 random(7);
  std::normal_distribution<double> noise(0.0, 0.005);
  for (const double x : {-5.0, 2.0 * geophones + 3.0}) {
    auto record = std::make_shared<ShotRecord>();
    record->file = "made.sg2";
    Shot shot;
    shot.point.x = x;
    for (int g = 0; g < geophones; ++g) {
      Trace trace;
      trace.sampleInterval = kInterval;
      trace.delay = kStart;
      const double onset = onsetAt(std::abs(survey.geophones[static_cast<std::size_t>(g)].x - x));
      for (int i = 0; i < kSamples; ++i) {
        const double after = trace.timeOf(i) - onset;
        trace.samples.push_back(static_cast<float>(
            noise(random) + (after > 0.0 ? std::sin(400.0 * after) * std::exp(-60.0 * after) : 0.0)));
      }
      record->traces.push_back(std::move(trace));
      shot.traces.push_back({g, TraceState::Live, "", std::nullopt});
    }
    shot.blows.push_back({static_cast<int>(survey.records.size())});
    survey.records.push_back(record);
    survey.shots.push_back(shot);
  }
  return survey;
}

Survey pickedLine(int geophones) {
  Survey survey = sharpLine(geophones);
  for (Shot& shot : survey.shots) {
    for (ShotTrace& trace : shot.traces) {
      const double x = survey.geophones[static_cast<std::size_t>(trace.geophone)].x;
      trace.pick = Pick{onsetAt(std::abs(x - shot.point.x)), 5e-4, 0, PickOrigin::Automatic};
    }
  }
  return survey;
}

Scene sceneOf(const Survey& survey) {
  Scene scene;
  scene.survey = std::make_shared<Survey>(survey);
  scene.gathers = std::make_shared<std::vector<Gather>>(gathersOf(survey));
  scene.selection = {0, -1, 0};
  return scene;
}

}  // namespace strikeplate::testing
