#include "core/base/estimate.h"

#include <cmath>
#include <utility>

namespace strikeplate {

Estimate Estimate::normal(double value, double sigma) {
  if (!std::isfinite(value) || !(sigma >= 0.0) || !std::isfinite(sigma)) {
    return none("not a finite number");
  }
  Estimate e;
  e.value = value;
  e.sigma = sigma;
  e.low68 = value - sigma;
  e.high68 = value + sigma;
  e.low95 = value - kNormal95 * sigma;
  e.high95 = value + kNormal95 * sigma;
  e.determined = true;
  return e;
}

Estimate Estimate::fromSlowness(double slowness, double sigma) {
  if (!(slowness > 0.0) || !std::isfinite(slowness) || !(sigma >= 0.0) || !std::isfinite(sigma)) {
    return none("the slope does not give a positive velocity");
  }
  const auto inverse = [](double s) { return s > 0.0 ? 1.0 / s : std::numeric_limits<double>::infinity(); };
  Estimate e;
  e.value = 1.0 / slowness;
  e.sigma = sigma / (slowness * slowness);
  e.low68 = inverse(slowness + sigma);
  e.high68 = inverse(slowness - sigma);
  e.low95 = inverse(slowness + kNormal95 * sigma);
  e.high95 = inverse(slowness - kNormal95 * sigma);
  e.determined = true;
  return e;
}

Estimate Estimate::none(std::string reason) {
  Estimate e;
  e.reason = std::move(reason);
  return e;
}

}  // namespace strikeplate
