#pragma once

#include <cstddef>
#include <optional>
#include <span>

namespace strikeplate {

/// Where a stretch of samples changes its variance.
struct VarianceStep {
  std::size_t index = 0;  ///< number of samples before the step
  double drop = 0.0;      ///< how far the criterion lies below its value without a step; larger is clearer
  double ratio = 0.0;     ///< variance after over variance before
};

/// Akaike's criterion for one change of variance,
///
///   AIC(k) = k ln var(x_1..x_k) + (N - k - 1) ln var(x_k+1..x_N),
///
/// at its least k with at least `margin` samples on either side. None for fewer than 2 margin + 2 samples or samples
/// without variance. The stretch must hold one onset only: noise before it, one or two periods after it.
/// Source: Maeda 1985, Zisin 38, 365-379.
std::optional<VarianceStep> leastAic(std::span<const float> samples, std::size_t margin = 4);

}  // namespace strikeplate
