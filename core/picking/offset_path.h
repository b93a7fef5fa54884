#pragma once

#include <cstddef>
#include <vector>

namespace strikeplate {

/// What the traces on one side of a shot say about their first breaks, nearest first, each on
/// equally many positions in time.
struct PathEvidence {
  double step = 0.0;                             ///< s between positions
  std::vector<double> origins;                   ///< s, recorder time of each trace's position 0
  std::vector<double> offsets;                   ///< m, not falling
  std::vector<std::vector<double>> logEvidence;  ///< [trace][position], any constant per trace
  bool rigid = false;  ///< the path bends one way: slowness keeps or falls and stays positive, no trace lies off it
};

/// Probability of each position for each trace, given all traces of the side: a path along offset whose slowness is
/// physical (-1/2500 to 1/150 s/m), mostly keeps or falls, rarely jumps, with a little freedom in time at each trace.
///
/// Forward-backward over states (time, slowness); Rabiner 1989, Proc. IEEE 77, 257-286. Each row adds to 1.
std::vector<std::vector<double>> pathPosterior(const PathEvidence& evidence);

}  // namespace strikeplate
