#pragma once

#include <array>
#include <vector>

#include <Eigen/Core>

#include "core/traveltime/arrivals.h"

namespace strikeplate {

/// A place in the vertical plane of the line, m; y is elevation.
struct SectionPoint {
  double x = 0.0;
  double y = 0.0;
};

/// Where the unknowns of a section live along the line.
///
/// Interfaces are unknown at *knots*, one geophone spacing apart between the outermost geophones and three beyond,
/// and are drawn through *nodes*, evenly half a spacing apart, by cubic convolution (Keys 1981 IEEE Trans. ASSP
/// 29:1153, reproduces parabolas; straight where knots are uneven); between nodes they are straight. Velocities that
/// vary along the line are unknown at coarser *velocity knots*, straight in between. All reach a little beyond the
/// outermost geophone or shot. Lengths in m.
struct SectionGrid {
  struct Weights {
    int first = 0;
    std::array<double, 4> w{};
  };

  double start = 0.0;  ///< x of the first knot, node and velocity knot
  double knotSpacing = 1.0;
  double nodeSpacing = 0.5;
  double velocitySpacing = 2.0;
  int knots = 0;
  int nodes = 0;
  int velocityKnots = 0;
  double lineStart = 0.0;  ///< outermost geophone or shot
  double lineEnd = 0.0;
  std::vector<int> knotNode;  ///< node at which each knot lies
  Eigen::VectorXd knotX;
  Eigen::VectorXd nodeX;
  Eigen::VectorXd ground;        ///< elevation at nodes
  std::vector<Weights> toKnots;  ///< node = sum of w[i] * knot[first + i]

  [[nodiscard]] double coordinate(double x) const { return (x - start) / nodeSpacing; }
  [[nodiscard]] double length() const { return lineEnd - lineStart; }
  /// Value at position x of something given at nodes.
  [[nodiscard]] double at(const Eigen::VectorXd& atNodes, double x) const;
  /// Knot values to node values.
  [[nodiscard]] Eigen::VectorXd spread(const Eigen::Ref<const Eigen::VectorXd>& atKnots) const;
  /// Each column of knot values to node values.
  [[nodiscard]] Eigen::MatrixXd spreadColumns(const Eigen::MatrixXd& atKnots) const;
};

/// Needs two different positions at least among geophones and shots.
SectionGrid makeSectionGrid(const TravelTimes& times);

}  // namespace strikeplate
