#include "core/traveltime/outliers.h"

#include <algorithm>
#include <cmath>

namespace strikeplate {
namespace {

double median(std::vector<double> values) {
  const auto middle = values.begin() + static_cast<std::ptrdiff_t>(values.size() / 2);
  std::nth_element(values.begin(), middle, values.end());
  return *middle;
}

}  // namespace

std::vector<std::size_t> findOutliers(std::span<const FitPoint> points) {
  std::vector<double> slopes, levels, deviations;
  for (std::size_t i = 0; i < points.size(); ++i) {
    for (std::size_t j = i + 1; j < points.size(); ++j) {
      const double dx = points[j].offset - points[i].offset;
      if (dx != 0.0) {
        slopes.push_back((points[j].time - points[i].time) / dx);
      }
    }
  }
  std::vector<std::size_t> found;
  if (points.size() < 5 || slopes.empty()) {
    return found;
  }
  const double slope = median(slopes);
  for (const FitPoint& p : points) {
    levels.push_back(p.time - slope * p.offset);
  }
  const double level = median(levels);
  for (const double l : levels) {
    deviations.push_back(std::abs(l - level));
  }
  const double spread = 1.4826 * median(deviations);
  for (std::size_t i = 0; i < points.size(); ++i) {
    if (deviations[i] > 5.0 * spread && deviations[i] > 3.0 * points[i].sigma) {
      found.push_back(i);
    }
  }
  return found;
}

}  // namespace strikeplate
