// What pointer, wheel and keys do on the line strip.
#include <algorithm>
#include <cmath>

#include <QApplication>
#include <QKeyEvent>
#include <QMouseEvent>

#include "core/base/units.h"
#include "widgets/line_strip.h"

namespace strikeplate {

void LineStrip::wantRange(const PositionRange& range) {
  emit positionRangeWanted(range.left, range.right);
}

void LineStrip::wheelEvent(QWheelEvent* event) {
  if (!empty()) {
    wantRange(PositionGesture::wheel(*event, axis()));
  }
  event->accept();
}

void LineStrip::mousePressEvent(QMouseEvent* event) {
  setFocus(Qt::MouseFocusReason);
  if (empty() || drag_ || gesture_.pressed()) {
    return;
  }
  const Target target = targetAt(event->position());
  if (event->button() == Qt::LeftButton && target.shot >= 0 &&
      range_.left <= shots_[static_cast<std::size_t>(target.shot)].point.x &&
      shots_[static_cast<std::size_t>(target.shot)].point.x <= range_.right) {
    drag_ = Drag{scene_.survey, target.shot, event->position(), false,
                 shots_[static_cast<std::size_t>(target.shot)].point};
  } else if (event->button() == Qt::LeftButton || event->button() == Qt::MiddleButton) {
    gesture_.press(event->position(), axis());
  }
}

void LineStrip::mouseMoveEvent(QMouseEvent* event) {
  if (empty()) {
    return;
  }
  if (drag_) {
    dragShot(*event);
    return;
  }
  if (const auto wanted = gesture_.move(event->position())) {
    wantRange(*wanted);
    return;
  }
  emit plumbLineWanted(axis().at(event->position().x()));
  emit hint(wordsAt(event->position()));
}

void LineStrip::dragShot(const QMouseEvent& event) {
  const QPointF away = event.position() - drag_->press;
  drag_->moved = drag_->moved || std::abs(away.x()) >= QApplication::startDragDistance();
  if (!drag_->moved) {
    return;
  }
  const Units units{drag_->survey->settings.feet};
  const double perPixel = axis().metresPerPixel();
  const bool free = event.modifiers().testFlag(Qt::AltModifier);
  const double step = free ? 0.01 : niceStep(units.fromMetres(perPixel));
  const double before = drag_->survey->shots[static_cast<std::size_t>(drag_->shot)].point.x;
  const ShotPoint point =
      draggedPoint(*drag_->survey, drag_->shot, before + away.x() * perPixel, free ? 0.0 : 3.0 * perPixel, step);
  if (point != drag_->point) {
    drag_->point = point;
    proposeDrag(Phase::Live);
  }
  emit plumbLineWanted(point.x);
  emit hint(tr("Shot %1 to %2; Escape leaves it where it was")
                .arg(drag_->shot + 1)
                .arg(QString::fromStdString(units.length(point.x, 2))));
}

void LineStrip::proposeDrag(Phase phase) {
  emit proposed(edits::setShotPoint(*drag_->survey, drag_->shot, drag_->point), phase);
  selectShot(indexAfterMove(*drag_->survey, drag_->shot, drag_->point.x));
}

void LineStrip::mouseReleaseEvent(QMouseEvent* event) {
  if (drag_ && event->button() == Qt::LeftButton) {
    const int shot = drag_->shot;
    const bool moves = drag_->moved && drag_->point != drag_->survey->shots[static_cast<std::size_t>(shot)].point;
    if (moves) {
      proposeDrag(Phase::Commit);
    } else if (drag_->moved) {
      abandon();
    } else {
      selectShot(shot);
    }
    drag_.reset();
  } else if (gesture_.pressed() && !gesture_.release() && event->button() == Qt::LeftButton) {
    click(event->position());
  }
}

void LineStrip::click(const QPointF& position) {
  const Target target = targetAt(position);
  if (target.shot >= 0) {
    const double x = shots_[static_cast<std::size_t>(target.shot)].point.x;
    wantRange({x - 0.5 * range_.width(), x + 0.5 * range_.width()});
    selectShot(target.shot);
  } else if (target.geophone >= 0) {
    const int trace = traceAt(*scene_.survey, scene_.selection.shot, target.geophone);
    emit plumbLineWanted(scene_.survey->geophones[static_cast<std::size_t>(target.geophone)].x);
    if (trace >= 0) {
      emit selectionWanted({scene_.selection.shot, trace, scene_.selection.layer});
    }
  }
}

void LineStrip::mouseDoubleClickEvent(QMouseEvent* event) {
  if (!empty() && targetAt(event->position()).shot < 0) {
    wantRange(wholeLine(*scene_.survey));
  }
}

void LineStrip::selectShot(int shot) {
  if (shot != scene_.selection.shot) {
    emit selectionWanted({shot, -1, scene_.selection.layer});
  }
}

void LineStrip::leaveEvent(QEvent* event) {
  emit plumbLineWanted(Estimate::kNaN);
  emit hint(QString());
  View::leaveEvent(event);
}

void LineStrip::abandon() {
  const int shot = drag_->shot;
  const bool moved = drag_->moved;
  const std::shared_ptr<const Survey> survey = drag_->survey;
  drag_.reset();
  if (moved) {
    emit proposed(edits::setShotPoint(*survey, shot, survey->shots[static_cast<std::size_t>(shot)].point),
                  Phase::Abandon);
    selectShot(shot);
    emit hint(tr("Shot %1 stays where it was").arg(shot + 1));
  }
}

void LineStrip::keyPressEvent(QKeyEvent* event) {
  const int last = empty() ? -1 : static_cast<int>(shots_.size()) - 1;
  const int shot = scene_.selection.shot;
  if (event->key() == Qt::Key_Escape && drag_) {
    abandon();
  } else if (event->key() == Qt::Key_Escape && gesture_.pressed()) {
    wantRange(*gesture_.abandon());
  } else if (last < 0) {
    View::keyPressEvent(event);
  } else if (event->key() == Qt::Key_Left) {
    selectShot(std::clamp(shot - 1, 0, last));
  } else if (event->key() == Qt::Key_Right) {
    selectShot(std::clamp(shot + 1, 0, last));
  } else if (event->key() == Qt::Key_Home) {
    selectShot(0);
  } else if (event->key() == Qt::Key_End) {
    selectShot(last);
  } else {
    View::keyPressEvent(event);
  }
}

}  // namespace strikeplate
