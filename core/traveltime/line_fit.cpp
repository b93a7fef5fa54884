#include "core/traveltime/line_fit.h"

#include <algorithm>
#include <cmath>
#include <string>
#include <utility>

namespace strikeplate {
namespace {

LineFit undetermined(std::size_t count, std::string reason) {
  LineFit fit;
  fit.count = static_cast<int>(count);
  fit.reason = std::move(reason);
  return fit;
}

bool sound(std::span<const FitPoint> points) {
  for (const FitPoint& p : points) {
    if (!std::isfinite(p.offset) || !std::isfinite(p.time) || !(p.sigma > 0.0) || !std::isfinite(p.sigma)) {
      return false;
    }
  }
  return true;
}

void finish(LineFit& fit, std::span<const FitPoint> points) {
  double sum = 0.0;
  for (const FitPoint& p : points) {
    const double r = p.time - fit.at(p.offset);
    sum += r * r;
  }
  fit.count = static_cast<int>(points.size());
  fit.rms = std::sqrt(sum / static_cast<double>(points.size()));
  fit.determined = true;
}

}  // namespace

LineFit fitLine(std::span<const FitPoint> points) {
  if (!sound(points)) {
    return undetermined(points.size(), "a pick has no usable time or sigma");
  }
  double s = 0.0, sx = 0.0, st = 0.0, largest = 0.0;
  for (const FitPoint& p : points) {
    const double w = 1.0 / (p.sigma * p.sigma);
    s += w;
    sx += w * p.offset;
    st += w * p.time;
    largest = std::max(largest, std::abs(p.offset));
  }
  if (points.size() < 2) {
    return undetermined(points.size(), "a line needs two picks at different offsets");
  }
  const double xm = sx / s, tm = st / s;
  double sxx = 0.0, sxt = 0.0;
  for (const FitPoint& p : points) {
    const double w = 1.0 / (p.sigma * p.sigma);
    sxx += w * (p.offset - xm) * (p.offset - xm);
    sxt += w * (p.offset - xm) * (p.time - tm);
  }
  // Below this the offsets differ only by rounding.
  if (!(sxx > 1e-18 * s * (1.0 + largest * largest))) {
    return undetermined(points.size(), "a line needs two picks at different offsets");
  }
  LineFit fit;
  fit.slope = sxt / sxx;
  fit.intercept = tm - fit.slope * xm;
  fit.varSlope = 1.0 / sxx;
  fit.varIntercept = 1.0 / s + xm * xm / sxx;
  fit.covariance = -xm / sxx;
  finish(fit, points);
  return fit;
}

LineFit fitLineThroughOrigin(std::span<const FitPoint> points) {
  if (!sound(points)) {
    return undetermined(points.size(), "a pick has no usable time or sigma");
  }
  double sxx = 0.0, sxt = 0.0;
  for (const FitPoint& p : points) {
    const double w = 1.0 / (p.sigma * p.sigma);
    sxx += w * p.offset * p.offset;
    sxt += w * p.offset * p.time;
  }
  if (!(sxx > 0.0)) {
    return undetermined(points.size(), "a direct arrival away from the shot is needed");
  }
  LineFit fit;
  fit.throughOrigin = true;
  fit.slope = sxt / sxx;
  fit.varSlope = 1.0 / sxx;
  finish(fit, points);
  return fit;
}

double varianceAt(const LineFit& fit, double offset) {
  return fit.varIntercept + 2.0 * offset * fit.covariance + offset * offset * fit.varSlope;
}

}  // namespace strikeplate
