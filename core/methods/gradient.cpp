#include "core/methods/gradient.h"

#include <cmath>
#include <numbers>

namespace strikeplate {
namespace {

bool positive(double value) {
  return value > 0.0 && std::isfinite(value);
}

/// Antiderivative of arccosh u.
double arccoshIntegral(double u) {
  return u * std::acosh(u) - std::sqrt(u * u - 1.0);
}

}  // namespace

std::optional<DivingWave> divingWave(const LinearGradient& ground, double offset) {
  if (!positive(ground.v0) || !positive(ground.gradient) || !positive(offset)) {
    return std::nullopt;
  }
  const double r = 0.5 * ground.gradient * offset / ground.v0;
  return DivingWave{2.0 / ground.gradient * std::asinh(r),
                    ground.v0 / ground.gradient * (std::sqrt(1.0 + r * r) - 1.0), ground.v0 * std::sqrt(1.0 + r * r)};
}

std::optional<double> divingWaveOffset(const LinearGradient& ground, double time) {
  if (!positive(ground.v0) || !positive(ground.gradient) || !positive(time)) {
    return std::nullopt;
  }
  return 2.0 * ground.v0 / ground.gradient * std::sinh(0.5 * ground.gradient * time);
}

VelocityCurve wiechertHerglotz(std::span<const double> offset, std::span<const double> slowness) {
  VelocityCurve curve;
  if (offset.size() < 2 || offset.size() != slowness.size() || offset[0] != 0.0) {
    curve.reason = "a slope at the shot and at one offset at least are needed";
    return curve;
  }
  for (std::size_t i = 0; i < offset.size(); ++i) {
    if (!positive(slowness[i]) || (i > 0 && !(offset[i] > offset[i - 1]))) {
      curve.reason = "offsets must rise and slopes be positive";
      return curve;
    }
    if (i > 0 && !(slowness[i] < slowness[i - 1])) {
      curve.reason = "the apparent velocity does not grow all the way; a slower layer or a wrong pick";
      return curve;
    }
  }
  for (std::size_t end = 1; end < offset.size(); ++end) {
    double integral = 0.0;
    for (std::size_t i = 1; i <= end; ++i) {
      // p is straight within the interval, so that the integral over it is exact.
      const double from = slowness[i - 1] / slowness[end], to = i == end ? 1.0 : slowness[i] / slowness[end];
      integral += (offset[i] - offset[i - 1]) * (arccoshIntegral(from) - arccoshIntegral(to)) / (from - to);
    }
    curve.points.push_back({integral / std::numbers::pi, 1.0 / slowness[end]});
  }
  curve.determined = true;
  return curve;
}

}  // namespace strikeplate
