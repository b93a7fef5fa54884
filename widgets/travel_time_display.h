#pragma once

#include <set>

#include "core/survey/interpretation.h"
#include "widgets/scene.h"

namespace strikeplate {

/// How the travel-time plot shows the times.
struct TravelTimeDisplay {
  bool allShots = true;            ///< or the selected one and those kept in view
  std::set<int> kept;              ///< shots that stay in view beside the selected one
  bool fittedLines = true;         ///< of the selected shot, with velocity and intercept time
  bool marks = true;               ///< of the selected shot: crossover and critical distances, the user's marks
  bool predicted = true;           ///< the section's curves
  bool reciprocals = false;        ///< of the selected shot: its times and its partners' at each other's place
  bool residuals = false;          ///< pick minus section instead of times
  int side = 0;                    ///< +1 forward curves stand out, -1 reverse ones, 0 both alike
  double reductionVelocity = 0.0;  ///< m/s; times less offset over this velocity; 0 shows them as they are
  bool operator==(const TravelTimeDisplay&) const = default;

  [[nodiscard]] bool shows(int shot, const Selection& selection) const {
    return allShots || shot == selection.shot || kept.contains(shot);
  }
  /// ms by which a time at an offset (m) is lowered.
  [[nodiscard]] double reductionAt(double offset) const {
    return reductionVelocity > 0.0 ? 1e3 * offset / reductionVelocity : 0.0;
  }
};

/// Where an arrival stands on the time axis of a display, ms; NaN where it has no place.
double shownTime(const Interpretation& interpretation, int arrival, const TravelTimeDisplay& display);

}  // namespace strikeplate
