#include "core/section/eikonal.h"

#include <algorithm>
#include <array>
#include <cassert>
#include <cmath>
#include <cstdint>
#include <functional>
#include <limits>
#include <utility>

#include <queue>

namespace strikeplate {

namespace {

constexpr double kFar = std::numeric_limits<double>::infinity();

/// The upwind side of a node along one axis: steps to the earlier neighbour, and what is known there.
struct Upwind {
  bool known = false;
  bool secondKnown = false;
  int towards = 0;  ///< -1 or +1, index step to the earlier neighbour
  double time = kFar;
  double factor = 0.0;
  double secondFactor = 0.0;
};

/// Along one axis the time grows away from the upwind neighbour at the rate rise * tau - drop.
struct AxisTerm {
  double rise = 0.0;
  double drop = 0.0;
};

class Marcher {
 public:
  Marcher(const SlownessGrid& medium, double x, double elevation)
      : medium_(medium),
        grid_(medium.grid),
        sourceX_(x),
        sourceElevation_(elevation),
        sourceSlowness_(slownessAt(medium, x, elevation)),
        field_(grid_, x, elevation, sourceSlowness_),
        time_(grid_.size(), kFar),
        done_(grid_.size(), 0) {}

  TimeField march() {
    start();
    while (!front_.empty()) {
      const auto [time, node] = front_.top();
      front_.pop();
      if (done_[node] != 0 || time > time_[node])
        continue;
      done_[node] = 1;
      const int row = static_cast<int>(node / static_cast<std::size_t>(grid_.columns));
      const int column = static_cast<int>(node % static_cast<std::size_t>(grid_.columns));
      constexpr std::array<std::pair<int, int>, 4> kNeighbours{{{-1, 0}, {1, 0}, {0, -1}, {0, 1}}};
      for (const auto& [di, dj] : kNeighbours)
        update(column + di, row + dj);
    }
    return std::move(field_);
  }

 private:
  static double slownessAt(const SlownessGrid& medium, double x, double elevation) {
    const PlaneGrid& g = medium.grid;
    const double u = std::clamp((x - g.x0) / g.spacing, 0.0, g.columns - 1.0);
    const double v = std::clamp((g.top - elevation) / g.spacing, 0.0, g.rows - 1.0);
    const int i = std::min(static_cast<int>(u), g.columns - 2);
    const int j = std::min(static_cast<int>(v), g.rows - 2);
    const double a = u - i;
    const double b = v - j;
    return (1 - a) * (1 - b) * medium.slowness[g.at(i, j)] + a * (1 - b) * medium.slowness[g.at(i + 1, j)] +
           (1 - a) * b * medium.slowness[g.at(i, j + 1)] + a * b * medium.slowness[g.at(i + 1, j + 1)];
  }

  /// Nodes within three steps of the source get the slowness along the straight path, by Simpson's rule.
  void start() {
    const double reach = 3.0001 * grid_.spacing;
    for (int j = 0; j < grid_.rows; ++j) {
      const double elevation = grid_.elevationOf(j);
      if (std::abs(elevation - sourceElevation_) > reach)
        continue;
      for (int i = 0; i < grid_.columns; ++i) {
        const double x = grid_.xOf(i);
        if (std::hypot(x - sourceX_, elevation - sourceElevation_) > reach)
          continue;
        const std::size_t node = grid_.at(i, j);
        const double middle = slownessAt(medium_, 0.5 * (x + sourceX_), 0.5 * (elevation + sourceElevation_));
        const double factor = (1.0 + (4.0 * middle + medium_.slowness[node]) / sourceSlowness_) / 6.0;
        accept(node, factor * field_.straightTime(x, elevation), factor);
      }
    }
  }

  void accept(std::size_t node, double time, double factor) {
    time_[node] = time;
    field_.factor[node] = factor;
    front_.emplace(time, node);
  }

  [[nodiscard]] Upwind upwind(int i, int j, bool horizontal) const {
    Upwind best;
    for (const int step : {-1, 1}) {
      const int ni = horizontal ? i + step : i;
      const int nj = horizontal ? j : j + step;
      if (!settled(ni, nj))
        continue;
      const std::size_t n = grid_.at(ni, nj);
      if (time_[n] >= best.time)
        continue;
      best = {true, false, step, time_[n], field_.factor[n], 0.0};
      const int mi = horizontal ? ni + step : ni;
      const int mj = horizontal ? nj : nj + step;
      if (settled(mi, mj) && time_[grid_.at(mi, mj)] <= time_[n] && smooth(grid_.at(i, j), grid_.at(mi, mj))) {
        best.secondKnown = true;
        best.secondFactor = field_.factor[grid_.at(mi, mj)];
      }
    }
    return best;
  }

  /// Second differences reach over an interface only at the price of a wrong time.
  [[nodiscard]] bool smooth(std::size_t a, std::size_t b) const {
    return std::abs(medium_.slowness[a] - medium_.slowness[b]) < 0.2 * medium_.slowness[a];
  }

  [[nodiscard]] bool settled(int i, int j) const {
    return i >= 0 && j >= 0 && i < grid_.columns && j < grid_.rows && done_[grid_.at(i, j)] != 0;
  }

