#include "core/section/memory.h"

#include <algorithm>
#include <cmath>

namespace strikeplate {
namespace {

constexpr int kMostRemembered = 6;

std::vector<double> signature(const SectionProblem& problem, int layers) {
  const SectionLayout layout = problem.layout(layers);
  return {static_cast<double>(layers),
          static_cast<double>(layout.knots),
          static_cast<double>(problem.picks.shots.size()),
          static_cast<double>(layout.velocityKnots),
          problem.grid.start,
          problem.grid.knotSpacing,
          problem.grid.lineStart,
          problem.grid.lineEnd};
}

/// Delays of all shots are solved for only when asked for; the evidence asks for some at most.
bool allSolved(const std::vector<double>& delaySigma) {
  return !delaySigma.empty() && std::all_of(delaySigma.begin(), delaySigma.end(), [](double s) { return s > 0.0; });
}

void put(std::vector<double>& out, const HyperChoice& c) {
  out.insert(out.end(), c.roughness.begin(), c.roughness.end());
  out.insert(out.end(), c.length.begin(), c.length.end());
  out.insert(out.end(), {static_cast<double>(c.soil), static_cast<double>(c.rock), static_cast<double>(c.noise)});
}

/// Reads numbers one after the other; fails once and for all when they run out or are not what they should be.
class Reader {
 public:
  explicit Reader(const std::vector<double>& numbers) : numbers_(numbers) {}

  double number() {
    if (at_ >= numbers_.size() || !std::isfinite(numbers_[at_])) {
      good_ = false;
      return 0.0;
    }
    return numbers_[at_++];
  }
  int integer(int most) {
    const double v = number();
    if (!(v >= 0.0) || v > most) {
      good_ = false;
      return 0;
    }
    return static_cast<int>(v);
  }
  HyperChoice choice() {
    HyperChoice c;
    for (int& v : c.roughness) {
      v = integer(SectionPrior::kRoughnesses - 1);
    }
    for (int& v : c.length) {
      v = integer(SectionPrior::kLengths - 1);
    }
    c.soil = integer(SectionPrior::kDeviations - 1);
    c.rock = integer(SectionPrior::kDeviations - 1);
    c.noise = integer(SectionPrior::kNoises - 1);
    return c;
  }
  [[nodiscard]] bool good() const { return good_; }

 private:
  const std::vector<double>& numbers_;
  std::size_t at_ = 0;
  bool good_ = true;
};

}  // namespace

SectionMemory remember(const SectionProblem& problem, const SectionCandidate& candidate) {
  const SectionMode& mode = candidate.modes.front();
  SectionMemory m;
  m.layers = candidate.layers;
  std::vector<double>& n = m.numbers;
  n = signature(problem, candidate.layers);
  n.push_back(mode.prior->layout().gradient ? 1.0 : 0.0);
  n.insert(n.end(), problem.delaySigma.begin(), problem.delaySigma.end());
  n.insert(n.end(), candidate.centre.depth.begin(), candidate.centre.depth.end());
  n.insert(n.end(), candidate.centre.logVelocity.begin(), candidate.centre.logVelocity.end());
  n.push_back(candidate.centre.firstSigma);
  put(n, mode.inversion->state().choice);
  const Eigen::VectorXd& xi = mode.inversion->state().xi;
  n.push_back(static_cast<double>(xi.size()));
  n.insert(n.end(), xi.begin(), xi.end());
  const std::size_t count = std::min<std::size_t>(mode.fits.size(), kMostRemembered);
  n.push_back(static_cast<double>(count));
  for (std::size_t i = 0; i < count; ++i) {
    put(n, mode.fits[i].fit.choice);
    n.push_back(mode.fits[i].weight);
  }
  return m;
}

std::optional<Recalled> recall(const SectionProblem& problem, const SectionMemory& memory) {
  if (memory.layers < 2 || memory.layers > kMostLayers) {
    return std::nullopt;
  }
  Reader reader(memory.numbers);
  for (const double expected : signature(problem, memory.layers)) {
    if (reader.number() != expected || !reader.good()) {
      return std::nullopt;
    }
  }
  Recalled out;
  out.gradient = reader.integer(1) == 1;
  out.centre.delaySigma.resize(problem.picks.shots.size());
  for (double& sigma : out.centre.delaySigma) {
    sigma = reader.number();
  }
  if (problem.solvesDelays() != allSolved(out.centre.delaySigma)) {
    return std::nullopt;
  }
  for (int k = 1; k < memory.layers; ++k) {
    out.centre.depth.push_back(reader.number());
  }
  for (int layer = 1; layer <= memory.layers; ++layer) {
    out.centre.logVelocity.push_back(reader.number());
  }
  out.centre.firstSigma = reader.number();
  out.choice = reader.choice();
  const int size = reader.integer(static_cast<int>(memory.numbers.size()));
  out.xi.resize(size);
  for (double& v : out.xi) {
    v = reader.number();
  }
  const int count = reader.integer(kMostRemembered);
  for (int i = 0; i < count; ++i) {
    const HyperChoice choice = reader.choice();
    out.choices.emplace_back(choice, reader.number());
  }
  if (!reader.good() || out.choices.empty() || !(out.centre.firstSigma > 0.0)) {
    return std::nullopt;
  }
  return out;
}

}  // namespace strikeplate
