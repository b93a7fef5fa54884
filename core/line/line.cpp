#include "core/line/line.h"

#include <algorithm>

namespace strikeplate {

Ground::Ground(const std::vector<Geophone>& geophones, const std::vector<ShotPoint>& shots) {
  std::vector<Geophone> all = geophones;
  for (const ShotPoint& shot : shots) {
    all.push_back({shot.x, shot.elevation});
  }
  std::sort(all.begin(), all.end(), [](const Geophone& a, const Geophone& b) { return a.x < b.x; });
  for (std::size_t i = 0; i < all.size();) {
    double sum = 0.0;
    std::size_t j = i;
    for (; j < all.size() && all[j].x == all[i].x; ++j) {
      sum += all[j].elevation;
    }
    points_.push_back({all[i].x, sum / static_cast<double>(j - i)});
    i = j;
  }
}

double Ground::at(double x) const {
  if (points_.empty()) {
    return 0.0;
  }
  const auto right = std::lower_bound(points_.begin(), points_.end(), x,
                                      [](const Geophone& p, double value) { return p.x < value; });
  if (right == points_.begin()) {
    return points_.front().elevation;
  }
  if (right == points_.end()) {
    return points_.back().elevation;
  }
  const auto left = right - 1;
  const double f = (x - left->x) / (right->x - left->x);
  return left->elevation + f * (right->elevation - left->elevation);
}

}  // namespace strikeplate
