#pragma once

#include <cmath>
#include <functional>
#include <optional>

#include <Eigen/Core>

namespace strikeplate {

/// What a function of uncertain data gives, with its covariance to first order.
struct FirstOrder {
  Eigen::VectorXd value;
  Eigen::MatrixXd covariance;
};

/// value = f(data), covariance = J C J^T with J by central differences a thousandth of a standard deviation wide.
/// `covariance` is that of the data, symmetric. Nothing where f gives nothing at the data or right beside them.
/// Source: the law of propagation of uncertainty, JCGM 100:2008 section 5.2.
inline std::optional<FirstOrder> propagate(
    const std::function<std::optional<Eigen::VectorXd>(const Eigen::VectorXd&)>& f, const Eigen::VectorXd& data,
    const Eigen::MatrixXd& covariance) {
  const auto middle = f(data);
  if (!middle) {
    return std::nullopt;
  }
  Eigen::MatrixXd jacobian = Eigen::MatrixXd::Zero(middle->size(), data.size());
  for (Eigen::Index i = 0; i < data.size(); ++i) {
    const double step = 1e-3 * std::sqrt(covariance(i, i));
    if (!(step > 0.0)) {
      continue;
    }
    Eigen::VectorXd high = data, low = data;
    high(i) += step;
    low(i) -= step;
    const auto up = f(high), down = f(low);
    if (!up || !down) {
      return std::nullopt;
    }
    jacobian.col(i) = (*up - *down) / (high(i) - low(i));
  }
  return FirstOrder{*middle, jacobian * covariance * jacobian.transpose()};
}

}  // namespace strikeplate
