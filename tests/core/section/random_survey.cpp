#include "tests/core/section/random_survey.h"

#include <algorithm>
#include <cmath>
#include <numbers>

namespace strikeplate::testing {
namespace {

using Function = std::function<double(double)>;

double uniform(std::mt19937& random, double low, double high) {
  return std::uniform_real_distribution<double>(low, high)(random);
}

int whole(std::mt19937& random, int low, int high) {
  return std::uniform_int_distribution<int>(low, high)(random);
}

/// Relief of amplitude about 1 on a line of a length: a channel or hump, a rounded step, or uneven ground made of
/// random waves whose power falls with the fourth power of the wave number.
Function relief(std::mt19937& random, double length) {
  const double centre = uniform(random, 0.2, 0.8) * length;
  const double sign = uniform(random, 0.0, 1.0) < 0.5 ? -1.0 : 1.0;
  const double width = uniform(random, 0.06, 0.18) * length;
  switch (whole(random, 0, 2)) {
    case 0:
      return [=](double x) { return sign * 1.5 * std::exp(-0.5 * (x - centre) * (x - centre) / (width * width)); };
    case 1:
      return [=](double x) { return sign * std::tanh((x - centre) / width); };
    default:
      break;
  }
  std::vector<double> amplitudes;
  std::vector<double> phases;
  std::vector<double> numbers;
  double power = 0.0;
  const double corner = uniform(random, 2.5, 6.0) / length;  // 1/m, where the power begins to fall
  for (int i = 1; i <= 24; ++i) {
    const double k = 2.0 * std::numbers::pi * i / (1.6 * length);
    const double q = k / (2.0 * corner);
    const double a = 1.0 / (1.0 + q * q);
    amplitudes.push_back(a * std::normal_distribution<double>()(random));
    phases.push_back(uniform(random, 0.0, 2.0 * std::numbers::pi));
    numbers.push_back(k);
    power += 0.5 * a * a;
  }
  const double norm = 1.0 / std::sqrt(power);
  return [=](double x) {
    double sum = 0.0;
    for (std::size_t i = 0; i < numbers.size(); ++i) {
      sum += amplitudes[i] * std::cos(numbers[i] * x + phases[i]);
    }
    return norm * sum;
  };
}

void drawVelocities(RandomSurvey& s, std::mt19937& random, double length) {
  std::vector<double> v{uniform(random, 300.0, 700.0)};
  if (s.kind.layers == 2) {
    v.push_back(v[0] * uniform(random, 2.2, 6.0));
  } else {
    v.push_back(v[0] * uniform(random, 2.0, 3.2));
    v.push_back(v[1] * uniform(random, 1.8, 3.0));
  }
  s.scene.velocities.clear();
  for (const double value : v) {
    s.scene.velocities.emplace_back([value](double) { return value; });
  }
  if (s.kind.soilVaries) {
    const double amplitude = uniform(random, 0.1, 0.2);
    const double wave = uniform(random, 0.6, 1.5) * length;
    const double phase = uniform(random, 0.0, 2.0 * std::numbers::pi);
    const double mean = v[0];
    s.scene.velocities[0] = [=](double x) {
      return mean * (1.0 + amplitude * std::sin(2.0 * std::numbers::pi * x / wave + phase));
    };
  }
}

void drawInterfaces(RandomSurvey& s, std::mt19937& random, double length) {
  s.scene.interfaces.clear();
  double depth = 0.0;
  for (int k = 0; k + 1 < s.kind.layers; ++k) {
    const double thickness = length * (k == 0 ? uniform(random, 0.03, 0.12) : uniform(random, 0.08, 0.2));
    depth += thickness;
    const double slope = uniform(random, -0.25, 0.25) * thickness / length;
    const double amplitude = s.kind.rough ? uniform(random, 0.1, 0.25) * thickness : 0.0;
    const Function shape = relief(random, length);
    const double middle = 0.5 * length;
    s.scene.interfaces.emplace_back(
        [=](double x) { return -depth - slope * (x - middle) + (amplitude > 0.0 ? amplitude * shape(x) : 0.0); });
  }
}

void drawSpread(RandomSurvey& s, std::mt19937& random, double spacing) {
  const double length = (s.kind.geophones - 1) * spacing;
  std::vector<double> shots;
  const int inside = s.kind.shots - 2;
  for (int i = 0; i < inside; ++i) {
    // On the line between geophones, from end to end.
    const int gap = static_cast<int>(std::lround((s.kind.geophones - 2.0) * i / std::max(1, inside - 1)));
    shots.push_back((gap + 0.5) * spacing);
  }
  const double off = uniform(random, 0.05, 0.35) * length;
  shots.push_back(-off);
  shots.push_back(length + off);
  s.spread = evenSpread(s.kind.geophones, spacing, shots);
}

bool everyLayerIsSeen(const RandomSurvey& s) {
  for (int layer = 1; layer <= s.kind.layers; ++layer) {
    const auto n = std::count(s.truth.layers.begin(), s.truth.layers.end(), layer);
    if (static_cast<double>(n) < 0.08 * static_cast<double>(s.truth.layers.size())) {
      return false;
    }
  }
  return true;
}

void addNoise(RandomSurvey& s, std::mt19937& random) {
  const bool doubled = uniform(random, 0.0, 1.0) < 0.5;
  const double factor = s.kind.noise == SurveyKind::Noise::kMisstated ? (doubled ? 2.0 : 0.5) : 1.0;
  s.noisy = withNoise(s.truth.times, random, factor, s.kind.noise == SurveyKind::Noise::kGross ? 0.05 : 0.0);
}

}  // namespace

SurveyKind randomKind(std::mt19937& random) {
  SurveyKind k;
  k.layers = whole(random, 2, 3);
  k.rough = whole(random, 0, 1) == 1;
  k.soilVaries = whole(random, 0, 1) == 1;
  k.geophones = 12 << whole(random, 0, 2);
  k.shots = whole(random, 5, 9);
  k.noise = static_cast<SurveyKind::Noise>(whole(random, 0, 2));
  return k;
}

RandomSurvey randomSurvey(const SurveyKind& kind, std::mt19937& random) {
  RandomSurvey s;
  s.kind = kind;
  do {
    const double spacing = uniform(random, 2.0, 5.0);
    drawSpread(s, random, spacing);
    const double length = (kind.geophones - 1) * spacing;
    drawVelocities(s, random, length);
    drawInterfaces(s, random, length);
    s.truth = networkTimes(s.scene, s.spread, 0.25, uniform(random, 0.4e-3, 1e-3));
  } while (!everyLayerIsSeen(s));
  addNoise(s, random);
  return s;
}

}  // namespace strikeplate::testing
