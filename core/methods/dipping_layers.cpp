#include "core/methods/dipping_layers.h"

#include <cmath>
#include <optional>
#include <utility>

#include "core/methods/first_order.h"
#include "core/traveltime/line_fit.h"

namespace strikeplate {
namespace {

template <typename Result>
Result undetermined(std::string reason) {
  Result result;
  result.reason = std::move(reason);
  return result;
}

std::string layerName(std::size_t refractor) {
  return "layer " + std::to_string(refractor + 2);
}

/// data = v1's slowness, then slope and intercept from A and from B of each refractor. Gives slowness of layers 2 to
/// N, dips, depths at A, depths at B, N - 1 of each.
std::optional<Eigen::VectorXd> planesOf(const Eigen::VectorXd& data) {
  std::vector<ReversedTimes> times;
  for (Eigen::Index i = 1; i < data.size(); i += 4) {
    times.push_back({data(i + 1), data(i), data(i + 3), data(i + 2)});
  }
  const DippingPlanes planes = dippingPlanes(1.0 / data(0), times);
  if (!planes.determined) {
    return std::nullopt;
  }
  const auto count = static_cast<Eigen::Index>(times.size());
  Eigen::VectorXd out(4 * count);
  double depthA = 0.0, depthB = 0.0;
  for (Eigen::Index i = 0; i < count; ++i) {
    const auto at = static_cast<std::size_t>(i);
    depthA += planes.thicknessA[at];
    depthB += planes.thicknessB[at];
    out(i) = 1.0 / planes.velocity[at + 1];
    out(count + i) = planes.dip[at];
    out(2 * count + i) = depthA;
    out(3 * count + i) = depthB;
  }
  return out;
}

void putLine(const LineFit& line, Eigen::Index at, Eigen::VectorXd& data, Eigen::MatrixXd& covariance) {
  data(at) = line.intercept;
  data(at + 1) = line.slope;
  covariance(at, at) = line.varIntercept;
  covariance(at + 1, at + 1) = line.varSlope;
  covariance(at, at + 1) = covariance(at + 1, at) = line.covariance;
}

}  // namespace

DippingPlanes dippingPlanes(double v1, std::span<const ReversedTimes> refractors) {
  if (!(v1 > 0.0) || !std::isfinite(v1) || refractors.empty()) {
    return undetermined<DippingPlanes>("a direct velocity and reversed times of a refractor are needed");
  }
  DippingPlanes planes;
  planes.velocity.push_back(v1);
  for (std::size_t n = 0; n < refractors.size(); ++n) {
    const ReversedTimes& t = refractors[n];
    if (!(std::abs(v1 * t.slopeA) <= 1.0) || !(std::abs(v1 * t.slopeB) <= 1.0)) {
      return undetermined<DippingPlanes>(layerName(n) + ": its apparent velocity is below that of layer 1");
    }
    double e = std::asin(v1 * t.slopeA), d = std::asin(v1 * t.slopeB);
    double aboveA = 0.0, aboveB = 0.0;
    for (std::size_t i = 0; i < n; ++i) {
      const double perMetre = (std::cos(d) + std::cos(e)) / planes.velocity[i];
      aboveA += planes.thicknessA[i] * perMetre;
      aboveB += planes.thicknessB[i] * perMetre;
      const double ratio = planes.velocity[i + 1] / planes.velocity[i];
      const double sinD = ratio * std::sin(d + planes.dip[i]), sinE = ratio * std::sin(e - planes.dip[i]);
      if (!(std::abs(sinD) <= 1.0) || !(std::abs(sinE) <= 1.0)) {
        return undetermined<DippingPlanes>(layerName(n) + ": no ray passes layer " + std::to_string(i + 2) +
                                           " to reach it; check its assignment");
      }
      d = std::asin(sinD) - planes.dip[i];
      e = std::asin(sinE) + planes.dip[i];
    }
    const double above = planes.velocity.back(), critical = 0.5 * (d + e);
    const double velocity = above / std::sin(critical);
    if (!(velocity > above) || !std::isfinite(velocity)) {
      return undetermined<DippingPlanes>(layerName(n) + ": the velocity does not grow with depth");
    }
    const double perSecond = above / (std::cos(d) + std::cos(e));
    const double hA = (t.interceptA - aboveA) * perSecond, hB = (t.interceptB - aboveB) * perSecond;
    if (!(hA > 0.0) || !(hB > 0.0) || !std::isfinite(hA) || !std::isfinite(hB)) {
      return undetermined<DippingPlanes>(layerName(n) + ": the layer above it gets no positive thickness");
    }
    planes.velocity.push_back(velocity);
    planes.dip.push_back(0.5 * (e - d));
    planes.thicknessA.push_back(hA);
    planes.thicknessB.push_back(hB);
  }
  planes.determined = true;
  return planes;
}

DippingLayers dippingLayers(const ReversedLines& direct, std::span<const ReversedLines> refractors) {
  double weights = 0.0, slowness = 0.0;
  for (const LineFit* line : {&direct.fromA, &direct.fromB}) {
    if (line->determined && line->varSlope > 0.0) {
      weights += 1.0 / line->varSlope;
      slowness += line->slope / line->varSlope;
    }
  }
  if (!(weights > 0.0) || refractors.empty()) {
    return undetermined<DippingLayers>("a direct branch and reversed branches of a refractor are needed");
  }
  const auto count = static_cast<Eigen::Index>(refractors.size());
  Eigen::VectorXd data(1 + 4 * count);
  Eigen::MatrixXd covariance = Eigen::MatrixXd::Zero(data.size(), data.size());
  data(0) = slowness / weights;
  covariance(0, 0) = 1.0 / weights;
  std::vector<ReversedTimes> times;
  for (Eigen::Index i = 0; i < count; ++i) {
    const ReversedLines& r = refractors[static_cast<std::size_t>(i)];
    if (!r.fromA.determined || !r.fromB.determined) {
      return undetermined<DippingLayers>(layerName(static_cast<std::size_t>(i)) + ": " +
                                         (r.fromA.determined ? r.fromB.reason : r.fromA.reason));
    }
    putLine(r.fromA, 1 + 4 * i, data, covariance);
    putLine(r.fromB, 3 + 4 * i, data, covariance);
    times.push_back({r.fromA.slope, r.fromA.intercept, r.fromB.slope, r.fromB.intercept});
  }
  const auto result = propagate(planesOf, data, covariance);
  if (!result) {
    const DippingPlanes planes = dippingPlanes(1.0 / data(0), times);
    return undetermined<DippingLayers>(
        planes.determined ? "the times lie at the limit of what a plane layer can explain" : planes.reason);
  }
  const auto sigma = [&result](Eigen::Index i) { return std::sqrt(result->covariance(i, i)); };
  const auto estimate = [&](Eigen::Index i) { return Estimate::normal(result->value(i), sigma(i)); };
  DippingLayers layers;
  layers.determined = true;
  layers.velocities.push_back(Estimate::fromSlowness(data(0), std::sqrt(covariance(0, 0))));
  for (Eigen::Index i = 0; i < count; ++i) {
    layers.velocities.push_back(Estimate::fromSlowness(result->value(i), sigma(i)));
    layers.dips.push_back(estimate(count + i));
    layers.depthsA.push_back(estimate(2 * count + i));
    layers.depthsB.push_back(estimate(3 * count + i));
  }
  return layers;
}

Estimate reciprocityGap(const ReversedLines& refractor, double distance) {
  if (!refractor.fromA.determined || !refractor.fromB.determined) {
    return Estimate::none("both shots need a branch of this refractor");
  }
  return Estimate::normal(refractor.fromA.at(distance) - refractor.fromB.at(distance),
                          std::sqrt(varianceAt(refractor.fromA, distance) + varianceAt(refractor.fromB, distance)));
}

}  // namespace strikeplate
