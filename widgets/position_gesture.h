#pragma once

#include <optional>

#include <QPointF>

#include "widgets/position_range.h"

class QWheelEvent;

namespace strikeplate {

/// Zoom and pan of the shared position axis by wheel and drag, the same in every pane that has the axis: the wheel
/// zooms about the pointer; Shift with the wheel, or a wheel that goes sideways, pans; a drag with the middle button
/// pans, and with the left one too where the pane allows it.
class PositionGesture {
 public:
  /// Where the axis lies on the widget, px.
  struct Axis {
    double left = 0.0, width = 1.0;
    PositionRange range, whole;
    [[nodiscard]] double metresPerPixel() const { return range.width() / width; }
    [[nodiscard]] double at(double pixel) const { return range.left + (pixel - left) * metresPerPixel(); }
  };

  /// What the wheel asks for.
  static PositionRange wheel(const QWheelEvent& event, const Axis& axis);

  void press(const QPointF& position, const Axis& axis);
  /// What the drag asks for; nothing before it has gone far enough to be one.
  std::optional<PositionRange> move(const QPointF& position);
  /// Ends the drag; true when it was one, so that it is not taken for a click.
  bool release();
  [[nodiscard]] bool pressed() const { return atPress_.has_value(); }
  /// What was shown before the drag, which ends here.
  std::optional<PositionRange> abandon();

 private:
  std::optional<Axis> atPress_;
  QPointF press_;
  bool dragging_ = false;
};

}  // namespace strikeplate
