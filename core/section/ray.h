#pragma once

#include <array>
#include <limits>
#include <vector>

#include "core/section/hull.h"
#include "core/section/model.h"

namespace strikeplate {

/// A way from a shot to a geophone along the top of layer `refractor` + 1.
///
/// down[i - 1] and up[i - 1] say where the shot's and the geophone's leg cross interface i, in node units; between
/// the two lowest crossings the way bends at the nodes `bends`, in order from shot to geophone.
struct HeadWave {
  int refractor = 1;  ///< interface along which it runs
  double time = std::numeric_limits<double>::infinity();
  std::array<double, kMostLayers - 1> down{};
  std::array<double, kMostLayers - 1> up{};
  std::vector<int> bends;
};

/// Point of interface k at node coordinate c.
SectionPoint onInterface(const SectionModel& model, int k, double c);

/// Moves the crossings of a way found over nodes to where Fermat's principle has them on the interfaces, straight
/// between nodes: Newton's method on each crossing in turn, the others held, until none moves. Sets the time and the
/// bends. Needs down and up at the nodes of the shortest way over nodes.
void refineHeadWave(const SectionModel& model, const HullTable& hull, SectionPoint shot, SectionPoint geophone,
                    HeadWave& wave);

}  // namespace strikeplate
