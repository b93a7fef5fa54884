#pragma once

namespace strikeplate {

/// A first break as found on a trace.
struct Onset {
  double time = 0.0;        ///< s, recorder time (no trigger correction)
  double sigma = 0.0;       ///< s, one standard deviation, > 0
  double confidence = 0.0;  ///< 0 to 1: how sure it is that this is the first break at all
  bool operator==(const Onset&) const = default;
};

}  // namespace strikeplate
