#pragma once

#include <map>
#include <vector>

#include <Eigen/Cholesky>
#include <Eigen/Core>

#include "core/section/prior.h"
#include "core/section/sensitivity.h"

namespace strikeplate {

/// Weighted normal equations of linearised data d = J (theta - mean): H = J'WJ, b = J'Wd, c = d'Wd.
struct NormalEquations {
  explicit NormalEquations(int unknowns)
      : h(Eigen::MatrixXd::Zero(unknowns, unknowns)), b(Eigen::VectorXd::Zero(unknowns)) {}

  /// One datum with its derivative and weight (1 / variance). Fills the lower triangle of h.
  void add(const SparseRow& row, double datum, double weight);
  void mirror() { h.triangularView<Eigen::StrictlyUpper>() = h.transpose(); }

  Eigen::MatrixXd h;
  Eigen::VectorXd b;
  double c = 0.0;
  int count = 0;
};

/// The Gaussian posterior of a linearised section under one choice of hyperparameters.
struct SectionFit {
  HyperChoice choice;
  double logEvidence = 0.0;            ///< of the linearised problem, up to a constant that no choice changes
  double halfLogDet = 0.0;             ///< ln det(B) / 2
  Eigen::VectorXd xi;                  ///< mean, whitened
  std::vector<int> active;             ///< columns whose scale is not zero
  Eigen::LLT<Eigen::MatrixXd> factor;  ///< of B over the active columns

  /// Posterior variance of linear functions of theta; column i holds U' of the i-th function's row.
  [[nodiscard]] Eigen::VectorXd variances(const SectionPrior& prior, const Eigen::MatrixXd& transposedRows) const;
  /// Posterior covariance of all unknowns.
  [[nodiscard]] Eigen::MatrixXd covariance(const SectionPrior& prior) const;
};

/// Posterior and evidence for any hyperparameters with the linearisation held.
///
/// B = I + D U'(H_picks / s^2 + H_exact) U D, xi = B^-1 D U' b; D holds the amplitudes and U the unit columns of the
/// prior, so U'HU is made once for each set of correlation lengths and a try costs one Cholesky factorisation
/// (Rasmussen & Williams 2006 ch. 5 for the evidence of a Gaussian process).
class LinearisedPosterior {
 public:
  /// `picks` weighted by the stated sigmas; `exact` are data whose sigma is not scaled (boreholes).
  LinearisedPosterior(const SectionPrior& prior, NormalEquations picks, NormalEquations exact);

  [[nodiscard]] SectionFit fit(const HyperChoice& choice) const;
  [[nodiscard]] const SectionPrior& prior() const { return *prior_; }

 private:
  struct Projected {
    Eigen::MatrixXd picks;
    Eigen::VectorXd b;
    Eigen::MatrixXd exact;
    Eigen::VectorXd bExact;
  };
  const Projected& projected(const HyperChoice& choice) const;

  const SectionPrior* prior_;
  NormalEquations picks_;
  NormalEquations exact_;
  mutable std::map<std::array<int, kMostLayers - 1>, Projected> byLength_;
};

}  // namespace strikeplate
