#pragma once

#include <vector>

#include "core/traveltime/arrivals.h"

namespace strikeplate {

/// A first guess: straight travel-time branches common to all shots, T = min over layers of intercept + slope *
/// offset, and the layer of each arrival that goes with it.
struct LineStart {
  std::vector<double> intercept;  ///< s, for each layer; 0 for the first
  std::vector<double> slope;      ///< s/m, falling
  std::vector<int> labels;        ///< for each arrival
  double cost = 0.0;              ///< robust misfit, smaller is better

  [[nodiscard]] std::vector<double> logVelocities() const;
  /// Depths (m) of the interfaces under level ground with flat layers, by stripping (Ewing, Woollard & Vine 1939);
  /// at least `least` m for each layer.
  [[nodiscard]] std::vector<double> depths(double least) const;
};

/// Distinct guesses for so many layers, best first, at most `most`; none when the times do not bend that often.
/// Arrivals whose layer is set by hand keep it. Needs finite times and sigma > 0.
std::vector<LineStart> lineStarts(const TravelTimes& times, int layers, int most);

/// The same guess with its crossover offsets moved by a factor.
LineStart withCrossoversMoved(const TravelTimes& times, const LineStart& start, double factor);

}  // namespace strikeplate
