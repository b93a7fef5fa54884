#include "widgets/record_extremes.h"

#include <algorithm>
#include <cmath>
#include <limits>

namespace strikeplate {
namespace {

constexpr float kNone = std::numeric_limits<float>::infinity();

/// Value between samples; `at` must lie within 0 and size - 1.
inline float valueAt(std::span<const float> samples, double at) {
  const auto i = static_cast<std::size_t>(at);
  if (i + 1 >= samples.size()) {
    return samples.back();
  }
  const auto f = static_cast<float>(at - static_cast<double>(i));
  return samples[i] + f * (samples[i + 1] - samples[i]);
}

/// Two chains side by side, for each comparison has to wait for the one before it in its chain.
inline void takeIn(const float* at, std::size_t count, float& low, float& high) {
  float low2 = low, high2 = high;
  std::size_t i = 0;
  for (; i + 1 < count; i += 2) {
    low = std::min(low, at[i]);
    high = std::max(high, at[i]);
    low2 = std::min(low2, at[i + 1]);
    high2 = std::max(high2, at[i + 1]);
  }
  if (i < count) {
    low = std::min(low, at[i]);
    high = std::max(high, at[i]);
  }
  low = std::min(low, low2);
  high = std::max(high, high2);
}

}  // namespace

void rowExtremes(std::span<const float> samples, double first, double samplesPerRow, std::size_t rows,
                 RowExtremes& out) {
  out.low.assign(rows, kNone);
  out.high.assign(rows, -kNone);
  if (samples.empty()) {
    return;
  }
  const double end = static_cast<double>(samples.size() - 1);
  double from = std::max(0.0, first);
  if (from > end) {
    return;
  }
  float border = valueAt(samples, from);
  const auto begin = static_cast<std::size_t>(std::max(0.0, std::floor(-first / samplesPerRow)));
  for (std::size_t row = begin; row < rows && from <= end; ++row) {
    const double to = std::min(end, first + static_cast<double>(row + 1) * samplesPerRow);
    if (to < from) {
      continue;
    }
    float low = border, high = border;
    const auto inside = static_cast<std::size_t>(from) + 1, stop = static_cast<std::size_t>(to) + 1;
    takeIn(samples.data() + inside, stop > inside ? stop - inside : 0, low, high);
    border = valueAt(samples, to);
    out.low[row] = std::min(low, border);
    out.high[row] = std::max(high, border);
    if (to >= end) {
      break;
    }
    from = to;
  }
}

void widen(RowExtremes& extremes, std::size_t height) {
  const RowExtremes before = extremes;
  const std::size_t rows = before.low.size();
  for (std::size_t by = 1; by <= height / 2 && by < rows; ++by) {
    for (std::size_t row = 0; row + by < rows; ++row) {
      extremes.low[row] = std::min(extremes.low[row], before.low[row + by]);
      extremes.high[row] = std::max(extremes.high[row], before.high[row + by]);
    }
  }
  for (std::size_t by = 1; by <= (height - 1) / 2 && by < rows; ++by) {
    for (std::size_t row = by; row < rows; ++row) {
      extremes.low[row] = std::min(extremes.low[row], before.low[row - by]);
      extremes.high[row] = std::max(extremes.high[row], before.high[row - by]);
    }
  }
}

}  // namespace strikeplate
