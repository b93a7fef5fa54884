#pragma once

#include <vector>

#include <Eigen/Core>

#include "core/section/forward.h"

namespace strikeplate {

/// A sparse row of derivatives with respect to the unknowns theta.
struct SparseRow {
  std::vector<int> index;  ///< each once
  std::vector<double> value;

  [[nodiscard]] double dot(const Eigen::VectorXd& v) const;
  /// row * m * row', m symmetric.
  [[nodiscard]] double quadratic(const Eigen::MatrixXd& m) const;
};

/// Gathers derivatives that arrive piecemeal.
class RowGatherer {
 public:
  explicit RowGatherer(int size) : dense_(size, 0.0), touched_(size, false) {}
  void add(int index, double value);
  void add(const SparseRow& row, double factor);
  SparseRow take();

 private:
  std::vector<double> dense_;
  std::vector<bool> touched_;
  std::vector<int> order_;
};

/// Derivative of the time (s) of a pick through a layer: that of the ray, whose way stays put (Fermat).
SparseRow timeDerivative(const SectionForward& forward, int pick, int layer, RowGatherer& gatherer);

/// Derivative of the elevation (m) of interface k at position x.
SparseRow elevationDerivative(const SectionModel& model, int k, double x, RowGatherer& gatherer);

}  // namespace strikeplate
