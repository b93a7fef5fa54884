#pragma once

#include <array>
#include <vector>

#include <Eigen/Core>

#include "core/section/model.h"

namespace strikeplate {

/// Hyperparameters: where on its grid each amplitude and correlation length stands.
///
/// roughness[k - 1] and length[k - 1] for interface k; soil and rock for the deviations of the first and the deepest
/// layer's log velocity; noise for the common factor on the stated sigmas.
struct HyperChoice {
  std::array<int, kMostLayers - 1> roughness{};
  std::array<int, kMostLayers - 1> length{};
  int soil = 0;
  int rock = 0;
  int noise = 0;
  auto operator<=>(const HyperChoice&) const = default;
};

/// Where the prior sits before any hyperparameter is chosen.
struct PriorCentre {
  std::vector<double> depth;        ///< m, of interfaces 1, 2, ... below the ground's trend
  std::vector<double> logVelocity;  ///< of each layer
  double logVelocitySigma = 0.5;    ///< of all layers but the first
  double firstSigma = 0.5;          ///< of the first layer
  std::vector<double> delaySigma;   ///< s, of each shot's trigger delay; empty when the layout has none
};

/// Gaussian prior of the unknowns, theta = mean + Lambda xi with xi standard normal.
///
/// An interface is a plane (depth sd 0.2 line lengths, slope sd 0.15) plus a Matern 3/2 process along the line
/// (Rasmussen & Williams 2006, eq. 4.17); log velocities are normal; their deviations along the line Matern 3/2 in
/// the first layer and 1/2 in the deepest; delays of shots normal with the given sd; q of a gradient normal about 20
/// with sd 40 per second. Only scales depend on amplitudes: the columns of Lambda are unit factors times a diagonal,
/// so an amplitude is tried without a matrix product.
class SectionPrior {
 public:
  SectionPrior(const SectionGrid& grid, const SectionLayout& layout, const PriorCentre& centre);

  static constexpr int kRoughnesses = 10;
  static constexpr int kLengths = 5;
  static constexpr int kDeviations = 6;
  static constexpr int kNoises = 38;

  [[nodiscard]] double roughness(int choice) const;  ///< m
  [[nodiscard]] double length(int choice) const;     ///< m
  [[nodiscard]] static double deviation(int choice);
  [[nodiscard]] static double noise(int choice);
  /// Log prior density of the choice, up to a constant.
  [[nodiscard]] static double logDensity(const HyperChoice& choice);
  /// The choice of noise nearest to a factor.
  [[nodiscard]] static int noiseNearest(double factor);

  [[nodiscard]] int columns() const { return columns_; }
  [[nodiscard]] const SectionLayout& layout() const { return layout_; }
  [[nodiscard]] const Eigen::VectorXd& mean() const { return mean_; }
  /// Diagonal that scales the unit columns.
  [[nodiscard]] Eigen::VectorXd scales(const HyperChoice& choice) const;
  /// Unit columns: theta = mean + U diag(scales) xi.
  [[nodiscard]] Eigen::VectorXd apply(const HyperChoice& choice, const Eigen::VectorXd& xi) const;
  /// U' v for a vector or matrix with one row for each unknown.
  [[nodiscard]] Eigen::MatrixXd transposed(const HyperChoice& choice, const Eigen::MatrixXd& v) const;
  /// First column of interface k: the plane's two, then the process.
  [[nodiscard]] int firstColumn(int k) const { return (k - 1) * (layout_.knots + 2); }
  [[nodiscard]] int velocityColumn(int layer) const { return layout_.interfaces() * (layout_.knots + 2) + layer - 1; }
  [[nodiscard]] int delayColumn(int shot) const {
    return velocityColumn(layout_.layers + 1) + 2 * layout_.velocityKnots + shot;
  }

 private:
  SectionLayout layout_;
  double lineLength_;
  double knotSpacing_;
  double firstSigma_;
  double otherSigma_;
  Eigen::VectorXd delaySigma_;
  int columns_;
  Eigen::VectorXd mean_;
  const Eigen::MatrixXd& interfaceFactor(int lengthChoice) const;

  Eigen::VectorXd knotX_;
  double centre_;
  mutable std::array<Eigen::MatrixXd, kLengths> interface_;  // made when first asked for
  Eigen::MatrixXd soil_;
  Eigen::MatrixXd rock_;
};

}  // namespace strikeplate
