#include "core/section/noise.h"

#include <cmath>

namespace strikeplate {
namespace {

constexpr double kGross = 0.05;
constexpr double kGrossSpread = 15.0;
constexpr double kCauchyScale = 2.385;  // 95 % efficient on normal errors (Holland & Welsch 1977)

}  // namespace

double PickNoise::inlier(double r) {
  // Odds of gross against good, written so that it neither over- nor underflows.
  const double odds =
      kGross / kGrossSpread / (1.0 - kGross) * std::exp(0.5 * r * r * (1.0 - 1.0 / (kGrossSpread * kGrossSpread)));
  return 1.0 / (1.0 + odds);
}

double PickNoise::weight(double r) const {
  if (shape_ == Shape::kCauchy) {
    const double q = r / kCauchyScale;
    return 1.0 / (1.0 + q * q);
  }
  const double p = inlier(r);
  return p + (1.0 - p) / (kGrossSpread * kGrossSpread);
}

double PickNoise::loss(double r) const {
  if (shape_ == Shape::kCauchy) {
    const double q = r / kCauchyScale;
    return 0.5 * kCauchyScale * kCauchyScale * std::log1p(q * q);
  }
  const double wide = r / kGrossSpread;
  const double ratio = kGross / kGrossSpread / (1.0 - kGross);
  if (std::abs(r) < 5.0) {
    return 0.5 * r * r - std::log((1.0 - kGross) * (1.0 + ratio * std::exp(0.5 * (r * r - wide * wide))));
  }
  return 0.5 * wide * wide - std::log(kGross / kGrossSpread + (1.0 - kGross) * std::exp(0.5 * (wide * wide - r * r)));
}

}  // namespace strikeplate
