#pragma once

#include <optional>
#include <vector>

#include "core/traveltime/arrivals.h"

namespace strikeplate {

/// A first guess: straight travel-time branches common to all shots, and the layer of each arrival that goes with
/// them. T = min over layers of intercept + slope * offset + tilt * (x of shot + x of geophone - 2 * centre): delay
/// times that change linearly along the line stand for plane dipping interfaces.
struct LineStart {
  double centre = 0.0;            ///< m, middle of the line
  std::vector<double> intercept;  ///< s, for each layer; 0 for the first
  std::vector<double> slope;      ///< s/m, falling
  std::vector<double> tilt;       ///< s/m, 0 for the first
  std::vector<int> labels;        ///< for each arrival
  double cost = 0.0;              ///< robust misfit, smaller is better

  [[nodiscard]] std::vector<double> logVelocities() const;
  /// Depths (m) of the interfaces at position x by stripping as under flat layers (Ewing, Woollard & Vine 1939), at
  /// least `least` m for each layer.
  [[nodiscard]] std::vector<double> depths(double x, double least) const;
};

/// Distinct guesses for so many layers, best first, at most `most`; none when the times do not bend that often.
/// Arrivals whose layer is set by hand keep it. Needs finite times and sigma > 0.
std::vector<LineStart> lineStarts(const TravelTimes& times, int layers, int most);

/// The guess that goes with the layers already assigned to the arrivals; nothing when some have none, when they are
/// not of so many layers, or when their branches do not hold.
std::optional<LineStart> assignedStart(const TravelTimes& times, int layers);

/// The same guess with its crossover offsets moved by a factor.
LineStart withCrossoversMoved(const TravelTimes& times, const LineStart& start, double factor);

}  // namespace strikeplate
