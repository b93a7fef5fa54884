#include "core/record/interpolate.h"

#include <algorithm>
#include <array>
#include <cassert>
#include <cmath>
#include <numbers>

namespace strikeplate {
namespace {

constexpr int kHalf = 12;
constexpr double kBeta = 9.0;
using Kernel = std::array<double, 2 * kHalf>;

// Modified Bessel function of the first kind, order 0, by its power series.
double bessel0(double x) {
  double sum = 1.0;
  double term = 1.0;
  for (int k = 1; k < 60 && term > 1e-17 * sum; ++k) {
    const double half = x / (2.0 * k);
    term *= half * half;
    sum += term;
  }
  return sum;
}

// Weights of the samples -kHalf+1 ... kHalf around a position `fraction` (0 to below 1) behind sample 0; their sum
// is 1.
Kernel kernelAt(double fraction) {
  Kernel kernel{};
  double sum = 0.0;
  for (int k = 0; k < 2 * kHalf; ++k) {
    const double distance = k - kHalf + 1 - fraction;
    const double inside = 1.0 - distance * distance / (kHalf * kHalf);
    const double window = inside <= 0.0 ? 0.0 : bessel0(kBeta * std::sqrt(inside));
    const double angle = std::numbers::pi * distance;
    kernel[static_cast<std::size_t>(k)] = window * (std::abs(angle) < 1e-12 ? 1.0 : std::sin(angle) / angle);
    sum += kernel[static_cast<std::size_t>(k)];
  }
  for (double& weight : kernel) {
    weight /= sum;
  }
  return kernel;
}

double weighted(std::span<const float> samples, std::ptrdiff_t at, const Kernel& kernel) {
  const auto last = static_cast<std::ptrdiff_t>(samples.size()) - 1;
  const std::ptrdiff_t from = at - kHalf + 1;
  double sum = 0.0;
  if (from >= 0 && at + kHalf <= last) {
    const float* sample = samples.data() + from;
    for (std::size_t k = 0; k < kernel.size(); ++k) {
      sum += kernel[k] * static_cast<double>(sample[k]);
    }
    return sum;
  }
  for (std::size_t k = 0; k < kernel.size(); ++k) {
    const std::ptrdiff_t index = std::clamp<std::ptrdiff_t>(from + static_cast<std::ptrdiff_t>(k), 0, last);
    sum += kernel[k] * static_cast<double>(samples[static_cast<std::size_t>(index)]);
  }
  return sum;
}

}  // namespace

std::vector<float> interpolated(std::span<const float> samples, double first, double step, std::size_t count) {
  assert(!samples.empty());
  constexpr double kWhole = 1e-9;  // positions this close to a sample are that sample
  const auto last = static_cast<std::ptrdiff_t>(samples.size()) - 1;
  std::vector<float> out(count);
  Kernel kernel{};
  double kernelFraction = -1.0;
  for (std::size_t i = 0; i < count; ++i) {
    const double position = first + static_cast<double>(i) * step;
    double floor = std::floor(position);
    double fraction = position - floor;
    if (fraction > 1.0 - kWhole) {
      floor += 1.0;
      fraction = 0.0;
    }
    const auto at = static_cast<std::ptrdiff_t>(floor);
    if (fraction < kWhole) {
      out[i] = samples[static_cast<std::size_t>(std::clamp<std::ptrdiff_t>(at, 0, last))];
      continue;
    }
    // A plain shift has one kernel for the whole trace.
    if (std::abs(fraction - kernelFraction) > kWhole) {
      kernel = kernelAt(fraction);
      kernelFraction = fraction;
    }
    out[i] = static_cast<float>(weighted(samples, at, kernel));
  }
  return out;
}

}  // namespace strikeplate
