#include "core/picking/onset_aic.h"

#include <algorithm>
#include <cmath>
#include <vector>

namespace strikeplate {
namespace {

/// Sums and sums of squares up to each sample, about the first sample so that an offset does not cost digits.
struct RunningSums {
  std::vector<double> sum, square;

  explicit RunningSums(std::span<const float> samples) : sum(samples.size() + 1), square(samples.size() + 1) {
    for (std::size_t i = 0; i < samples.size(); ++i) {
      const double x = static_cast<double>(samples[i]) - samples[0];
      sum[i + 1] = sum[i] + x;
      square[i + 1] = square[i] + x * x;
    }
  }

  [[nodiscard]] double variance(std::size_t from, std::size_t to) const {
    const auto n = static_cast<double>(to - from);
    const double mean = (sum[to] - sum[from]) / n;
    return std::max(0.0, (square[to] - square[from]) / n - mean * mean);
  }
};

}  // namespace

std::optional<VarianceStep> leastAic(std::span<const float> samples, std::size_t margin) {
  const std::size_t n = samples.size();
  if (n < 2 * margin + 2)
    return std::nullopt;
  const RunningSums sums(samples);
  const double whole = sums.variance(0, n);
  if (!(whole > 0.0) || !std::isfinite(whole))
    return std::nullopt;
  const double floor = 1e-12 * whole;  // a stretch of exact zeros has no variance

  VarianceStep best;
  double least = 0.0;
  for (std::size_t k = margin; k <= n - margin; ++k) {
    const double before = std::max(sums.variance(0, k), floor);
    const double after = std::max(sums.variance(k, n), floor);
    const double aic = static_cast<double>(k) * std::log(before) + static_cast<double>(n - k - 1) * std::log(after);
    if (best.index == 0 || aic < least) {
      least = aic;
      best.index = k;
      best.ratio = after / before;
    }
  }
  best.drop = static_cast<double>(n - 1) * std::log(whole) - least;
  return best;
}

}  // namespace strikeplate
