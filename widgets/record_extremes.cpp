#include "widgets/record_extremes.h"

#include <algorithm>
#include <cmath>
#include <limits>

namespace strikeplate {
namespace {

constexpr float kNone = std::numeric_limits<float>::infinity();

/// Value between samples; `at` must lie within 0 and size - 1.
float valueAt(std::span<const float> samples, double at) {
  const auto i = static_cast<std::size_t>(at);
  if (i + 1 >= samples.size()) {
    return samples.back();
  }
  const auto f = static_cast<float>(at - static_cast<double>(i));
  return samples[i] + f * (samples[i + 1] - samples[i]);
}

void extremesOf(std::span<const float> samples, float& low, float& high) {
  float least = low, most = high;
  for (const float value : samples) {
    least = std::min(least, value);
    most = std::max(most, value);
  }
  low = least;
  high = most;
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
  for (std::size_t row = 0; row < rows; ++row) {
    const double from = std::max(0.0, first + static_cast<double>(row) * samplesPerRow);
    const double to = std::min(end, first + static_cast<double>(row + 1) * samplesPerRow);
    if (from > to) {
      continue;
    }
    const float a = valueAt(samples, from), b = valueAt(samples, to);
    out.low[row] = std::min(a, b);
    out.high[row] = std::max(a, b);
    const auto inside = static_cast<std::size_t>(std::ceil(from));
    const auto last = static_cast<std::size_t>(std::floor(to));
    if (inside <= last) {
      extremesOf(samples.subspan(inside, last - inside + 1), out.low[row], out.high[row]);
    }
  }
}

void widen(RowExtremes& extremes, std::size_t reach) {
  const RowExtremes before = extremes;
  const std::size_t rows = before.low.size();
  for (std::size_t row = 0; row < rows; ++row) {
    if (!before.has(row)) {
      continue;
    }
    const std::size_t from = row - std::min(row, reach), to = std::min(rows, row + reach + 1);
    float low = before.low[row], high = before.high[row];
    for (std::size_t i = from; i < to; ++i) {
      low = std::min(low, before.low[i]);
      high = std::max(high, before.high[i]);
    }
    extremes.low[row] = low;
    extremes.high[row] = high;
  }
}

}  // namespace strikeplate
