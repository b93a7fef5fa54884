#include "core/section/inversion.h"

#include <algorithm>
#include <cmath>
#include <numbers>
#include <utility>

namespace strikeplate {
namespace {

constexpr double kLongestLogVelocityStep = 0.5;
constexpr double kNothingToGain = 0.5;  // nats that the linearised problem promises and the kinks in it deny
constexpr double kShareFelt = 1e-3;
constexpr double kDoubtReach = 8.0;  // scaled sigmas; layers further apart do not compete for a pick

}  // namespace

bool SectionProblem::solvesDelays() const {
  return std::any_of(delaySigma.begin(), delaySigma.end(), [](double s) { return s > 0.0; });
}

SectionInversion::SectionInversion(const SectionProblem& problem, const SectionPrior& prior, SectionState state)
    : problem_(&problem), prior_(&prior) {
  restart(std::move(state));
}

void SectionInversion::restart(SectionState state) {
  accept(tryState(std::move(state)));
}

void SectionInversion::accept(Trial trial) {
  state_ = std::move(trial.state);
  theta_ = std::move(trial.theta);
  forward_ = std::move(trial.forward);
  objective_ = trial.objective;
}

EarliestTime earliestTime(const SectionForward& forward, int pick, double doubt) {
  const int layers = forward.model().layout.layers;
  const double tau = std::max(doubt, 1e-9) * std::sqrt(3.0) / std::numbers::pi;
  const double least = forward.time(pick, forward.earliest(pick));
  EarliestTime out;
  double sum = 0.0;
  for (int layer = 1; layer <= layers; ++layer) {
    out.share[layer - 1] = std::exp((least - forward.time(pick, layer)) / tau);
    sum += out.share[layer - 1];
  }
  for (double& s : out.share) {
    s /= sum;
  }
  out.time = least - tau * std::log(sum);
  return out;
}

double SectionInversion::predicted(int pick) const {
  return forward_->time(pick, state_.labels[pick]) + theta_[prior_->layout().delay(problem_->picks.picks[pick].shot)];
}

double SectionInversion::expectedFor(const SectionForward& forward, const SectionState& state,
                                     const Eigen::VectorXd& theta, int pick) const {
  const SectionPick& p = problem_->picks.picks[pick];
  const double delay = theta[prior_->layout().delay(p.shot)];
  if (state.doubt.empty() || p.heldLayer > 0) {
    return forward.time(pick, state.labels[pick]) + delay;
  }
  return earliestTime(forward, pick, state.doubt[pick]).time + delay;
}

SparseRow SectionInversion::expectedDerivative(int pick, RowGatherer& gatherer) const {
  if (state_.doubt.empty() || problem_->picks.picks[pick].heldLayer > 0) {
    return timeDerivative(*forward_, pick, state_.labels[pick], gatherer);
  }
  const EarliestTime earliest = earliestTime(*forward_, pick, state_.doubt[pick]);
  std::vector<std::pair<SparseRow, double>> parts;
  for (int layer = 1; layer <= prior_->layout().layers; ++layer) {
    if (earliest.share[layer - 1] > kShareFelt) {
      parts.emplace_back(timeDerivative(*forward_, pick, layer, gatherer), earliest.share[layer - 1]);
    }
  }
  if (parts.size() == 1) {
    return std::move(parts.front().first);
  }
  for (const auto& [row, share] : parts) {
    gatherer.add(row, share);
  }
  return gatherer.take();
}

std::vector<double> SectionInversion::measureDoubt() const {
  const int count = problem_->picks.count();
  const double s = SectionPrior::noise(state_.choice.noise);
  std::vector<double> doubt(count, 0.0);
  std::vector<int> near;
  std::vector<SparseRow> rows;
  RowGatherer gatherer(prior_->layout().size());
  for (int i = 0; i < count; ++i) {
    const int first = forward_->earliest(i);
    int rival = 0;
    for (int layer = 1; layer <= prior_->layout().layers; ++layer) {
      if (layer != first && (rival == 0 || forward_->time(i, layer) < forward_->time(i, rival))) {
        rival = layer;
      }
    }
    const double reach = kDoubtReach * s * problem_->picks.picks[i].sigma;
    if (rival == 0 || forward_->time(i, rival) - forward_->time(i, first) > reach) {
      continue;
    }
    const SparseRow a = timeDerivative(*forward_, i, first, gatherer);
    const SparseRow b = timeDerivative(*forward_, i, rival, gatherer);
    gatherer.add(a, 1.0);
    gatherer.add(b, -1.0);
    rows.push_back(gatherer.take());
    near.push_back(i);
  }
  if (near.empty()) {
    return doubt;
  }
  Eigen::MatrixXd dense = Eigen::MatrixXd::Zero(prior_->layout().size(), static_cast<Eigen::Index>(near.size()));
  for (std::size_t c = 0; c < rows.size(); ++c) {
    for (std::size_t i = 0; i < rows[c].index.size(); ++i) {
      dense(rows[c].index[i], static_cast<Eigen::Index>(c)) = rows[c].value[i];
    }
  }
  const SectionFit fit = linearise().fit(state_.choice);
  const Eigen::VectorXd variances = fit.variances(*prior_, prior_->transposed(state_.choice, dense));
  for (std::size_t c = 0; c < near.size(); ++c) {
    doubt[near[c]] = std::sqrt(variances[static_cast<Eigen::Index>(c)]);
  }
  return doubt;
}

double SectionInversion::boreholeMisfit(const SectionForward& forward) const {
  double sum = 0.0;
  for (const Borehole& b : problem_->boreholes) {
    if (b.layer > prior_->layout().layers) {
      continue;
    }
    const SectionModel& m = forward.model();
    const double depth = m.grid->at(m.z[0], b.x) - m.grid->at(m.z[b.layer - 1], b.x);
    const double r = (depth - b.depth) / b.sigma;
    sum += 0.5 * r * r;
  }
  return sum;
}

SectionInversion::Trial SectionInversion::tryState(SectionState state) const {
  Trial t;
  t.state = std::move(state);
  t.theta = prior_->apply(t.state.choice, t.state.xi);
  t.forward =
      std::make_unique<SectionForward>(makeSectionModel(problem_->grid, prior_->layout(), t.theta), problem_->picks);
  if (t.state.labelsFree) {
    for (int i = 0; i < problem_->picks.count(); ++i) {
      const int held = problem_->picks.picks[i].heldLayer;
      t.state.labels[i] = held > 0 ? std::min(held, prior_->layout().layers) : t.forward->earliest(i);
    }
  }
  t.objective = objectiveOf(t.state, t.theta, *t.forward);
  return t;
}

double SectionInversion::objectiveOf(const SectionState& state, const Eigen::VectorXd& theta,
                                     const SectionForward& forward) const {
  const PickNoise noise(state.noise);
  const double s = SectionPrior::noise(state.choice.noise);
  double sum = 0.5 * state.xi.squaredNorm() + boreholeMisfit(forward);
  for (int i = 0; i < problem_->picks.count(); ++i) {
    const SectionPick& p = problem_->picks.picks[i];
    sum += noise.loss((p.time - expectedFor(forward, state, theta, i)) / (s * p.sigma));
  }
  return std::isfinite(sum) ? sum : std::numeric_limits<double>::infinity();
}

void SectionInversion::setDoubt(std::vector<double> doubt) {
  state_.doubt = std::move(doubt);
  objective_ = objectiveOf(state_, theta_, *forward_);
}

NormalEquations SectionInversion::pickEquations() const {
  const SectionLayout& layout = prior_->layout();
  const Eigen::VectorXd fromMean = theta_ - prior_->mean();
  const PickNoise noise(state_.noise);
  const double s = SectionPrior::noise(state_.choice.noise);
  NormalEquations picks(layout.size());
  RowGatherer gatherer(layout.size());
  for (int i = 0; i < problem_->picks.count(); ++i) {
    const SectionPick& p = problem_->picks.picks[i];
    const SparseRow row = expectedDerivative(i, gatherer);
    const double r = p.time - expected(i);
    picks.add(row, r + row.dot(fromMean), noise.weight(r / (s * p.sigma)) / (p.sigma * p.sigma));
  }
  return picks;
}

LinearisedPosterior SectionInversion::linearise() const {
  const SectionLayout& layout = prior_->layout();
  const Eigen::VectorXd fromMean = theta_ - prior_->mean();
  RowGatherer gatherer(layout.size());
  NormalEquations exact(problem_->boreholes.empty() ? 0 : layout.size());
  for (const Borehole& b : problem_->boreholes) {
    if (b.layer > layout.layers) {
      continue;
    }
    const SectionModel& m = forward_->model();
    const SparseRow row = elevationDerivative(m, b.layer - 1, b.x, gatherer);
    const double r = m.grid->at(m.z[0], b.x) - b.depth - m.grid->at(m.z[b.layer - 1], b.x);
    exact.add(row, r + row.dot(fromMean), 1.0 / (b.sigma * b.sigma));
  }
  return {*prior_, pickEquations(), std::move(exact)};
}

double SectionInversion::stepLimit(const Eigen::VectorXd& towards) const {
  const SectionLayout& layout = prior_->layout();
  const Eigen::VectorXd theta = prior_->apply(state_.choice, towards);
  const int first = layout.logVelocity(1);
  const double most = (theta - theta_).segment(first, layout.layers).cwiseAbs().maxCoeff();
  return most > kLongestLogVelocityStep ? kLongestLogVelocityStep / most : 1.0;
}

double SectionInversion::hoped(const SectionFit& fit) const {
  const Eigen::VectorXd step = (fit.xi - state_.xi)(fit.active);
  return 0.5 * (fit.factor.matrixU() * step).squaredNorm();
}

bool SectionInversion::iterate(int steps, double enough, int halvings) {
  for (int step = 0; step < steps; ++step) {
    const SectionFit fit = linearise().fit(state_.choice);
    const Eigen::VectorXd& goal = fit.xi;
    double share = stepLimit(goal);
    const bool whole = share == 1.0;
    bool moved = false;
    double gain = 0.0;
    for (int half = 0; half <= halvings && !moved; ++half, share *= 0.5) {
      SectionState next = state_;
      next.xi = state_.xi + share * (goal - state_.xi);
      Trial trial = tryState(std::move(next));
      if (trial.objective <= objective_) {
        gain = objective_ - trial.objective;
        accept(std::move(trial));
        moved = true;
      }
    }
    if (!moved) {
      return hoped(fit) < kNothingToGain;
    }
    if (whole && gain < enough) {
      return true;
    }
  }
  return false;
}

double SectionInversion::logJoint() const {
  const PickNoise noise(PickNoise::Shape::kMixture);
  const double s = SectionPrior::noise(state_.choice.noise);
  double sum = -0.5 * state_.xi.squaredNorm() - boreholeMisfit(*forward_) - problem_->picks.count() * std::log(s) +
               SectionPrior::logDensity(state_.choice);
  for (int i = 0; i < problem_->picks.count(); ++i) {
    const SectionPick& p = problem_->picks.picks[i];
    sum -= noise.loss((p.time - expected(i)) / (s * p.sigma));
  }
  return sum;
}

}  // namespace strikeplate
