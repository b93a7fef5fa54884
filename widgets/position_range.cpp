#include "widgets/position_range.h"

#include <algorithm>
#include <cmath>
#include <limits>

namespace strikeplate {

PositionRange wholeLine(const Survey& survey) {
  double left = std::numeric_limits<double>::infinity();
  double right = -left;
  const auto take = [&](double x) {
    left = std::min(left, x);
    right = std::max(right, x);
  };
  for (const Geophone& geophone : survey.geophones) {
    take(geophone.x);
  }
  for (const Shot& shot : survey.shots) {
    take(shot.point.x);
  }
  for (const Borehole& hole : survey.boreholes) {
    take(hole.x);
  }
  if (!(left <= right)) {
    return {};
  }
  const double edge = std::max(0.03 * (right - left), 0.5);
  return {left - edge, right + edge};
}

PositionRange panned(const PositionRange& range, double step, const PositionRange& whole) {
  // At least a tenth of the pane still shows the line.
  const double keep = 0.1 * range.width();
  const double least = whole.left + keep - range.right;
  const double most = whole.right - keep - range.left;
  const double moved = std::clamp(step, std::min(least, most), std::max(least, most));
  return {range.left + moved, range.right + moved};
}

PositionRange zoomed(const PositionRange& range, double about, double factor, const PositionRange& whole) {
  const double width = std::clamp(range.width() * factor, 1.0, std::max(4.0 * whole.width(), 1.0));
  const double share = (about - range.left) / range.width();
  const double left = about - share * width;
  return panned({left, left + width}, 0.0, whole);
}

double niceStep(double least) {
  const double decade = std::pow(10.0, std::floor(std::log10(least)));
  for (const double factor : {1.0, 2.0, 5.0}) {
    if (factor * decade >= least * (1.0 - 1e-9)) {
      return factor * decade;
    }
  }
  return 10.0 * decade;
}

double positionTickStep(double perPixel, double textHeight) {
  constexpr double kTextHeights = 5.0;  // room for "-1000" and as much beside it
  return niceStep(std::max(perPixel, 1e-6) * kTextHeights * textHeight);
}

}  // namespace strikeplate
