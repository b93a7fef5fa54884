#pragma once

#include <vector>

#include <QString>

#include "widgets/position_range.h"
#include "widgets/scene.h"

namespace strikeplate {

/// One shot as the line strip shows it.
struct StripShot {
  ShotPoint point;
  int traces = 0;  ///< live ones
  int picks = 0;   ///< of the live ones
  int doubts = 0;  ///< that name this shot
  /// Share of its live traces that are picked, 0 to 1.
  [[nodiscard]] double picked() const { return traces > 0 ? static_cast<double>(picks) / traces : 0.0; }
};

/// What the line strip shows of every shot, in the survey's order.
std::vector<StripShot> stripShots(const Scene& scene);

/// "Shot 3 at 24.0 m, 0.5 m deep: 23 of 24 traces picked, 2 doubts".
QString shotWords(const Scene& scene, int shot);
/// "Geophone 7 at 12.0 m, elevation 101.2 m: trace 7 of shot 3, picked".
QString geophoneWords(const Scene& scene, int geophone);

/// The trace of a shot that stands at a geophone, or -1.
int traceAt(const Survey& survey, int shot, int geophone);

/// The place that a shot dragged to x (m) takes: that of a geophone within `reach` m, else x rounded to
/// `step` (m or ft, as the survey has it); its elevation stays as far above the ground as it was.
ShotPoint draggedPoint(const Survey& survey, int shot, double x, double reach, double step);

/// The index that the shot has after its edit, for a shot that passes others changes places with them.
int indexAfterMove(const Survey& survey, int shot, double x);

}  // namespace strikeplate
