#pragma once

#include "core/survey/survey.h"

namespace strikeplate {

/// The part of the line that the panes show, m.
struct PositionRange {
  double left = 0.0, right = 100.0;
  [[nodiscard]] double width() const { return right - left; }
  bool operator==(const PositionRange&) const = default;
};

/// All geophones, shots and boreholes with a little room at both ends; 0 to 100 m for a survey without any.
PositionRange wholeLine(const Survey& survey);

/// `range` made narrower (factor < 1) or wider about the position `about` (m), which stays where it is on the screen.
/// Never narrower than 1 m, never more than four times the whole line, never so far aside that the line is lost.
PositionRange zoomed(const PositionRange& range, double about, double factor, const PositionRange& whole);

/// `range` moved by `step` m, but never so far that nothing of the line is in it.
PositionRange panned(const PositionRange& range, double step, const PositionRange& whole);

/// The least 1, 2 or 5 times a power of ten that is no less than `least` (> 0).
double niceStep(double least);

/// Distance of the figures on the position axis, the same in every pane: units per pixel and height of the text in
/// px.
double positionTickStep(double perPixel, double textHeight);

}  // namespace strikeplate
