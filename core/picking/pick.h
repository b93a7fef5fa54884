#pragma once

namespace strikeplate {

/// How a pick came about.
enum class PickOrigin { Automatic, Hand, Imported };

/// A first break.
struct Pick {
  double time = 0.0;   ///< s, recorder time (DELAY + sample x interval), without the trigger correction
  double sigma = 0.0;  ///< s, one standard deviation, > 0
  int layer = 0;       ///< 1, 2, ... as assigned by hand; 0 leaves the assignment to the program
  PickOrigin origin = PickOrigin::Automatic;
  bool operator==(const Pick&) const = default;
};

}  // namespace strikeplate
