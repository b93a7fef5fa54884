#include "core/picking/work_trace.h"

#include <algorithm>
#include <cassert>
#include <cmath>

namespace strikeplate {
namespace {

float sampleAt(std::span<const float> samples, std::ptrdiff_t i) {
  const auto last = static_cast<std::ptrdiff_t>(samples.size()) - 1;
  const float x = samples[static_cast<std::size_t>(std::clamp<std::ptrdiff_t>(i, 0, last))];
  return std::isfinite(x) ? x : 0.0F;
}

/// Triangular mean of half width `reach` samples about position `at`.
float smoothed(std::span<const float> samples, double at, double reach) {
  double sum = 0.0, weights = 0.0;
  for (auto i = static_cast<std::ptrdiff_t>(std::ceil(at - reach)); static_cast<double>(i) <= at + reach; ++i) {
    const double weight = 1.0 - std::abs(static_cast<double>(i) - at) / reach;
    sum += weight * sampleAt(samples, i);
    weights += weight;
  }
  return static_cast<float>(sum / weights);
}

float cubic(std::span<const float> samples, double at) {
  const double whole = std::floor(at);
  const auto i = static_cast<std::ptrdiff_t>(whole);
  const auto u = static_cast<float>(at - whole);
  const float a = sampleAt(samples, i - 1), b = sampleAt(samples, i);
  const float c = sampleAt(samples, i + 1), d = sampleAt(samples, i + 2);
  return b + 0.5F * u * (c - a + u * (2.0F * a - 5.0F * b + 4.0F * c - d + u * (3.0F * (b - c) + d - a)));
}

}  // namespace

WorkTrace workTrace(const Gather& gather, std::size_t trace) {
  assert(gather.sampleInterval > 0.0 && trace < gather.traces.size());
  const std::span<const float> samples = gather.traces[trace];
  WorkTrace work;
  work.start = gather.start;
  if (samples.empty())
    return work;
  const double ratio = kWorkInterval / gather.sampleInterval;
  const double length = static_cast<double>(samples.size() - 1) / ratio;
  work.samples.resize(static_cast<std::size_t>(std::floor(length + 1e-6)) + 1);
  for (std::size_t i = 0; i < work.samples.size(); ++i) {
    const double at = static_cast<double>(i) * ratio;
    work.samples[i] = ratio > 1.01 ? smoothed(samples, at, ratio) : cubic(samples, at);
  }
  return work;
}

}  // namespace strikeplate
