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

/// Slowness at the nodes of `grid`. Each node holds the mean slowness of the ground within half a step above and
/// below, so that vertical times across an interface between nodes are right. Above the ground the first layer goes
/// on for two steps, for times at points between nodes; higher up `airVelocity` (m/s) holds, which must be slow
/// enough that no first arrival runs there.
SlownessGrid layeredSlowness(const LayeredGround& ground, const PlaneGrid& grid, double airVelocity = 20.0);

}  // namespace strikeplate
