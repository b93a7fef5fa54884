#pragma once

#include <algorithm>
#include <cmath>
#include <vector>

// AutoDiff needs Core before it.
// clang-format off
#include <Eigen/Core>
#include <unsupported/Eigen/AutoDiff>
// clang-format on

#include "core/base/estimate.h"

namespace strikeplate {

/// A number that carries its derivatives by all data of a method, for first-order errors without hand algebra.
using Derived = Eigen::AutoDiffScalar<Eigen::VectorXd>;

/// The data as independent variables, in order.
inline std::vector<Derived> independent(const std::vector<double>& values) {
  std::vector<Derived> out;
  const auto n = static_cast<Eigen::Index>(values.size());
  for (Eigen::Index i = 0; i < n; ++i) {
    out.emplace_back(values[static_cast<std::size_t>(i)], n, i);
  }
  return out;
}

/// Standard deviation to first order, sqrt(g' C g), under the data's covariance C.
inline double firstOrderSigma(const Derived& value, const Eigen::MatrixXd& covariance) {
  const double variance = value.derivatives().dot(covariance * value.derivatives());
  return std::sqrt(std::max(variance, 0.0));
}

inline Estimate estimateOf(const Derived& value, const Eigen::MatrixXd& covariance) {
  return Estimate::normal(value.value(), firstOrderSigma(value, covariance));
}

}  // namespace strikeplate
