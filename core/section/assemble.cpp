#include "core/section/assemble.h"

#include <algorithm>
#include <cmath>
#include <numbers>
#include <utility>

#include "core/section/functionals.h"
#include "core/section/memory.h"
#include "core/section/mixture.h"

namespace strikeplate {
namespace {

constexpr double kWorthMixing = 0.005;

std::vector<double> outputPositions(const TravelTimes& times, const SectionProblem& problem, double spacing) {
  std::vector<double> stations;
  for (const Geophone& g : times.geophones) {
    stations.push_back(g.x);
  }
  for (const ShotPoint& s : times.shots) {
    stations.push_back(s.x);
  }
  std::sort(stations.begin(), stations.end());
  stations.erase(std::unique(stations.begin(), stations.end()), stations.end());
  const double step = std::max(spacing > 0.0 ? spacing : 1.0, problem.grid.length() / 5000.0);
  std::vector<double> out;
  for (std::size_t i = 0; i < stations.size(); ++i) {
    out.push_back(stations[i]);
    if (i + 1 < stations.size()) {
      const double gap = stations[i + 1] - stations[i];
      const int parts = static_cast<int>(std::ceil(gap / step - 1e-9));
      for (int p = 1; p < parts; ++p) {
        out.push_back(stations[i] + gap * p / parts);
      }
    }
  }
  return out;
}

/// The mixture over modes and hyperparameters of every functional.
struct Posterior {
  std::vector<NormalMixture> functionals;
  Eigen::VectorXd theta;  ///< mean of the unknowns
};

Posterior mix(const SectionProblem& problem, const SectionCandidate& candidate) {
  const SectionLayout& best = candidate.modes.front().prior->layout();
  Posterior out;
  out.functionals.resize(functionalsOf(problem, best).count());
  out.theta = Eigen::VectorXd::Zero(best.size());
  double sum = 0.0;
  for (const SectionMode& mode : candidate.modes) {
    const SectionFunctionals f = functionalsOf(problem, mode.prior->layout());
    const Eigen::MatrixXd rows = functionalDerivatives(problem, f, mode.inversion->forward().model());
    std::array<int, kMostLayers - 1> lengths{};
    Eigen::MatrixXd transposed;
    for (const WeightedFit& w : mode.fits) {
      const double weight = mode.weight * w.weight;
      if (weight < kWorthMixing) {
        continue;
      }
      if (transposed.size() == 0 || lengths != w.fit.choice.length) {
        lengths = w.fit.choice.length;
        transposed = mode.prior->transposed(w.fit.choice, rows);
      }
      const Eigen::VectorXd variances = allVariances(f, w.fit.variances(*mode.prior, transposed));
      const Eigen::VectorXd theta = mode.prior->apply(w.fit.choice, w.fit.xi);
      const Eigen::VectorXd values = functionalValues(problem, f, theta);
      for (int i = 0; i < f.count(); ++i) {
        out.functionals[i].add(weight, values[i], variances[i]);
      }
      if (f.layout.gradient == best.gradient) {
        out.theta += weight * theta;
        sum += weight;
      }
    }
  }
  out.theta /= sum;
  return out;
}

Estimate transformed(const Estimate& e, double (*function)(double), double derivative, bool rising) {
  Estimate out = e;
  if (!e.determined) {
    return out;
  }
  out.value = function(e.value);
  out.sigma = std::abs(derivative) * e.sigma;
  out.low68 = function(rising ? e.low68 : e.high68);
  out.high68 = function(rising ? e.high68 : e.low68);
  out.low95 = function(rising ? e.low95 : e.high95);
  out.high95 = function(rising ? e.high95 : e.low95);
  return out;
}

Estimate between(const Estimate& a, const Estimate& b, double f) {
  const auto mean = [f](double p, double q) { return p + f * (q - p); };
  Estimate e = a;
  e.value = mean(a.value, b.value);
  e.sigma = mean(a.sigma, b.sigma);
  e.low68 = mean(a.low68, b.low68);
  e.high68 = mean(a.high68, b.high68);
  e.low95 = mean(a.low95, b.low95);
  e.high95 = mean(a.high95, b.high95);
  return e;
}

/// No interface lies above the ground.
Estimate underGround(Estimate elevation, double ground) {
  for (double* v : {&elevation.value, &elevation.low68, &elevation.high68, &elevation.low95, &elevation.high95}) {
    *v = std::min(*v, ground);
  }
  return elevation;
}

Estimate depthOf(const Estimate& elevation, double ground) {
  Estimate d = elevation;
  d.value = ground - elevation.value;
  d.low68 = ground - elevation.high68;
  d.high68 = ground - elevation.low68;
  d.low95 = ground - elevation.high95;
  d.high95 = ground - elevation.low95;
  return d;
}

SectionInterface interfaceOf(const Section& s, const SectionProblem& problem, const SectionFunctionals& f,
                             const Posterior& posterior, int k) {
  SectionInterface out;
  out.layer = k + 1;
  std::vector<Estimate> atNodes;
  for (int j = 0; j < f.nodeCount; ++j) {
    atNodes.push_back(posterior.functionals[f.elevation(k, f.firstNode + j)].estimate());
  }
  for (std::size_t i = 0; i < s.x.size(); ++i) {
    const double c = std::clamp(problem.grid.coordinate(s.x[i]) - f.firstNode, 0.0, f.nodeCount - 1.0);
    const int j = std::min(static_cast<int>(c), f.nodeCount - 2);
    const Estimate e = underGround(between(atNodes[j], atNodes[j + 1], c - j), s.ground[i]);
    out.elevation.push_back(e);
    out.depth.push_back(depthOf(e, s.ground[i]));
  }
  const Estimate slope = posterior.functionals[f.slope(k)].estimate();
  const double perRadian = -180.0 / std::numbers::pi;
  out.meanDip = transformed(
      slope, [](double v) { return -std::atan(v) * 180.0 / std::numbers::pi; },
      perRadian / (1.0 + slope.value * slope.value), false);
  return out;
}

void addVelocities(Section& s, const SectionProblem& problem, const SectionFunctionals& f,
                   const Posterior& posterior) {
  const SectionModel model = makeSectionModel(problem.grid, f.layout, posterior.theta);
  for (int layer = 1; layer <= s.layers; ++layer) {
    const Estimate e = posterior.functionals[f.logVelocity(layer)].estimate();
    s.velocities.push_back(transformed(
        e, [](double v) { return std::exp(v); }, std::exp(e.value), true));
    std::vector<double> along;
    for (const double x : s.x) {
      double v = 1.0 / problem.grid.at(model.slowness[layer - 1], x);
      if (layer == 1) {
        v += model.gradient * 0.5 * (problem.grid.at(model.z[0], x) - problem.grid.at(model.z[1], x));
      }
      along.push_back(v);
    }
    s.velocityAlong.push_back(std::move(along));
  }
}

/// Probability that pick i of a mode comes first through `layer`, given what is known of the section.
double probabilityOf(const SectionInversion& inversion, int pick, int layer, const Eigen::MatrixXd& covariance,
                     RowGatherer& gatherer) {
  const SectionForward& forward = inversion.forward();
  const double near = 12.0 * inversion.problem().picks.picks[pick].sigma;
  double least = 1.0;
  for (int other = 1; other <= inversion.prior().layout().layers; ++other) {
    const double later = forward.time(pick, other) - forward.time(pick, layer);
    if (other == layer || later > near) {
      continue;
    }
    const SparseRow a = timeDerivative(forward, pick, other, gatherer);
    const SparseRow b = timeDerivative(forward, pick, layer, gatherer);
    gatherer.add(a, 1.0);
    gatherer.add(b, -1.0);
    const double variance = std::max(gatherer.take().quadratic(covariance), 1e-18);
    least = std::min(least, 0.5 * std::erfc(-later / std::sqrt(2.0 * variance)));
  }
  return least;
}

void addPicks(Section& s, const SectionProblem& problem, const SectionCandidate& candidate) {
  const SectionInversion& best = *candidate.modes.front().inversion;
  const int count = problem.picks.count();
  s.layerOf = best.state().labels;
  s.layerProbability.assign(count, 0.0);
  s.inlierProbability.assign(count, 0.0);
  double squares = 0.0;
  for (int i = 0; i < count; ++i) {
    s.predicted.push_back(best.predicted(i));
    const double r = problem.picks.picks[i].time - s.predicted.back();
    squares += r * r;
  }
  s.rms = std::sqrt(squares / count);
  for (const SectionMode& mode : candidate.modes) {
    const SectionInversion& inversion = *mode.inversion;
    RowGatherer gatherer(mode.prior->layout().size());
    const Eigen::MatrixXd covariance = mode.fits.front().fit.covariance(*mode.prior);
    const double scale = SectionPrior::noise(inversion.state().choice.noise);
    for (int i = 0; i < count; ++i) {
      const SectionPick& p = problem.picks.picks[i];
      const int layer = s.layerOf[i];
      s.layerProbability[i] +=
          mode.weight * (p.heldLayer > 0 ? 1.0 : probabilityOf(inversion, i, layer, covariance, gatherer));
      const SparseRow row = timeDerivative(inversion.forward(), i, inversion.state().labels[i], gatherer);
      const double r = p.time - inversion.predicted(i);
      const double spread = std::sqrt(r * r + row.quadratic(covariance)) / (scale * p.sigma);
      s.inlierProbability[i] += mode.weight * PickNoise::inlier(spread);
    }
  }
}

}  // namespace

Section assembleSection(const SectionProblem& problem, const TravelTimes& times, const SectionOptions& options,
                        const SectionCandidate& candidate) {
  Section s;
  s.determined = true;
  s.converged = candidate.modes.front().converged;
  s.finished = candidate.finished;
  s.layers = candidate.layers;
  s.x = outputPositions(times, problem, options.outputSpacing);
  for (const double x : s.x) {
    s.ground.push_back(times.ground.at(x));
  }
  const SectionFunctionals f = functionalsOf(problem, candidate.modes.front().prior->layout());
  const Posterior posterior = mix(problem, candidate);
  for (int k = 1; k < candidate.layers; ++k) {
    s.interfaces.push_back(interfaceOf(s, problem, f, posterior, k));
  }
  addVelocities(s, problem, f, posterior);
  addPicks(s, problem, candidate);
  for (int shot = 0; problem.solvesDelays() && shot < f.layout.delays; ++shot) {
    s.triggerDelays.push_back(problem.delaySigma[shot] > 0.0 ? posterior.functionals[f.delay(shot)].estimate()
                                                             : Estimate::none("not solved for"));
  }
  s.noiseScale = SectionPrior::noise(candidate.modes.front().inversion->state().choice.noise);
  s.memory = remember(problem, candidate);
  return s;
}

Section undeterminedSection(const TravelTimes& times, std::string reason) {
  Section s;
  s.determined = false;
  s.reason = std::move(reason);
  s.predicted.assign(times.arrivals.size(), Estimate::kNaN);
  s.layerOf.assign(times.arrivals.size(), 0);
  s.layerProbability.assign(times.arrivals.size(), Estimate::kNaN);
  s.inlierProbability.assign(times.arrivals.size(), Estimate::kNaN);
  return s;
}

}  // namespace strikeplate
