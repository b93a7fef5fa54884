#include "core/section/grid_check.h"

#include <algorithm>
#include <cassert>
#include <cmath>
#include <limits>

#include "core/base/numbers.h"
#include "core/section/layered_grid.h"

namespace strikeplate {

namespace {

constexpr double kNaN = std::numeric_limits<double>::quiet_NaN();
constexpr double kMostNodes = 2e7;

/// Straight between the points, level beyond the outermost ones.
double interpolate(const std::vector<double>& x, const std::vector<double>& y, double at) {
  if (at <= x.front())
    return y.front();
  if (at >= x.back())
    return y.back();
  const auto right = static_cast<std::size_t>(std::upper_bound(x.begin(), x.end(), at) - x.begin());
  const double share = (at - x[right - 1]) / (x[right] - x[right - 1]);
  return y[right - 1] + share * (y[right] - y[right - 1]);
}

LayeredGround groundOf(const Section& section) {
  LayeredGround ground;
  ground.layers = section.layers;
  ground.ground = [&section](double x) { return interpolate(section.x, section.ground, x); };
  for (const SectionInterface& interface : section.interfaces) {
    std::vector<double> elevation;
    for (const Estimate& e : interface.elevation)
      elevation.push_back(e.value);
    ground.interfaces.emplace_back([&section, elevation](double x) { return interpolate(section.x, elevation, x); });
  }
  ground.velocity = [&section](int layer, double x, double) {
    return interpolate(section.x, section.velocityAlong[static_cast<std::size_t>(layer)], x);
  };
  return ground;
}

/// A grid from a little above the highest ground to well below the deepest interface.
PlaneGrid gridOver(const TravelTimes& times, const Section& section, double spacing) {
  double left = section.x.front();
  double right = section.x.back();
  for (const ShotPoint& s : times.shots)
    left = std::min(left, s.x), right = std::max(right, s.x);
  for (const Geophone& g : times.geophones)
    left = std::min(left, g.x), right = std::max(right, g.x);
  double low = *std::min_element(section.ground.begin(), section.ground.end());
  for (const ShotPoint& s : times.shots)
    low = std::min(low, s.elevation - s.depth);
  for (const SectionInterface& interface : section.interfaces) {
    for (const Estimate& e : interface.elevation)
      low = std::min(low, e.value);
  }
  double high = *std::max_element(section.ground.begin(), section.ground.end());
  for (const Geophone& g : times.geophones)
    high = std::max(high, g.elevation);
  for (const ShotPoint& s : times.shots)
    high = std::max(high, s.elevation);
  const double below = std::max(1.0, 8.0 * spacing);
  PlaneGrid grid;
  grid.spacing = spacing;
  grid.x0 = left - 4.0 * spacing;
  grid.top = high + 4.0 * spacing;
  grid.columns = static_cast<int>(std::ceil((right - left) / spacing)) + 9;
  grid.rows = static_cast<int>(std::ceil((high - low + below) / spacing)) + 5;
  return grid;
}

void summarize(GridCheck& check) {
  double sum = 0.0;
  int count = 0;
  for (std::size_t i = 0; i < check.minusRays.size(); ++i) {
    const double d = check.minusRays[i];
    if (!std::isfinite(d))
      continue;
    sum += d * d;
    ++count;
    if (check.worstArrival < 0 || std::abs(d) > std::abs(check.worstMinusRays)) {
      check.worstMinusRays = d;
      check.worstArrival = static_cast<int>(i);
    }
  }
  if (count > 0)
    check.rmsMinusRays = std::sqrt(sum / count);
}

}  // namespace

Result<GridCheck> gridCheck(const TravelTimes& times, const Section& section, double spacing,
                            const Progress& progress) {
  if (!section.determined)
    return Failure{"There is no section to check on a grid: " + section.reason};
  if (!(spacing > 0.0))
    return Failure{"The grid check needs a spacing greater than zero."};
  assert(section.predicted.size() == times.arrivals.size());
  const double wide = section.x.back() - section.x.front();
  if (!(wide / spacing < kMostNodes))
    return Failure{"The grid check's spacing is too small for this line."};
  const PlaneGrid grid = gridOver(times, section, spacing);
  if (static_cast<double>(grid.columns) * grid.rows > kMostNodes) {
    return Failure{"A grid of " + fixed(spacing, 3) + " m is too fine for this line; take a wider spacing."};
  }
  const SlownessGrid medium = layeredSlowness(groundOf(section), grid);
  const std::size_t n = times.arrivals.size();
  GridCheck check;
  check.spacing = spacing;
  check.time.assign(n, kNaN);
  check.minusRays.assign(n, kNaN);
  check.minusPick.assign(n, kNaN);
  for (std::size_t s = 0; s < times.shots.size(); ++s) {
    if (!goOn(progress, static_cast<double>(s) / static_cast<double>(times.shots.size()))) {
      check.finished = false;
      break;
    }
    const ShotPoint& shot = times.shots[s];
    const TimeField field = firstArrivals(medium, shot.x, shot.elevation - shot.depth);
    for (std::size_t i = 0; i < n; ++i) {
      const Arrival& arrival = times.arrivals[i];
      if (static_cast<std::size_t>(arrival.shot) != s || !std::isfinite(section.predicted[i]))
        continue;
      const Geophone& geophone = times.geophones[static_cast<std::size_t>(arrival.geophone)];
      check.time[i] = field.at(geophone.x, geophone.elevation);
      check.minusRays[i] = check.time[i] - section.predicted[i];
      check.minusPick[i] = check.time[i] - arrival.time;
    }
  }
  summarize(check);
  return check;
}

}  // namespace strikeplate
