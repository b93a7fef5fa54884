// Draws random surveys, solves them, and prints by class how far the section is off and how often its bands hold the
// truth. Usage: strikeplate-section-calibration [SURVEYS [SEED]]

#include <algorithm>
#include <cmath>
#include <cstdio>
#include <cstdlib>
#include <functional>
#include <vector>

#include "core/section/solve.h"
#include "tests/core/section/random_survey.h"

namespace {

using namespace strikeplate;
using namespace strikeplate::testing;

struct Held {
  int held68 = 0;
  int held95 = 0;
  int count = 0;
  void add(const Estimate& e, double truth) {
    held68 += e.low68 <= truth && truth <= e.high68 ? 1 : 0;
    held95 += e.low95 <= truth && truth <= e.high95 ? 1 : 0;
    ++count;
  }
  void add(const Held& h) {
    held68 += h.held68;
    held95 += h.held95;
    count += h.count;
  }
};

struct Outcome {
  SurveyKind kind;
  bool countRight = false;
  double labelsRight = 0.0;
  bool solved = false;
  std::vector<double> depthErrors;  ///< %, rms over stations, one for each interface
  Held depth;
  std::vector<Held> velocities;        ///< for each layer
  std::vector<double> velocityErrors;  ///< %
};

double meanVelocity(const RandomSurvey& s, int layer) {
  const auto [low, high] = std::minmax_element(s.spread.shots.begin(), s.spread.shots.end());
  double sum = 0.0;
  constexpr int kSteps = 200;
  for (int i = 0; i <= kSteps; ++i) {
    sum += std::log(s.scene.velocities[layer - 1](*low + (*high - *low) * i / kSteps));
  }
  return std::exp(sum / (kSteps + 1));
}

Outcome judge(const RandomSurvey& s) {
  Outcome o;
  o.kind = s.kind;
  const Section free = solveSection(s.noisy, {});
  o.countRight = free.determined && free.layers == s.kind.layers;
  SectionOptions told;
  told.layers = s.kind.layers;
  const Section section = o.countRight ? free : solveSection(s.noisy, told);
  o.solved = section.determined;
  if (!o.solved) {
    return o;
  }
  std::size_t right = 0;
  for (std::size_t i = 0; i < s.truth.layers.size(); ++i) {
    right += s.truth.layers[i] == section.layerOf[i] ? 1 : 0;
  }
  o.labelsRight = static_cast<double>(right) / static_cast<double>(s.truth.layers.size());
  for (int layer = 2; layer <= s.kind.layers; ++layer) {
    double squares = 0.0;
    for (const double x : s.spread.geophones) {
      const Estimate e = section.depthAt(layer, x);
      const double truth = s.scene.depth(layer, x);
      squares += std::pow((e.value - truth) / truth, 2);
      o.depth.add(e, truth);
    }
    o.depthErrors.push_back(100.0 * std::sqrt(squares / static_cast<double>(s.spread.geophones.size())));
  }
  o.velocities.resize(s.kind.layers);
  for (int layer = 1; layer <= s.kind.layers; ++layer) {
    const double truth = meanVelocity(s, layer);
    o.velocities[layer - 1].add(section.velocities[layer - 1], truth);
    o.velocityErrors.push_back(100.0 * std::abs(section.velocities[layer - 1].value / truth - 1.0));
  }
  return o;
}

double quantile(std::vector<double> v, double p) {
  if (v.empty()) {
    return std::nan("");
  }
  std::sort(v.begin(), v.end());
  return v[std::min(v.size() - 1, static_cast<std::size_t>(p * static_cast<double>(v.size())))];
}

void printClass(const char* name, const std::vector<Outcome>& all, const std::function<bool(const Outcome&)>& in) {
  std::vector<double> errors;
  Held depth;
  double labels = 0.0;
  int counts = 0;
  int n = 0;
  int solved = 0;
  for (const Outcome& o : all) {
    if (!in(o)) {
      continue;
    }
    ++n;
    counts += o.countRight ? 1 : 0;
    solved += o.solved ? 1 : 0;
    labels += o.labelsRight;
    errors.insert(errors.end(), o.depthErrors.begin(), o.depthErrors.end());
    depth.add(o.depth);
  }
  const double d = std::max(1, depth.count);
  std::printf("%-28s %4d %4d  %5.2f / %5.2f   %.3f  %.3f   %.3f  %.3f\n", name, n, n - solved, quantile(errors, 0.5),
              quantile(errors, 0.9), depth.held68 / d, depth.held95 / d, labels / std::max(1, solved),
              counts / std::max(1.0, static_cast<double>(n)));
}

void printVelocity(const char* name, const std::vector<Outcome>& all,
                   const std::function<int(const Outcome&)>& layer) {
  Held held;
  std::vector<double> errors;
  for (const Outcome& o : all) {
    const int n = layer(o);
    if (o.solved && n > 0) {
      held.add(o.velocities[n - 1]);
      errors.push_back(o.velocityErrors[n - 1]);
    }
  }
  const double d = std::max(1, held.count);
  std::printf("velocity of %-16s %4d        %5.2f / %5.2f   %.3f  %.3f\n", name, held.count, quantile(errors, 0.5),
              quantile(errors, 0.9), held.held68 / d, held.held95 / d);
}

void printTables(const std::vector<Outcome>& all) {
  std::printf("class                         n  none  median/p90 %%     68 %%   95 %%   labels count\n");
  printClass("all", all, [](const Outcome&) { return true; });
  for (const int layers : {2, 3}) {
    for (const bool rough : {false, true}) {
      const std::string name =
          std::string(layers == 2 ? "one refractor" : "two refractors") + (rough ? " rough" : " planar");
      printClass(name.c_str(), all,
                 [=](const Outcome& o) { return o.kind.layers == layers && o.kind.rough == rough; });
    }
  }
  for (const int geophones : {12, 24, 48}) {
    const std::string name = std::to_string(geophones) + " geophones";
    printClass(name.c_str(), all, [=](const Outcome& o) { return o.kind.geophones == geophones; });
  }
  printClass("first layer constant", all, [](const Outcome& o) { return !o.kind.soilVaries; });
  printClass("first layer varies", all, [](const Outcome& o) { return o.kind.soilVaries; });
  printClass("noise as stated", all, [](const Outcome& o) { return o.kind.noise == SurveyKind::Noise::kRight; });
  printClass("noise misstated by 2", all,
             [](const Outcome& o) { return o.kind.noise == SurveyKind::Noise::kMisstated; });
  printClass("5 % gross", all, [](const Outcome& o) { return o.kind.noise == SurveyKind::Noise::kGross; });
  printVelocity("first, constant", all, [](const Outcome& o) { return o.kind.soilVaries ? 0 : 1; });
  printVelocity("first, varying", all, [](const Outcome& o) { return o.kind.soilVaries ? 1 : 0; });
  printVelocity("middle layer", all, [](const Outcome& o) { return o.kind.layers == 3 ? 2 : 0; });
  printVelocity("deepest layer", all, [](const Outcome& o) { return o.kind.layers; });
}

}  // namespace

