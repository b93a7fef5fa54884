#include "core/section/late_shots.h"

#include <cmath>

#include <Eigen/Cholesky>

namespace strikeplate {
namespace {

constexpr double kLeastDelay = 1e-3;  // s; less is within what a hammer switch does
constexpr double kLogWorth = 3.0;     // what one delay must gain, besides the choice of its shot

/// The linearised problem in whitened unknowns, and how the delays would join it.
struct Whitened {
  Eigen::MatrixXd precision;  ///< of the unknowns that are solved for
  Eigen::VectorXd pull;
  Eigen::MatrixXd shared;     ///< curvature shared with each shot's delay
  Eigen::VectorXd own;        ///< curvature of each shot's delay, 1/s^2
  Eigen::VectorXd delayPull;  ///< 1/s

  void solveFor(Eigen::Index shot) {
    const Eigen::Index n = precision.rows();
    precision.conservativeResize(n + 1, n + 1);
    precision.row(n).head(n) = kTriggerSigma * shared.col(shot).transpose();
    precision.col(n).head(n) = kTriggerSigma * shared.col(shot);
    precision(n, n) = 1.0 + kTriggerSigma * kTriggerSigma * own[shot];
    pull.conservativeResize(n + 1);
    pull[n] = kTriggerSigma * delayPull[shot];
    shared.conservativeResize(n + 1, shared.cols());
    shared.row(n).setZero();
    shared(n, shot) = kTriggerSigma * own[shot];
  }
};

Whitened whitened(const SectionInversion& inversion) {
  const SectionPrior& prior = inversion.prior();
  const HyperChoice& choice = inversion.state().choice;
  const double s = SectionPrior::noise(choice.noise);
  const NormalEquations normal = inversion.pickEquations();
  const Eigen::Index shots = prior.layout().delays;
  const Eigen::MatrixXd h = normal.h.selfadjointView<Eigen::Lower>();
  const Eigen::VectorXd scales = prior.scales(choice);
  const Eigen::MatrixXd half = scales.asDiagonal() * prior.transposed(choice, h) / (s * s);
  Whitened out;
  out.precision = scales.asDiagonal() * prior.transposed(choice, half.transpose());
  out.precision.diagonal().array() += 1.0;
  out.pull = scales.asDiagonal() * prior.transposed(choice, normal.b) / (s * s);
  const Eigen::Index first = prior.layout().delay(0);
  out.shared = half.middleCols(first, shots);
  out.own = h.diagonal().segment(first, shots) / (s * s);
  out.delayPull = normal.b.segment(first, shots) / (s * s);
  return out;
}

}  // namespace

std::vector<double> delaysAskedFor(const SectionInversion& inversion) {
  const SectionLayout& layout = inversion.prior().layout();
  const std::vector<double>& sigma = inversion.problem().delaySigma;
  std::vector<double> delays(static_cast<std::size_t>(layout.delays), 0.0);
  std::ptrdiff_t solved = 0;
  for (std::size_t shot = 0; shot < delays.size(); ++shot) {
    if (sigma[shot] > 0.0) {
      delays[shot] = inversion.theta()[layout.delay(static_cast<int>(shot))];
      ++solved;
    }
  }
  Whitened w = whitened(inversion);
  const double worth = kLogWorth + std::log(static_cast<double>(layout.delays));
  for (; solved < std::ssize(delays) / 3; ++solved) {
    const Eigen::LLT<Eigen::MatrixXd> factor(w.precision);
    const Eigen::VectorXd xi = factor.solve(w.pull);
    double most = worth;
    Eigen::Index best = -1;
    double value = 0.0;
    for (Eigen::Index shot = 0; shot < w.own.size(); ++shot) {
      if (delays[static_cast<std::size_t>(shot)] != 0.0) {
        continue;
      }
      const Eigen::VectorXd g = factor.matrixL().solve(w.shared.col(shot));
      const double left = std::max(w.own[shot] - g.squaredNorm(), 0.0);
      const double b = w.delayPull[shot] - w.shared.col(shot).dot(xi);
      const double precision = left + 1.0 / (kTriggerSigma * kTriggerSigma);
      const double gain = 0.5 * b * b / precision - 0.5 * std::log(precision * kTriggerSigma * kTriggerSigma);
      if (gain > most && std::abs(b / precision) >= kLeastDelay) {
        most = gain;
        best = shot;
        value = b / precision;
      }
    }
    if (best < 0) {
      break;
    }
    delays[static_cast<std::size_t>(best)] = value;
    w.solveFor(best);
  }
  return delays;
}

SectionProblem withDelays(const SectionProblem& problem, const std::vector<double>& delays) {
  SectionProblem out = problem;
  out.delayStart = delays;
  for (std::size_t shot = 0; shot < delays.size(); ++shot) {
    out.delaySigma[shot] = delays[shot] != 0.0 ? kTriggerSigma : 0.0;
  }
  return out;
}

TravelTimes withoutDelays(TravelTimes times, const std::vector<double>& delays) {
  for (Arrival& a : times.arrivals) {
    a.time -= delays[static_cast<std::size_t>(a.shot)];
  }
  return times;
}

}  // namespace strikeplate
