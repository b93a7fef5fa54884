#include "core/methods/flat_layers.h"

#include <cmath>
#include <utility>

#include "core/methods/first_order.h"

namespace strikeplate {
namespace {

enum class Route { Intercepts, Crossovers };

FlatLayers undetermined(std::string reason) {
  FlatLayers layers;
  layers.reason = std::move(reason);
  return layers;
}

/// data = intercept and slope of each line in turn; gives the thicknesses, then the depths.
std::optional<Eigen::VectorXd> layersOf(const Eigen::VectorXd& data, Route datum) {
  const auto count = static_cast<std::size_t>(data.size() / 2);
  std::vector<double> slowness, intercepts, crossovers;
  for (std::size_t i = 0; i < count; ++i) {
    const auto at = static_cast<Eigen::Index>(2 * i);
    slowness.push_back(data(at + 1));
    if (i > 0) {
      intercepts.push_back(data(at));
      crossovers.push_back((data(at) - data(at - 2)) / (data(at - 1) - data(at + 1)));
    }
  }
  if (datum == Route::Crossovers) {
    intercepts = interceptsFromCrossovers(slowness, crossovers);
  }
  const auto thickness = thicknessesFromIntercepts(slowness, intercepts);
  if (!thickness) {
    return std::nullopt;
  }
  const auto layers = static_cast<Eigen::Index>(thickness->size());
  Eigen::VectorXd out(2 * layers);
  double depth = 0.0;
  for (Eigen::Index i = 0; i < layers; ++i) {
    out(i) = (*thickness)[static_cast<std::size_t>(i)];
    depth += out(i);
    out(layers + i) = depth;
  }
  return out;
}

FlatLayers fromLines(std::span<const LineFit> lines, Route datum) {
  if (lines.size() < 2) {
    return undetermined("a direct branch and at least one through a deeper layer are needed");
  }
  const auto size = static_cast<Eigen::Index>(2 * lines.size());
  Eigen::VectorXd data(size);
  Eigen::MatrixXd covariance = Eigen::MatrixXd::Zero(size, size);
  for (std::size_t i = 0; i < lines.size(); ++i) {
    const LineFit& line = lines[i];
    if (!line.determined) {
      return undetermined("branch " + std::to_string(i + 1) + ": " + line.reason);
    }
    if (!(line.slope > 0.0) || (i > 0 && !(line.slope < lines[i - 1].slope))) {
      return undetermined("the velocity does not grow from layer to layer");
    }
    const auto at = static_cast<Eigen::Index>(2 * i);
    data(at) = line.intercept;
    data(at + 1) = line.slope;
    covariance(at, at) = line.varIntercept;
    covariance(at + 1, at + 1) = line.varSlope;
    covariance(at, at + 1) = covariance(at + 1, at) = line.covariance;
  }
  const auto result = propagate([datum](const Eigen::VectorXd& d) { return layersOf(d, datum); }, data, covariance);
  if (!result) {
    return undetermined("the times give a layer no positive thickness");
  }
  FlatLayers layers;
  layers.determined = true;
  for (const LineFit& line : lines) {
    layers.velocities.push_back(Estimate::fromSlowness(line.slope, std::sqrt(line.varSlope)));
  }
  const Eigen::Index half = result->value.size() / 2;
  for (Eigen::Index i = 0; i < half; ++i) {
    layers.thickness.push_back(Estimate::normal(result->value(i), std::sqrt(result->covariance(i, i))));
    layers.depths.push_back(
        Estimate::normal(result->value(half + i), std::sqrt(result->covariance(half + i, half + i))));
  }
  return layers;
}

}  // namespace

std::optional<std::vector<double>> thicknessesFromIntercepts(std::span<const double> slowness,
                                                             std::span<const double> intercepts) {
  if (slowness.size() < 2 || intercepts.size() + 1 != slowness.size()) {
    return std::nullopt;
  }
  for (std::size_t i = 0; i < slowness.size(); ++i) {
    if (!(slowness[i] > 0.0) || !std::isfinite(slowness[i]) || (i > 0 && !(slowness[i] < slowness[i - 1]))) {
      return std::nullopt;
    }
  }
  std::vector<double> thickness;
  for (std::size_t n = 1; n < slowness.size(); ++n) {
    const auto c = [&slowness, n](std::size_t k) {
      return std::sqrt(slowness[k] * slowness[k] - slowness[n] * slowness[n]);
    };
    double time = intercepts[n - 1];
    for (std::size_t k = 0; k + 1 < n; ++k) {
      time -= 2.0 * thickness[k] * c(k);
    }
    const double h = time / (2.0 * c(n - 1));
    if (!(h > 0.0) || !std::isfinite(h)) {
      return std::nullopt;
    }
    thickness.push_back(h);
  }
  return thickness;
}

std::vector<double> interceptsFromCrossovers(std::span<const double> slowness, std::span<const double> crossovers) {
  std::vector<double> intercepts;
  double time = 0.0;
  for (std::size_t i = 0; i < crossovers.size() && i + 1 < slowness.size(); ++i) {
    time += crossovers[i] * (slowness[i] - slowness[i + 1]);
    intercepts.push_back(time);
  }
  return intercepts;
}

FlatLayers flatLayersFromIntercepts(std::span<const LineFit> lines) {
  return fromLines(lines, Route::Intercepts);
}

FlatLayers flatLayersFromCrossovers(std::span<const LineFit> lines) {
  return fromLines(lines, Route::Crossovers);
}

}  // namespace strikeplate
