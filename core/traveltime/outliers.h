#pragma once

#include <span>
#include <vector>

#include "core/traveltime/line_fit.h"

namespace strikeplate {

/// Indices of the points that lie off the line of the others: farther from the line of median slope than five times
/// the residuals' median absolute deviation (scaled by 1.4826 to a standard deviation) and than three sigmas of their
/// own. Three points in ten may be wrong. Empty with fewer than five points.
/// Source: median slope, Theil (1950), Sen, J. Am. Stat. Assoc. 63 (1968) 1379; the limits: common practice, no
/// source.
std::vector<std::size_t> findOutliers(std::span<const FitPoint> points);

}  // namespace strikeplate