int main(int argc, char** argv) {
  const int surveys = argc > 1 ? std::atoi(argv[1]) : 100;
  const unsigned seed = argc > 2 ? static_cast<unsigned>(std::atoi(argv[2])) : 1U;
  std::vector<Outcome> all;
  for (int i = 0; i < surveys; ++i) {
    std::seed_seq sequence{seed, static_cast<unsigned>(i)};
    std::mt19937 random(sequence);
    const SurveyKind kind = randomKind(random);
    all.push_back(judge(randomSurvey(kind, random)));
    if (std::getenv("STRIKEPLATE_EACH") != nullptr) {
      const Outcome& o = all.back();
      std::printf("%d layers %d rough %d soil %d geo %d shots %d noise %d count %d labels %.3f err", i, o.kind.layers,
                  o.kind.rough, o.kind.soilVaries, o.kind.geophones, o.kind.shots, static_cast<int>(o.kind.noise),
                  o.countRight, o.labelsRight);
      for (const double e : o.depthErrors) {
        std::printf(" %.2f", e);
      }
      std::printf(" cover %.2f %.2f\n", o.depth.held68 / (o.depth.count + 1e-9),
                  o.depth.held95 / (o.depth.count + 1e-9));
    }
  }
  printTables(all);
  return 0;
}
