#pragma once

#include <random>

#include "tests/core/section/scene.h"

namespace strikeplate::testing {

/// What kind of survey to draw.
struct SurveyKind {
  enum class Noise { kRight, kMisstated, kGross };
  int layers = 2;
  bool rough = false;
  bool soilVaries = false;
  int geophones = 24;
  int shots = 7;
  Noise noise = Noise::kRight;
};

SurveyKind randomKind(std::mt19937& random);

/// An invented survey with its truth. Every layer owns at least 8 % of the first arrivals.
struct RandomSurvey {
  SurveyKind kind;
  Scene scene;
  Spread spread;
  TrueTimes truth;    ///< exact
  TravelTimes noisy;  ///< what the program gets to see
};

/// Velocities, depths, relief, spread and noise drawn at random for the kind; times by the network at 0.25 m.
RandomSurvey randomSurvey(const SurveyKind& kind, std::mt19937& random);

}  // namespace strikeplate::testing
