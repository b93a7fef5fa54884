#include "core/methods/flat_layers.h"

#include <cmath>

#include "core/methods/derivatives.h"

namespace strikeplate {
namespace {

FlatLayers none(std::string reason) {
  FlatLayers out;
  out.reason = std::move(reason);
  return out;
}

Derived contrast(const Derived& s, const Derived& below) {
  return Derived(sqrt(s * s - below * below));
}

/// Strips from slownesses and intercept times (0 for the first layer), which depend on data with a covariance.
FlatLayers strip(const std::vector<Derived>& slowness, const std::vector<Derived>& intercept,
                 const Eigen::MatrixXd& covariance) {
  FlatLayers out;
  std::vector<Derived> thickness;
  Derived depth = intercept[1] * 0.0;
  for (std::size_t n = 0; n < slowness.size(); ++n) {
    if (!(slowness[n].value() > 0.0) || (n > 0 && !(slowness[n].value() < slowness[n - 1].value()))) {
      return none("The velocity of branch " + std::to_string(n + 1) +
                  " is not greater than that of the one before; layers must be faster with depth.");
    }
    out.velocities.push_back(Estimate::fromSlowness(slowness[n].value(), firstOrderSigma(slowness[n], covariance)));
    if (n == 0) {
      continue;
    }
    Derived rest = intercept[n];
    for (std::size_t k = 0; k + 1 < n; ++k) {
      rest -= 2.0 * thickness[k] * contrast(slowness[k], slowness[n]);
    }
    thickness.emplace_back(rest / (2.0 * contrast(slowness[n - 1], slowness[n])));
    if (!(thickness.back().value() > 0.0)) {
      return none("Layer " + std::to_string(n) + " comes out without thickness; check the assignment of branch " +
                  std::to_string(n + 1) + ".");
    }
    depth += thickness.back();
    out.thicknesses.push_back(estimateOf(thickness.back(), covariance));
    out.depths.push_back(estimateOf(depth, covariance));
  }
  out.determined = true;
  return out;
}

}  // namespace

FlatLayers layersFromIntercepts(std::span<const LineFit> branches) {
  const auto count = static_cast<Eigen::Index>(branches.size());
  if (count < 2) {
    return none("One branch alone has no intercept time; at least two are needed.");
  }
  std::vector<double> data;
  Eigen::MatrixXd covariance = Eigen::MatrixXd::Zero(2 * count, 2 * count);
  for (Eigen::Index n = 0; n < count; ++n) {
    const LineFit& line = branches[static_cast<std::size_t>(n)];
    if (!line.determined) {
      return none("Branch " + std::to_string(n + 1) + " has no line: " + line.reason);
    }
    data.push_back(line.slope);
    data.push_back(line.intercept);
    covariance.block<2, 2>(2 * n, 2 * n) << line.varSlope, line.covariance, line.covariance, line.varIntercept;
  }
  const std::vector<Derived> variables = independent(data);
  std::vector<Derived> slowness, intercept;
  for (std::size_t n = 0; n < branches.size(); ++n) {
    slowness.push_back(variables[2 * n]);
    intercept.push_back(variables[2 * n + 1]);
  }
  return strip(slowness, intercept, covariance);
}

Estimate depthWhereLinesCross(const LineFit& nearer, const LineFit& farther) {
  if (!nearer.determined || !farther.determined || !(farther.slope > 0.0) || !(nearer.slope > farther.slope) ||
      !(farther.intercept > nearer.intercept)) {
    return Estimate::none("the lines do not cross at a positive offset");
  }
  Eigen::Matrix4d covariance = Eigen::Matrix4d::Zero();
  covariance.topLeftCorner<2, 2>() << nearer.varSlope, nearer.covariance, nearer.covariance, nearer.varIntercept;
  covariance.bottomRightCorner<2, 2>() << farther.varSlope, farther.covariance, farther.covariance,
      farther.varIntercept;
  const std::vector<Derived> v = independent({nearer.slope, nearer.intercept, farther.slope, farther.intercept});
  const Derived less(v[0] - v[2]);
  const Derived crossing((v[3] - v[1]) / less);
  return estimateOf(Derived(0.5 * crossing * sqrt(Derived(less / Derived(v[0] + v[2])))), covariance);
}

FlatLayers layersFromCrossovers(std::span<const Datum> crossovers, std::span<const Datum> velocities) {
  if (crossovers.empty() || velocities.size() != crossovers.size() + 1) {
    return none("There must be one velocity more than crossover distances.");
  }
  std::vector<double> data;
  std::vector<double> variances;
  for (const auto& list : {crossovers, velocities}) {
    for (const Datum& d : list) {
      if (!(d.value > 0.0) || !std::isfinite(d.value) || !(d.sigma >= 0.0)) {
        return none("Crossover distances and velocities must be positive.");
      }
      data.push_back(d.value);
      variances.push_back(d.sigma * d.sigma);
    }
  }
  const std::vector<Derived> variables = independent(data);
  std::vector<Derived> slowness, intercept;
  for (std::size_t n = 0; n < velocities.size(); ++n) {
    slowness.emplace_back(1.0 / variables[crossovers.size() + n]);
    intercept.emplace_back(n == 0 ? Derived(variables[0] * 0.0)
                                  : Derived(intercept[n - 1] + variables[n - 1] * (slowness[n - 1] - slowness[n])));
  }
  const auto count = static_cast<Eigen::Index>(variances.size());
  return strip(slowness, intercept, Eigen::VectorXd::Map(variances.data(), count).asDiagonal());
}

std::vector<double> interceptTimes(std::span<const double> velocities, std::span<const double> thicknesses) {
  std::vector<double> out;
  for (std::size_t n = 1; n < velocities.size(); ++n) {
    const double below = 1.0 / velocities[n];
    double time = 0.0;
    for (std::size_t k = 0; k < n; ++k) {
      const double s = 1.0 / velocities[k];
      time += 2.0 * thicknesses[k] * std::sqrt(s * s - below * below);
    }
    out.push_back(time);
  }
  return out;
}

}  // namespace strikeplate
