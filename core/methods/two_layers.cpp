#include "core/methods/two_layers.h"

#include <cmath>

namespace strikeplate {
namespace {

bool sound(const Datum& d) {
  return d.value > 0.0 && std::isfinite(d.value) && d.sigma >= 0.0 && std::isfinite(d.sigma);
}

Estimate wrongInput() {
  return Estimate::none("the velocity must grow with depth and every datum be positive");
}

double hypot3(double a, double b, double c) {
  return std::sqrt(a * a + b * b + c * c);
}

}  // namespace

Estimate depthFromIntercept(const Datum& time, const Datum& v1, const Datum& v2) {
  if (!sound(time) || !sound(v1) || !sound(v2) || !(v2.value > v1.value)) {
    return wrongInput();
  }
  const double d = v2.value * v2.value - v1.value * v1.value;
  const double h = time.value * v1.value * v2.value / (2.0 * std::sqrt(d));
  return Estimate::normal(h, hypot3(h / time.value * time.sigma, h * v2.value * v2.value / (v1.value * d) * v1.sigma,
                                    h * v1.value * v1.value / (v2.value * d) * v2.sigma));
}

Estimate depthFromCrossover(const Datum& distance, const Datum& v1, const Datum& v2) {
  if (!sound(distance) || !sound(v1) || !sound(v2) || !(v2.value > v1.value)) {
    return wrongInput();
  }
  const double d = v2.value * v2.value - v1.value * v1.value;
  const double h = 0.5 * distance.value * std::sqrt((v2.value - v1.value) / (v2.value + v1.value));
  return Estimate::normal(
      h, hypot3(h / distance.value * distance.sigma, h * v2.value / d * v1.sigma, h * v1.value / d * v2.sigma));
}

Estimate depthFromCriticalDistance(const Datum& distance, const Datum& v1, const Datum& v2) {
  if (!sound(distance) || !sound(v1) || !sound(v2) || !(v2.value > v1.value)) {
    return wrongInput();
  }
  const double d = v2.value * v2.value - v1.value * v1.value;
  const double h = 0.5 * distance.value * std::sqrt(d) / v1.value;
  return Estimate::normal(
      h, hypot3(h / distance.value * distance.sigma, h * v2.value * v2.value / (v1.value * d) * v1.sigma,
                h * v2.value / d * v2.sigma));
}

Estimate depthFromReflection(const Datum& time, const Datum& v1) {
  if (!sound(time) || !sound(v1)) {
    return wrongInput();
  }
  const double h = 0.5 * v1.value * time.value;
  return Estimate::normal(h, std::hypot(0.5 * v1.value * time.sigma, 0.5 * time.value * v1.sigma));
}

DippingPair dippingPair(double v1, double vDown, double vUp) {
  DippingPair pair;
  if (!(v1 > 0.0) || !(std::abs(v1 / vDown) <= 1.0) || !(std::abs(v1 / vUp) <= 1.0)) {
    return pair;
  }
  const double a = std::asin(v1 / vDown), b = std::asin(v1 / vUp);
  pair.critical = 0.5 * (a + b);
  pair.dip = 0.5 * (a - b);
  if (!(std::sin(pair.critical) > 0.0)) {
    return pair;
  }
  pair.v2 = v1 / std::sin(pair.critical);
  pair.determined = true;
  return pair;
}

}  // namespace strikeplate
