#pragma once

#include <algorithm>
#include <cmath>

#include "core/section/grid.h"

namespace strikeplate {

/// Adds scale times the mean of each velocity knot's hat function over [xa, xb] to `out`, a callable (knot, value).
template <class Out>
void meanOfHats(const SectionGrid& grid, double xa, double xb, double scale, Out&& out) {
  const double last = grid.velocityKnots - 1;
  double a = std::clamp((std::min(xa, xb) - grid.start) / grid.velocitySpacing, 0.0, last);
  const double b = std::clamp((std::max(xa, xb) - grid.start) / grid.velocitySpacing, 0.0, last);
  if (b - a < 1e-6) {
    const int i = std::min(static_cast<int>(a), grid.velocityKnots - 2);
    out(i, scale * (i + 1 - a));
    out(i + 1, scale * (a - i));
    return;
  }
  const double perUnit = scale / (b - a);
  while (b - a > 1e-9) {
    const int i = std::min(static_cast<int>(a + 1e-9), grid.velocityKnots - 2);
    const double end = std::min(b, i + 1.0);
    const double right = 0.5 * (a + end) - i;  // mean of the rising hat over this cell's part
    out(i, perUnit * (end - a) * (1.0 - right));
    out(i + 1, perUnit * (end - a) * right);
    a = end;
  }
}

}  // namespace strikeplate
