#pragma once

#include <functional>
#include <vector>

#include "core/section/eikonal.h"

namespace strikeplate {

/// A layered ground for grids. All functions are of x in m and must hold over the whole grid.
struct LayeredGround {
  std::function<double(double)> ground;                   ///< elevation of the surface, m
  std::vector<std::function<double(double)>> interfaces;  ///< elevations, m, from the top; one fewer than layers
  /// P velocity, m/s, of layer n (from 0) at x and a depth in m below that layer's top.
  std::function<double(int layer, double x, double depth)> velocity;
  int layers = 1;  ///< number of layers that are there; deeper ones are left out as if the top of them were
                   ///< infinitely deep (interfaces.size() >= layers - 1)
};

/// Slowness at the nodes of `grid`. Each node stands for the ground within half a step above and below: where an
/// interface crosses that, its vertical slowness is the mean of both sides' for a ray critical in the faster one (own
/// derivation, no source), so that head waves are on time wherever the interface lies between nodes. Above the ground
/// the first layer goes on for two steps, for times at points between nodes; higher up `airVelocity` (m/s) holds,
/// which must be slow enough that no first arrival runs there.
SlownessGrid layeredSlowness(const LayeredGround& ground, const PlaneGrid& grid, double airVelocity = 20.0);

}  // namespace strikeplate
