#include "core/methods/dipping_layers.h"

#include <cmath>

#include "core/methods/derivatives.h"
#include "core/traveltime/line_fit.h"

namespace strikeplate {
namespace {

DippingLayers none(std::string reason) {
  DippingLayers out;
  out.reason = std::move(reason);
  return out;
}

bool isSine(const Derived& value) {
  return std::abs(value.value()) < 1.0;
}

/// What is known when some layers have been stripped.
struct Stripped {
  std::vector<Derived> velocity, dip, thicknessA, thicknessB;
};

/// Strips one more refractor; an empty string when it went well, else why not.
std::string stripNext(Stripped& known, const Derived& slopeA, const Derived& interceptA, const Derived& slopeB,
                      const Derived& interceptB) {
  const std::string layer = "layer " + std::to_string(known.velocity.size() + 1);
  Derived e(known.velocity[0] * slopeA);
  Derived d(known.velocity[0] * slopeB);
  if (!isSine(e) || !isSine(d)) {
    return "The branch of " + layer + " is slower than the first layer.";
  }
  e = asin(e);
  d = asin(d);
  Derived sumA(interceptA * 0.0);
  Derived sumB(sumA);
  for (std::size_t i = 0; i < known.dip.size(); ++i) {
    const Derived way((cos(d) + cos(e)) / known.velocity[i]);
    sumA += known.thicknessA[i] * way;
    sumB += known.thicknessB[i] * way;
    const Derived ratio(known.velocity[i + 1] / known.velocity[i]);
    const Derived down(ratio * sin(Derived(d + known.dip[i])));
    const Derived up(ratio * sin(Derived(e - known.dip[i])));
    if (!isSine(down) || !isSine(up)) {
      return "The wave of " + layer + " cannot pass through the layers above; check the assignment of its branches.";
    }
    d = asin(down) - known.dip[i];
    e = asin(up) + known.dip[i];
  }
  const Derived critical(0.5 * (d + e));
  if (!(std::sin(critical.value()) > 0.0)) {
    return "The branches of " + layer + " give no critical angle.";
  }
  const Derived above = known.velocity.back();
  const Derived way((cos(d) + cos(e)) / above);
  known.thicknessA.emplace_back((interceptA - sumA) / way);
  known.thicknessB.emplace_back((interceptB - sumB) / way);
  known.dip.emplace_back(0.5 * (e - d));
  known.velocity.emplace_back(above / sin(critical));
  if (!(known.velocity.back().value() > above.value())) {
    return "The " + layer + " comes out no faster than the one above it.";
  }
  if (!(known.thicknessA.back().value() > 0.0) || !(known.thicknessB.back().value() > 0.0)) {
    return "The interface above " + layer + " crosses the one above it between the shots.";
  }
  return {};
}

std::vector<Estimate> estimates(const std::vector<Derived>& values, const Eigen::MatrixXd& covariance) {
  std::vector<Estimate> out;
  for (const Derived& v : values) {
    out.push_back(estimateOf(v, covariance));
  }
  return out;
}

std::vector<Estimate> summed(const std::vector<Derived>& thicknesses, const Eigen::MatrixXd& covariance) {
  std::vector<Derived> depths;
  for (const Derived& h : thicknesses) {
    depths.emplace_back(depths.empty() ? h : Derived(depths.back() + h));
  }
  return estimates(depths, covariance);
}

}  // namespace

DippingLayers layersFromReversed(const Datum& direct, std::span<const ReversedLines> refractors) {
  if (!(direct.value > 0.0) || !std::isfinite(direct.value) || !(direct.sigma >= 0.0)) {
    return none("The direct wave has no velocity.");
  }
  if (refractors.empty()) {
    return none("No refractor is seen from both ends.");
  }
  const auto size = 1 + 4 * static_cast<Eigen::Index>(refractors.size());
  std::vector<double> data{direct.value};
  Eigen::MatrixXd covariance = Eigen::MatrixXd::Zero(size, size);
  covariance(0, 0) = direct.sigma * direct.sigma;
  for (const ReversedLines& lines : refractors) {
    for (const LineFit* line : {&lines.a, &lines.b}) {
      if (!line->determined) {
        return none("A branch has no line: " + line->reason);
      }
      const auto at = static_cast<Eigen::Index>(data.size());
      data.push_back(line->slope);
      data.push_back(line->intercept);
      covariance.block<2, 2>(at, at) << line->varSlope, line->covariance, line->covariance, line->varIntercept;
    }
  }
  const std::vector<Derived> variables = independent(data);
  Stripped known;
  known.velocity.emplace_back(1.0 / variables[0]);
  for (std::size_t n = 0; n < refractors.size(); ++n) {
    const Derived* v = &variables[1 + 4 * n];
    if (std::string why = stripNext(known, v[0], v[1], v[2], v[3]); !why.empty()) {
      return none(std::move(why));
    }
  }
  DippingLayers out;
  out.determined = true;
  out.velocities = estimates(known.velocity, covariance);
  out.dips = estimates(known.dip, covariance);
  out.thicknessesA = estimates(known.thicknessA, covariance);
  out.thicknessesB = estimates(known.thicknessB, covariance);
  out.depthsA = summed(known.thicknessA, covariance);
  out.depthsB = summed(known.thicknessB, covariance);
  return out;
}

Estimate reciprocityOf(const ReversedLines& lines, double length) {
  if (!lines.a.determined || !lines.b.determined) {
    return Estimate::none("a branch has no line");
  }
  return Estimate::normal(lines.a.at(length) - lines.b.at(length),
                          std::sqrt(varianceAt(lines.a, length) + varianceAt(lines.b, length)));
}

}  // namespace strikeplate
