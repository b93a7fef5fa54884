#include "core/methods/overburden.h"

#include <cmath>

namespace strikeplate {

Estimate depthFromDelay(const Delay& delay, const Overburden& above) {
  const std::size_t layers = above.slowness.size();
  const double s = delay.refractor.value;
  if (layers == 0 || above.thickness.size() + 1 != layers || !(s > 0.0)) {
    return Estimate::none("the velocities above the refractor are not known");
  }
  std::vector<double> c;
  for (const Datum& layer : above.slowness) {
    if (!(layer.value > s)) {
      return Estimate::none("the refractor is not faster than the layers above it");
    }
    c.push_back(std::sqrt(layer.value * layer.value - s * s));
  }
  const double last = c.back();
  double left = delay.time.value, depth = 0.0, variance = 0.0, byRefractor = 0.0;
  const auto add = [&variance](double derivative, double sigma) {
    variance += derivative * derivative * sigma * sigma;
  };
  for (std::size_t k = 0; k + 1 < layers; ++k) {
    const double h = above.thickness[k].value;
    left -= h * c[k];
    depth += h;
    byRefractor += h * s / (c[k] * last);
    add(1.0 - c[k] / last, above.thickness[k].sigma);
    add(h * above.slowness[k].value / (c[k] * last), above.slowness[k].sigma);
  }
  if (!(left > 0.0)) {
    return Estimate::none("the layers above take up the whole delay time");
  }
  const double h = left / last;
  byRefractor += h * s / (last * last);
  add(h * above.slowness.back().value / (last * last), above.slowness.back().sigma);
  add(1.0 / last, delay.time.sigma);
  add(byRefractor, delay.refractor.sigma);
  variance += 2.0 * byRefractor * delay.covariance / last;
  return Estimate::normal(depth + h, std::sqrt(variance));
}

}  // namespace strikeplate
