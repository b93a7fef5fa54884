#pragma once

#include <vector>

#include <Eigen/Core>

#include "core/section/grid.h"

namespace strikeplate {

inline constexpr int kMostLayers = 6;

/// Which unknown stands where in the vector of all unknowns theta of a section of `layers` layers:
/// interface elevations at knots (m), then log velocity of each layer (of m/s), then deviations of log velocity at
/// velocity knots in the first and in the deepest layer, then one delay for each shot (s) if they are asked for.
struct SectionLayout {
  int layers = 2;
  int knots = 0;
  int velocityKnots = 0;
  int delays = 0;

  [[nodiscard]] int interfaces() const { return layers - 1; }
  [[nodiscard]] int elevation(int k) const { return (k - 1) * knots; }  ///< of interface k = 1, 2, ...
  [[nodiscard]] int logVelocity(int layer) const { return interfaces() * knots + layer - 1; }
  [[nodiscard]] int deviation(int layer) const {
    return interfaces() * knots + layers + (layer == 1 ? 0 : velocityKnots);
  }
  [[nodiscard]] bool varies(int layer) const { return layer == 1 || layer == layers; }
  [[nodiscard]] int delay(int shot) const { return interfaces() * knots + layers + 2 * velocityKnots + shot; }
  [[nodiscard]] int size() const { return delay(delays); }
};

/// A section's geometry and slowness at the nodes of its grid.
///
/// Interfaces cannot cross: z_0 = ground, z_k = z_(k-1) - sp(z_(k-1) - e_k) with sp(a) = c ln(1 + exp(a / c)) and
/// c a tenth of the knot spacing, so that an interface pinches out smoothly against the one above.
struct SectionModel {
  SectionLayout layout;
  std::vector<Eigen::VectorXd> z;                   ///< m, ground and interfaces 1, 2, ... at nodes
  std::vector<std::vector<Eigen::VectorXd>> chain;  ///< [k][l] = dz_k / de_l at nodes, 1 <= l <= k
  std::vector<Eigen::VectorXd> slowness;            ///< s/m, [layer - 1] at nodes
  std::vector<Eigen::VectorXd> cumulative;          ///< s, integral of slowness along x from the first node
  const SectionGrid* grid = nullptr;

  /// Mean slowness (s/m) of a layer between two positions.
  [[nodiscard]] double meanSlowness(int layer, double xa, double xb) const;

 private:
  [[nodiscard]] double integral(int layer, double x) const;
};

SectionModel makeSectionModel(const SectionGrid& grid, const SectionLayout& layout, const Eigen::VectorXd& theta);

}  // namespace strikeplate
