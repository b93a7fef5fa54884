#pragma once

#include <functional>

namespace strikeplate {

/// How far a long computation is, and whether it is still wanted.
///
/// Called from the computing thread with a fraction from 0 to 1; returns false to ask the computation to stop early,
/// which then says in its result that it is unfinished. An empty function means "go on, nobody is watching".
using Progress = std::function<bool(double fraction)>;

/// Reports to `progress` if there is one; true when the work shall go on.
inline bool goOn(const Progress& progress, double fraction) {
  return !progress || progress(fraction);
}

}  // namespace strikeplate
