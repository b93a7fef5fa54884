#include "core/methods/reflection.h"

#include <cmath>
#include <optional>

#include "core/methods/first_order.h"

namespace strikeplate {
namespace {

/// (t0^2, 1/v^2) -> (t0, 1/v, v t0 / 2).
std::optional<Eigen::VectorXd> reflectorOf(const Eigen::VectorXd& line) {
  if (!(line(0) > 0.0) || !(line(1) > 0.0)) {
    return std::nullopt;
  }
  const double t0 = std::sqrt(line(0)), slowness = std::sqrt(line(1));
  return Eigen::Vector3d(t0, slowness, 0.5 * t0 / slowness);
}

}  // namespace

ReflectionFit fitReflection(std::span<const FitPoint> picks) {
  std::vector<FitPoint> squares;
  for (const FitPoint& p : picks) {
    squares.push_back({p.offset * p.offset, p.time * p.time, 2.0 * p.time * p.sigma});
  }
  const LineFit fit = fitLine(squares);
  std::optional<FirstOrder> result;
  if (fit.determined) {
    Eigen::Matrix2d covariance;
    covariance << fit.varIntercept, fit.covariance, fit.covariance, fit.varSlope;
    result = propagate(reflectorOf, Eigen::Vector2d(fit.intercept, fit.slope), covariance);
  }
  if (!result) {
    const auto none = Estimate::none(fit.determined ? "the times do not lie on a reflection's curve" : fit.reason);
    return {none, none, none};
  }
  const auto sigma = [&result](Eigen::Index i) { return std::sqrt(result->covariance(i, i)); };
  return {Estimate::normal(result->value(0), sigma(0)), Estimate::fromSlowness(result->value(1), sigma(1)),
          Estimate::normal(result->value(2), sigma(2))};
}

std::vector<Estimate> thicknessesFromReflections(std::span<const Datum> times, std::span<const Datum> velocities) {
  std::vector<Estimate> thickness;
  Datum above;
  for (std::size_t k = 0; k < times.size() && k < velocities.size(); ++k) {
    const double span = times[k].value - above.value;
    if (!(span > 0.0) || !(velocities[k].value > 0.0)) {
      thickness.push_back(Estimate::none("reflection times must grow with depth and velocities be positive"));
    } else {
      const double bySpan = 0.5 * velocities[k].value * std::hypot(times[k].sigma, above.sigma);
      thickness.push_back(
          Estimate::normal(0.5 * velocities[k].value * span, std::hypot(bySpan, 0.5 * span * velocities[k].sigma)));
    }
    above = times[k];
  }
  return thickness;
}

double elevationCorrection(double hShot, double hGeophone, double v1, double vn) {
  if (!(v1 > 0.0) || !(vn > v1)) {
    return Estimate::kNaN;
  }
  return -(hShot + hGeophone) * std::sqrt(1.0 / (v1 * v1) - 1.0 / (vn * vn));
}

}  // namespace strikeplate
