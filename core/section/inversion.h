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
  bool solveDelays = false;

  [[nodiscard]] SectionLayout layout(int layers) const {
    return {layers, grid.knots, grid.velocityKnots, solveDelays ? static_cast<int>(picks.shots.size()) : 0};
  }
};

/// Where an inversion stands.
struct SectionState {
  HyperChoice choice;
  Eigen::VectorXd xi;       ///< whitened unknowns
  std::vector<int> labels;  ///< layer of each pick
  bool labelsFree = false;  ///< each pick goes with the earliest predicted time, at every step
  PickNoise::Shape noise = PickNoise::Shape::kCauchy;
};

/// Gauss-Newton with step limiting and halving on the whitened unknowns of one prior; picks reweighted at every step.
class SectionInversion {
 public:
  SectionInversion(const SectionProblem& problem, const SectionPrior& prior, SectionState state);

  /// At most `steps` steps; true when it has converged.
  bool iterate(int steps);
  /// Replaces the state and predicts anew.
  void restart(SectionState state);
  /// The problem linearised where it stands, picks weighted as they are now.
  [[nodiscard]] LinearisedPosterior linearise() const;
  /// ln of likelihood (mixture) times prior at the state.
  [[nodiscard]] double logJoint() const;

  [[nodiscard]] const SectionState& state() const { return state_; }
  [[nodiscard]] const SectionForward& forward() const { return *forward_; }
  [[nodiscard]] const SectionPrior& prior() const { return *prior_; }
  [[nodiscard]] const SectionProblem& problem() const { return *problem_; }
  /// Time of pick i through its layer, with its shot's delay, s.
  [[nodiscard]] double predicted(int pick) const { return predictedFor(*forward_, theta_, state_.labels, pick); }
  [[nodiscard]] const Eigen::VectorXd& theta() const { return theta_; }
  /// Derivative rows of all picks through their layers.
  [[nodiscard]] std::vector<SparseRow> rows() const;

 private:
  struct Trial {
    SectionState state;
    Eigen::VectorXd theta;
    std::unique_ptr<SectionForward> forward;
    double objective = 0.0;
  };
  [[nodiscard]] Trial tryState(SectionState state) const;
  [[nodiscard]] double predictedFor(const SectionForward& forward, const Eigen::VectorXd& theta,
                                    const std::vector<int>& labels, int pick) const;
  [[nodiscard]] double boreholeMisfit(const SectionForward& forward) const;
  /// What a whole step would gain were the problem linear, nats.
  [[nodiscard]] double hoped(const SectionFit& fit) const;
  [[nodiscard]] double stepLimit(const Eigen::VectorXd& towards) const;
  void accept(Trial trial);

  const SectionProblem* problem_;
  const SectionPrior* prior_;
  SectionState state_;
  Eigen::VectorXd theta_;
  std::unique_ptr<SectionForward> forward_;
  double objective_ = 0.0;
};

}  // namespace strikeplate
