#include "core/section/layered_grid.h"

#include <algorithm>
#include <cassert>
#include <cmath>
#include <limits>
#include <utility>

namespace strikeplate {

namespace {

/// Elevations of the tops of all layers at one x; an interface above the one over it is held down to it.
std::vector<double> topsAt(const LayeredGround& ground, double x) {
  std::vector<double> tops{ground.ground(x)};
  for (int n = 1; n < ground.layers; ++n) {
    tops.push_back(std::min(tops.back(), ground.interfaces[static_cast<std::size_t>(n - 1)](x)));
  }
  return tops;
}

/// Slowness that stands for the ground between two elevations of one column, the part above the surface counted as
/// the first layer: the vertical slowness of a ray critical in the fastest part is kept in the mean, so that a head
/// wave that leaves an interface between nodes is on time.
double meanSlowness(const LayeredGround& ground, const std::vector<double>& tops, double x, double high, double low) {
  std::vector<std::pair<double, double>> parts;  // share of the height, slowness
  double least = std::numeric_limits<double>::infinity();
  for (int n = 0; n < ground.layers; ++n) {
    const auto k = static_cast<std::size_t>(n);
    const double upper = n == 0 ? high : std::min(high, tops[k]);
    const double lower = n + 1 < ground.layers ? std::max(low, tops[k + 1]) : low;
    if (!(upper > lower))
      continue;
    const double middle = std::max(0.0, tops[k] - 0.5 * (upper + lower));
    parts.emplace_back((upper - lower) / (high - low), 1.0 / ground.velocity(n, x, middle));
    least = std::min(least, parts.back().second);
  }
  double vertical = 0.0;
  for (const auto& [share, slowness] : parts)
    vertical += share * std::sqrt(slowness * slowness - least * least);
  return std::hypot(least, vertical);
}

}  // namespace

SlownessGrid layeredSlowness(const LayeredGround& ground, const PlaneGrid& grid, double airVelocity) {
  assert(ground.layers >= 1 && ground.interfaces.size() + 1 >= static_cast<std::size_t>(ground.layers));
  assert(grid.columns >= 3 && grid.rows >= 3 && grid.spacing > 0.0 && airVelocity > 0.0);
  SlownessGrid medium{grid, std::vector<double>(grid.size())};
  for (int i = 0; i < grid.columns; ++i) {
    const double x = grid.xOf(i);
    const std::vector<double> tops = topsAt(ground, x);
    for (int j = 0; j < grid.rows; ++j) {
      const double z = grid.elevationOf(j);
      const bool air = z > tops.front() + 2.0001 * grid.spacing;
      medium.slowness[grid.at(i, j)] =
          air ? 1.0 / airVelocity : meanSlowness(ground, tops, x, z + 0.5 * grid.spacing, z - 0.5 * grid.spacing);
    }
  }
  return medium;
}

}  // namespace strikeplate