  /// slope: derivative of s0 * distance along the axis, counted in the direction of growing index, s/m.
  [[nodiscard]] AxisTerm term(const Upwind& up, double straight, double slope, bool secondOrder) const {
    if (!up.known)
      return {};  // later on both sides: the time is least here
    const double away = -up.towards * slope;
    const double perStep = straight / grid_.spacing;
    if (secondOrder && up.secondKnown) {
      return {1.5 * perStep + away, perStep * (2.0 * up.factor - 0.5 * up.secondFactor)};
    }
    return {perStep + away, perStep * up.factor};
  }

  void update(int i, int j) {
    if (i < 0 || j < 0 || i >= grid_.columns || j >= grid_.rows)
      return;
    const std::size_t node = grid_.at(i, j);
    if (done_[node] != 0)
      return;
    const double dx = grid_.xOf(i) - sourceX_;
    const double down = sourceElevation_ - grid_.elevationOf(j);
    const double distance = std::hypot(dx, down);
    if (distance <= 0.0)
      return;
    const double straight = sourceSlowness_ * distance;
    const double slowness = medium_.slowness[node];
    const Upwind h = upwind(i, j, true);
    const Upwind v = upwind(i, j, false);
    const double slopeX = sourceSlowness_ * dx / distance;
    const double slopeDown = sourceSlowness_ * down / distance;
    double time = kFar;
    for (const bool second : {true, false}) {
      const AxisTerm a = term(h, straight, slopeX, second);
      const AxisTerm b = term(v, straight, slopeDown, second);
      time = straight * larger(a, b, slowness);
      if (time >= std::max(h.known ? h.time : 0.0, v.known ? v.time : 0.0))
        break;
      time = kFar;
    }
    // No upwind solution: along the grid line from the earlier neighbour, which is a true path and so an upper bound.
    if (!(time < kFar))
      time = std::min(h.time, v.time) + slowness * grid_.spacing;
    if (time < time_[node])
      accept(node, time, time / straight);
  }

  /// The larger tau of (a.rise tau - a.drop)^2 + (b.rise tau - b.drop)^2 = slowness^2; NaN when there is none.
  static double larger(const AxisTerm& a, const AxisTerm& b, double slowness) {
    const double p = a.rise * a.rise + b.rise * b.rise;
    const double q = a.rise * a.drop + b.rise * b.drop;
    const double r = a.drop * a.drop + b.drop * b.drop - slowness * slowness;
    return (q + std::sqrt(q * q - p * r)) / p;
  }

  using Entry = std::pair<double, std::size_t>;

  const SlownessGrid& medium_;
  const PlaneGrid grid_;
  double sourceX_;
  double sourceElevation_;
  double sourceSlowness_;
  TimeField field_;
  std::vector<double> time_;
  std::vector<std::uint8_t> done_;
  std::priority_queue<Entry, std::vector<Entry>, std::greater<>> front_;
};

}  // namespace

bool PlaneGrid::holds(double x, double elevation) const {
  const double tolerance = 1e-9 * spacing;
  return x >= x0 - tolerance && x <= xOf(columns - 1) + tolerance && elevation <= top + tolerance &&
         elevation >= elevationOf(rows - 1) - tolerance;
}

TimeField::TimeField(PlaneGrid grid, double sourceX, double sourceElevation, double sourceSlowness)
    : factor(grid.size(), 1.0),
      grid_(grid),
      sourceX_(sourceX),
      sourceElevation_(sourceElevation),
      sourceSlowness_(sourceSlowness) {}

double TimeField::straightTime(double x, double elevation) const {
  return sourceSlowness_ * std::hypot(x - sourceX_, elevation - sourceElevation_);
}

double TimeField::atNode(int column, int row) const {
  return factor[grid_.at(column, row)] * straightTime(grid_.xOf(column), grid_.elevationOf(row));
}

double TimeField::at(double x, double elevation) const {
  assert(grid_.holds(x, elevation));
  const double u = std::clamp((x - grid_.x0) / grid_.spacing, 0.0, grid_.columns - 1.0);
  const double v = std::clamp((grid_.top - elevation) / grid_.spacing, 0.0, grid_.rows - 1.0);
  const int i = std::min(static_cast<int>(u), grid_.columns - 2);
  const int j = std::min(static_cast<int>(v), grid_.rows - 2);
  const double a = u - i;
  const double b = v - j;
  const double tau = (1 - a) * (1 - b) * factor[grid_.at(i, j)] + a * (1 - b) * factor[grid_.at(i + 1, j)] +
                     (1 - a) * b * factor[grid_.at(i, j + 1)] + a * b * factor[grid_.at(i + 1, j + 1)];
  return tau * straightTime(x, elevation);
}

TimeField firstArrivals(const SlownessGrid& medium, double sourceX, double sourceElevation) {
  assert(medium.slowness.size() == medium.grid.size() && medium.grid.holds(sourceX, sourceElevation));
  return Marcher(medium, sourceX, sourceElevation).march();
}

}  // namespace strikeplate
