#include "core/section/mixture.h"

#include <algorithm>
#include <cmath>
#include <numbers>

namespace strikeplate {
namespace {

constexpr double kTail95 = 0.025;
constexpr double kTail68 = 0.15865525393145707;  // one standard deviation of a normal

}  // namespace

void NormalMixture::add(double weight, double mean, double variance) {
  parts_.push_back({weight, mean, std::sqrt(std::max(variance, 0.0))});
  sum_ += weight;
}

double NormalMixture::mean() const {
  double m = 0.0;
  for (const Part& p : parts_) {
    m += p.weight * p.mean;
  }
  return m / sum_;
}

double NormalMixture::sigma() const {
  const double m = mean();
  double v = 0.0;
  for (const Part& p : parts_) {
    v += p.weight * (p.sigma * p.sigma + (p.mean - m) * (p.mean - m));
  }
  return std::sqrt(v / sum_);
}

double NormalMixture::below(double q) const {
  double f = 0.0;
  for (const Part& p : parts_) {
    f += p.weight * 0.5 * std::erfc(-(q - p.mean) / (std::max(p.sigma, 1e-300) * std::numbers::sqrt2));
  }
  return f / sum_;
}

double NormalMixture::quantile(double p) const {
  const double m = mean();
  const double s = sigma();
  if (!(s > 0.0)) {
    return m;
  }
  // A distribution has no quantile further from its mean than Cantelli's bound.
  double low = m - s * std::sqrt((1.0 - p) / p);
  double high = m + s * std::sqrt(p / (1.0 - p));
  double flow = below(low) - p;
  double fhigh = below(high) - p;
  for (int step = 0; step < 60 && high - low > 1e-4 * s; ++step) {
    // False position on even steps, halving on odd ones.
    double q = 0.5 * (low + high);
    if (step % 2 == 0 && fhigh > flow) {
      q = std::clamp(low - flow * (high - low) / (fhigh - flow), low, high);
    }
    const double f = below(q) - p;
    (f < 0.0 ? low : high) = q;
    (f < 0.0 ? flow : fhigh) = f;
    if (std::abs(f) < 1e-5) {
      return q;
    }
  }
  return 0.5 * (low + high);
}

Estimate NormalMixture::estimate() const {
  if (parts_.empty()) {
    return Estimate::none("not solved for");
  }
  Estimate e = Estimate::normal(mean(), sigma());
  if (!e.determined || parts_.size() == 1) {
    return e;
  }
  e.low95 = quantile(kTail95);
  e.high95 = quantile(1.0 - kTail95);
  e.low68 = quantile(kTail68);
  e.high68 = quantile(1.0 - kTail68);
  return e;
}

}  // namespace strikeplate
