#pragma once

#include <array>
#include <vector>

#include "core/section/ray.h"

namespace strikeplate {

/// Least times (s) from each station down to the nodes of one interface within reach of it, crossing the interfaces
/// above at nodes.
struct Descent {
  struct Window {
    int first = 0;             ///< node of time[0]
    std::vector<double> time;  ///< s
    std::vector<int> from;     ///< node of the interface above that the way crosses; empty for interface 1
  };
  std::vector<Window> windows;  ///< one for each station
};

/// Descents to interfaces 1, 2, ... of the model, in this order.
std::vector<Descent> descend(const SectionModel& model, const std::vector<SectionPoint>& stations);

/// Crossings of interfaces 1 ... k of the way from a station to a node of interface k.
std::array<double, kMostLayers - 1> crossings(const std::vector<Descent>& descents, int k, int station, int node);

}  // namespace strikeplate
