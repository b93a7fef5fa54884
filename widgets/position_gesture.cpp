#include "widgets/position_gesture.h"

#include <cmath>

#include <QApplication>
#include <QWheelEvent>

namespace strikeplate {

PositionRange PositionGesture::wheel(const QWheelEvent& event, const Axis& axis) {
  // Qt turns a wheel with Alt sideways itself on some systems; Shift is what people try.
  const QPoint turn = event.angleDelta();
  const bool sideways = event.modifiers().testFlag(Qt::ShiftModifier) || std::abs(turn.x()) > std::abs(turn.y());
  constexpr double kNotch = 120.0;
  if (sideways) {
    const double notches = (turn.x() != 0 ? turn.x() : turn.y()) / kNotch;
    return panned(axis.range, -0.1 * notches * axis.range.width(), axis.whole);
  }
  return zoomed(axis.range, axis.at(event.position().x()), std::pow(0.8, turn.y() / kNotch), axis.whole);
}

void PositionGesture::press(const QPointF& position, const Axis& axis) {
  press_ = position;
  atPress_ = axis;
  dragging_ = false;
}

std::optional<PositionRange> PositionGesture::move(const QPointF& position) {
  if (!atPress_) {
    return std::nullopt;
  }
  const double pixels = position.x() - press_.x();
  dragging_ = dragging_ || std::abs(pixels) >= QApplication::startDragDistance();
  if (!dragging_) {
    return std::nullopt;
  }
  return panned(atPress_->range, -pixels * atPress_->metresPerPixel(), atPress_->whole);
}

bool PositionGesture::release() {
  const bool was = dragging_;
  atPress_.reset();
  dragging_ = false;
  return was;
}

std::optional<PositionRange> PositionGesture::abandon() {
  const std::optional<PositionRange> before = atPress_ ? std::optional(atPress_->range) : std::nullopt;
  release();
  return before;
}

}  // namespace strikeplate
