#pragma once

#include <cstddef>
#include <span>
#include <vector>

namespace strikeplate {

/// The least and the greatest value that a trace takes within each of many equal steps of time.
struct RowExtremes {
  std::vector<float> low, high;  ///< low > high where the trace does not reach
  [[nodiscard]] bool has(std::size_t row) const { return low[row] <= high[row]; }
};

/// Extremes of the trace, straight between its samples, over `rows` steps of `samplesPerRow` samples (> 0), the first
/// of which begins at the fractional sample index `first`. Neighbouring rows share their border, so that a line
/// through them has no gaps; no sample in the span is passed over, so no peak vanishes however far it is zoomed out.
/// `out` is overwritten and may be used again.
void rowExtremes(std::span<const float> samples, double first, double samplesPerRow, std::size_t rows,
                 RowExtremes& out);

/// Each row widened to the extremes of `height` rows (>= 1) about it: what a pen of that height covers.
void widen(RowExtremes& extremes, std::size_t height);

}  // namespace strikeplate
