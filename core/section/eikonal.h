#pragma once

#include <cstddef>
#include <vector>

namespace strikeplate {

/// A regular grid in the vertical plane of the line: column i at x0 + i h, row j at elevation top - j h, all in m.
struct PlaneGrid {
  double x0 = 0.0;
  double top = 0.0;
  double spacing = 1.0;  ///< h, > 0
  int columns = 0;       ///< at least 3
  int rows = 0;          ///< at least 3

  [[nodiscard]] double xOf(int column) const { return x0 + column * spacing; }
  [[nodiscard]] double elevationOf(int row) const { return top - row * spacing; }
  [[nodiscard]] std::size_t at(int column, int row) const {
    return static_cast<std::size_t>(row) * static_cast<std::size_t>(columns) + static_cast<std::size_t>(column);
  }
  [[nodiscard]] std::size_t size() const {
    return static_cast<std::size_t>(rows) * static_cast<std::size_t>(columns);
  }
  /// Whether the point lies in the grid, edges included.
  [[nodiscard]] bool holds(double x, double elevation) const;
};

/// Slowness, s/m, > 0 and finite, at each node of a grid (index PlaneGrid::at).
struct SlownessGrid {
  PlaneGrid grid;
  std::vector<double> slowness;
};

/// First-arrival times from one point to every node, kept as the factor tau of time = tau * s0 * distance, which is
/// smooth at the source where the time itself is not.
class TimeField {
 public:
  TimeField(PlaneGrid grid, double sourceX, double sourceElevation, double sourceSlowness);

  /// Time in s at a point of the grid (bilinear in the factor); needs grid().holds(x, elevation).
  [[nodiscard]] double at(double x, double elevation) const;
  /// Time in s at a node.
  [[nodiscard]] double atNode(int column, int row) const;
  [[nodiscard]] const PlaneGrid& grid() const { return grid_; }

  /// s0 * distance from the source, s.
  [[nodiscard]] double straightTime(double x, double elevation) const;
  std::vector<double> factor;  ///< tau at each node, 1 in a uniform medium

 private:
  PlaneGrid grid_;
  double sourceX_;
  double sourceElevation_;
  double sourceSlowness_;
};

/// First arrivals from a point source in a grid of slownesses, by fast marching on the factored eikonal equation with
/// second-order upwind differences (first order where an upwind neighbour is missing).
///
/// The source need not be a node, but must lie in the grid. Cost: O(n log n) for n nodes.
/// Accuracy, measured in the tests: within 0.1 % of the exact times of a linear gradient (400 m/s + 40 /s, 0.25 m)
/// and within 0.15 % of those of two layers (1/80 of the depth, wherever the interface lies between nodes). Sources:
/// Sethian, Proc. Natl. Acad. Sci. 93 (1996) 1591-1595 (fast marching); Fomel, Luo & Zhao, J. Comput. Phys. 228
/// (2009) 6440-6455 (factored equation); Treister & Haber, J. Comput. Phys. 324 (2016) 210-225 (both together, second
/// order).
TimeField firstArrivals(const SlownessGrid& medium, double sourceX, double sourceElevation);

}  // namespace strikeplate
