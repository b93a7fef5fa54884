#pragma once

#include <vector>

#include <Eigen/Core>

#include "core/section/mode.h"

namespace strikeplate {

/// The quantities of a section that get an interval, as functions of the unknowns: elevation of each interface at
/// the nodes first ... first + count - 1, slope of each interface, mean log velocity of each layer (half-way down the
/// first layer if it grows with depth), delays.
/// Derivatives of elevations are made at the `anchors` only, the nodes at which knots lie; standard deviations are
/// straight in between.
struct SectionFunctionals {
  int firstNode = 0;
  int nodeCount = 0;
  SectionLayout layout;
  std::vector<int> anchors;  ///< nodes, from the first node to the last

  [[nodiscard]] int elevation(int k, int node) const { return (k - 1) * nodeCount + node - firstNode; }
  [[nodiscard]] int slope(int k) const { return layout.interfaces() * nodeCount + k - 1; }
  [[nodiscard]] int logVelocity(int layer) const { return slope(layout.interfaces()) + layer; }
  [[nodiscard]] int delay(int shot) const { return logVelocity(layout.layers) + 1 + shot; }
  [[nodiscard]] int count() const { return delay(layout.delays); }
};

SectionFunctionals functionalsOf(const SectionProblem& problem, const SectionLayout& layout);

/// Their values at theta.
Eigen::VectorXd functionalValues(const SectionProblem& problem, const SectionFunctionals& f,
                                 const Eigen::VectorXd& theta);

/// Derivatives at a model: one row for each unknown; columns are the anchors of interface 1, 2, ..., then the other
/// functionals in their order.
Eigen::MatrixXd functionalDerivatives(const SectionProblem& problem, const SectionFunctionals& f,
                                      const SectionModel& model);

/// Variances of all functionals from those of the columns above.
Eigen::VectorXd allVariances(const SectionFunctionals& f, const Eigen::VectorXd& ofColumns);

}  // namespace strikeplate
