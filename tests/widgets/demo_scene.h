#pragma once

#include <algorithm>
#include <filesystem>
#include <memory>
#include <string>
#include <vector>

#include "core/survey/autopick.h"
#include "core/survey/gathers.h"
#include "core/survey/load.h"
#include "widgets/scene.h"

// The demo line as the workstation shows it: loaded, picked, interpreted. Made once for all tests.
namespace strikeplate::testing {

inline Scene sceneOf(const Survey& survey) {
  Scene scene;
  scene.survey = std::make_shared<Survey>(survey);
  scene.interpretation = std::make_shared<Interpretation>(interpret(survey));
  scene.gathers = std::make_shared<std::vector<Gather>>(gathersOf(survey));
  scene.selection.shot = 0;
  return scene;
}

inline Scene loadDemoScene() {
  std::vector<std::string> files;
  for (const auto& entry : std::filesystem::directory_iterator(STRIKEPLATE_SAMPLE_DATA "/demo_line")) {
    if (entry.path().extension() == ".sg2") {
      files.push_back(entry.path().string());
    }
  }
  std::sort(files.begin(), files.end());
  Survey survey = loadLine(files, "").survey;
  apply(survey, pickAutomatically(survey, gathersOf(survey), {}));
  return sceneOf(survey);
}

inline const Scene& demoScene() {
  static const Scene scene = loadDemoScene();
  return scene;
}

}  // namespace strikeplate::testing
