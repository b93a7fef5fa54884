#pragma once

#include <vector>

#include <QPolygonF>

#include "widgets/sheet_paper.h"

namespace strikeplate {

/// Round positions (1, 2 or 5 times a power of ten apart) from low to high, at most about `most` of them, with the
/// decimals their labels need. Empty when high is not above low.
struct SheetTicks {
  std::vector<double> at;
  int decimals = 0;
};
SheetTicks sheetTicks(double low, double high, int most);

/// A plot's area on paper, mm, and the span of numbers that it shows; y grows upwards where bottom is below top.
struct SheetFrame {
  QRectF area;
  double left = 0.0, right = 1.0;
  double bottom = 0.0, top = 1.0;

  [[nodiscard]] double x(double value) const { return area.left() + (value - left) / (right - left) * area.width(); }
  [[nodiscard]] double y(double value) const {
    return area.bottom() - (value - bottom) / (top - bottom) * area.height();
  }
  [[nodiscard]] QPointF at(double valueX, double valueY) const { return {x(valueX), y(valueY)}; }
};

/// The parts of a line through these points that lie within the area, each from edge to edge: not every device that
/// is painted on can clip. Source: Liang and Barsky, ACM Transactions on Graphics 3 (1984) 1-22.
std::vector<QPolygonF> lineWithin(const QPolygonF& points, const QRectF& area);

/// Room that the axes need beside the area, mm.
inline constexpr double kAxisLeft = 13.0;
inline constexpr double kAxisBottom = 8.5;

/// Grid, frame, tick labels and axis titles. Tick labels are values times `scaleX` and `scaleY`: ticks are round in
/// the user's unit.
struct SheetAxes {
  QString titleX, titleY;
  double scaleX = 1.0, scaleY = 1.0;
  double tickHeight = 8.0;  ///< mm that a tick at the left has at least for itself
};
void paintAxes(SheetPaper& paper, const SheetFrame& frame, const SheetAxes& axes);

}  // namespace strikeplate
