#pragma once

#include <memory>
#include <optional>
#include <vector>

#include "core/base/progress.h"
#include "core/line/line.h"
#include "core/section/forward.h"
#include "core/section/noise.h"
#include "core/section/posterior.h"

namespace strikeplate {

/// What is to be explained: where, and by which picks and boreholes.
struct SectionProblem {
  SectionGrid grid;
  SectionPicks picks;
  std::vector<Borehole> boreholes;  ///< only those that enter as data
  std::vector<double> delaySigma;   ///< s, prior of each shot's trigger delay; 0 where it is held at none
  std::vector<double> delayStart;   ///< s, where the search for the delays starts; empty: at none

  [[nodiscard]] bool solvesDelays() const;
  [[nodiscard]] SectionLayout layout(int layers, bool gradient = false) const {
    return {layers, grid.knots, grid.velocityKnots, static_cast<int>(delaySigma.size()), gradient};
  }
};

/// Where an inversion stands.
struct SectionState {
  HyperChoice choice;
  Eigen::VectorXd xi;       ///< whitened unknowns
  std::vector<int> labels;  ///< layer of each pick
  bool labelsFree = false;  ///< each pick goes with the earliest predicted time, at every step
  /// s, for each pick: standard deviation of the difference between the times of the layers that compete for it;
  /// empty when they are taken as known.
  std::vector<double> doubt;
  PickNoise::Shape noise = PickNoise::Shape::kCauchy;
};

/// The time of the earliest of several layers when they are known but for a common doubt, and each one's share in it.
///
/// The mean of the least of two normal times whose difference has standard deviation d lies within 0.02 d of
/// -tau ln(exp(-t1 / tau) + exp(-t2 / tau)) with tau = d sqrt(3) / pi (logistic instead of normal differences; for
/// the exact mean see Clark 1961 Oper. Res. 9:145), which goes for more layers too and has simple derivatives.
struct EarliestTime {
  double time = 0.0;
  std::array<double, kMostLayers> share{};  ///< probability that layer 1, 2, ... comes first
};
EarliestTime earliestTime(const SectionForward& forward, int pick, double doubt);

/// Gauss-Newton with step limiting and halving on the whitened unknowns of one prior; picks reweighted at every step.
class SectionInversion {
 public:
  SectionInversion(const SectionProblem& problem, const SectionPrior& prior, SectionState state);

  /// At most `steps` steps, each halved up to `halvings` times while it does not help; true when the last one gained
  /// less than `enough` nats.
  bool iterate(int steps, double enough = 1e-3, int halvings = 5);
  /// Takes over doubts about labels; nothing is predicted anew.
  void setDoubt(std::vector<double> doubt);
  /// Replaces the state and predicts anew.
  void restart(SectionState state);
  /// Normal equations of the picks linearised where it stands, weighted as they are now; lower triangle.
  [[nodiscard]] NormalEquations pickEquations() const;
  /// The problem linearised where it stands, picks weighted as they are now.
  [[nodiscard]] LinearisedPosterior linearise() const;
  /// ln of likelihood (mixture) times prior at the state.
  [[nodiscard]] double logJoint() const;

  [[nodiscard]] const SectionState& state() const { return state_; }
  [[nodiscard]] const SectionForward& forward() const { return *forward_; }
  [[nodiscard]] const SectionPrior& prior() const { return *prior_; }
  [[nodiscard]] const SectionProblem& problem() const { return *problem_; }
  /// Time of pick i through its layer, with its shot's delay, s.
  [[nodiscard]] double predicted(int pick) const;
  /// The same as it is to be expected while it is not known which of two layers comes first, s: earlier than either
  /// by up to 0.4 of the doubt.
  [[nodiscard]] double expected(int pick) const { return expectedFor(*forward_, state_, theta_, pick); }
  /// Measures the doubt of every pick under the posterior as it stands.
  [[nodiscard]] std::vector<double> measureDoubt() const;
  [[nodiscard]] const Eigen::VectorXd& theta() const { return theta_; }

 private:
  struct Trial {
    SectionState state;
    Eigen::VectorXd theta;
    std::unique_ptr<SectionForward> forward;
    double objective = 0.0;
  };
  [[nodiscard]] Trial tryState(SectionState state) const;
  [[nodiscard]] double expectedFor(const SectionForward& forward, const SectionState& state,
                                   const Eigen::VectorXd& theta, int pick) const;
  [[nodiscard]] SparseRow expectedDerivative(int pick, RowGatherer& gatherer) const;
  [[nodiscard]] double boreholeMisfit(const SectionForward& forward) const;
  /// What a whole step would gain were the problem linear, nats.
  [[nodiscard]] double hoped(const SectionFit& fit) const;
  [[nodiscard]] double stepLimit(const Eigen::VectorXd& towards) const;
  void accept(Trial trial);
  [[nodiscard]] double objectiveOf(const SectionState& state, const Eigen::VectorXd& theta,
                                   const SectionForward& forward) const;

  const SectionProblem* problem_;
  const SectionPrior* prior_;
  SectionState state_;
  Eigen::VectorXd theta_;
  std::unique_ptr<SectionForward> forward_;
  double objective_ = 0.0;
};

}  // namespace strikeplate
