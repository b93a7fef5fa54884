#pragma once

#include <vector>

#include <Eigen/Core>

#include "core/section/grid.h"

namespace strikeplate {

inline constexpr int kMostLayers = 6;

/// Which unknown stands where in the vector of all unknowns theta of a section of `layers` layers:
/// interface elevations at knots (m), then log velocity of each layer (of m/s), then deviations of log velocity at
/// velocity knots in the first and in the deepest layer, then one delay for each shot (s) if they are asked for, then
/// one number q for the growth of velocity with depth in the first layer if it grows.
struct SectionLayout {
  int layers = 2;
  int knots = 0;
  int velocityKnots = 0;
  int delays = 0;
  bool gradient = false;

  [[nodiscard]] int interfaces() const { return layers - 1; }
  [[nodiscard]] int elevation(int k) const { return (k - 1) * knots; }  ///< of interface k = 1, 2, ...
  [[nodiscard]] int logVelocity(int layer) const { return interfaces() * knots + layer - 1; }
  [[nodiscard]] int deviation(int layer) const {
    return interfaces() * knots + layers + (layer == 1 ? 0 : velocityKnots);
  }
  [[nodiscard]] bool varies(int layer) const { return layer == 1 || layer == layers; }
  [[nodiscard]] int delay(int shot) const { return interfaces() * knots + layers + 2 * velocityKnots + shot; }
  [[nodiscard]] int gradientIndex() const { return delay(delays); }
  [[nodiscard]] int size() const { return delay(delays) + (gradient ? 1 : 0); }
};

/// A section's geometry and slowness at the nodes of its grid.
///
/// Interfaces cannot cross: z_0 = ground, z_k = z_(k-1) - sp(z_(k-1) - e_k) with sp(a) = c ln(1 + exp(a / c)) and
/// c a tenth of the knot spacing, so that an interface pinches out smoothly against the one above.
///
/// Velocity in the first layer may grow with depth, v = v_0(x) + k depth with k = 5 ln(1 + exp(q / 5)) per second, so
/// that it never falls. A ray between two points r apart with velocities v_a, v_b then is an arc of a circle and
/// takes 2 / k asinh(k r / (2 sqrt(v_a v_b))) (Slotnick 1959).
struct SectionModel {
  SectionLayout layout;
  std::vector<Eigen::VectorXd> z;                   ///< m, ground and interfaces 1, 2, ... at nodes
  std::vector<std::vector<Eigen::VectorXd>> chain;  ///< [k][l] = dz_k / de_l at nodes, 1 <= l <= k
  std::vector<Eigen::VectorXd> slowness;            ///< s/m, [layer - 1] at nodes
  std::vector<Eigen::VectorXd> cumulative;          ///< s, integral of slowness along x from the first node
  double gradient = 0.0;                            ///< k, 1/s
  double gradientSlope = 0.0;                       ///< dk / dq
  const SectionGrid* grid = nullptr;

  /// Mean slowness (s/m) of a layer between two positions.
  [[nodiscard]] double meanSlowness(int layer, double xa, double xb) const;

  /// Time (s) through the first layer between two points on or under the ground, `length` m apart, and how it
  /// answers.
  struct FirstLayerTime {
    double time = 0.0;
    double perLogVelocity = 0.0;  ///< s, for the logarithm of v_0
    double perRise = 0.0;         ///< s/m, when point b is lifted
    double perGradient = 0.0;     ///< s^2, for k
  };
  [[nodiscard]] FirstLayerTime firstLayer(SectionPoint a, SectionPoint b, double length) const;

 private:
  [[nodiscard]] double integral(int layer, double x) const;
};

SectionModel makeSectionModel(const SectionGrid& grid, const SectionLayout& layout, const Eigen::VectorXd& theta);

}  // namespace strikeplate
