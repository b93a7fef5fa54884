#pragma once

#include <vector>

#include "core/traveltime/arrivals.h"

namespace strikeplate {

/// First-arrival times of one pair of shots, read at each other's place; equal where nothing is wrong (reciprocity).
struct ReciprocalPair {
  int shotA = 0, shotB = 0;  ///< indices into the shots, A before B
  double timeAB = 0.0;       ///< s, shot A read at shot B
  double timeBA = 0.0;       ///< s, shot B read at shot A
  double tolerance = 0.0;    ///< s, 95 % of the difference, from the picks' sigmas
  [[nodiscard]] double difference() const { return timeAB - timeBA; }
};

/// All pairs of shots whose picks reach each other's place. A time at a shot point is read off a weighted line
/// through the five picks nearest to it on the right side of the other shot; the nearest must lie within two geophone
/// spacings or a twentieth of the offset. Common practice, no source.
std::vector<ReciprocalPair> reciprocalPairs(const TravelTimes& times);

}  // namespace strikeplate
