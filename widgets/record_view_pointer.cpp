// What the record view does at the pointer.
#include <cmath>

#include <QContextMenuEvent>
#include <QMenu>
#include <QMouseEvent>
#include <QWheelEvent>

#include "widgets/record_view.h"
#include "widgets/record_words.h"

namespace strikeplate {
namespace {

constexpr double kWheelZoom = 1.2;  // for one notch

bool isFree(const QMouseEvent& event) {
  // Some desktops keep Alt for moving windows.
  return (event.modifiers() & (Qt::AltModifier | Qt::ControlModifier)).toInt() != 0;
}

}  // namespace

QPointF RecordView::inPlot(const QPointF& at) const {
  const QRectF& plot = axes_.plot();
  return {std::clamp(at.x(), plot.left(), plot.right()), std::clamp(at.y(), plot.top(), plot.bottom())};
}

void RecordView::mousePressEvent(QMouseEvent* event) {
  finishNudge();
  if (gather() == nullptr) {
    return;
  }
  const QPointF at = event->position();
  if (event->button() == Qt::MiddleButton && !gesture_) {
    panFrom_ = at;
  } else if (event->button() == Qt::RightButton && gesture_) {
    abandon();
  }
  if (event->button() != Qt::LeftButton || gesture_ || !axes_.plot().contains(at)) {
    return;
  }
  const int trace = axes_.traceAt(at.x());
  if (event->modifiers().testFlag(Qt::ShiftModifier)) {
    marking_ = true;
    extendMarked(trace);
    return;
  }
  const RecordTarget target = targetAt(axes_, shot(), scene_.selection.trace, at);
  if (target.on == RecordTarget::On::Nothing) {
    return;
  }
  marked_ = {-1, -1};
  selectionAtPress_ = scene_.selection;
  live_ = false;
  gesture_.emplace(scene_, axes_, target, at);
  select(Selection{scene_.selection.shot, target.trace, picture().layerOf(target.trace)});
}

void RecordView::mouseMoveEvent(QMouseEvent* event) {
  const QPointF at = event->position();
  pointer_ = at;
  if (gather() == nullptr) {
    return;
  }
  if (!event->buttons().testFlag(Qt::LeftButton)) {
    // The release went to somebody else, such as a dialog that came up meanwhile.
    abandon();
    marking_ = false;
  }
  if (panFrom_ && event->buttons().testFlag(Qt::MiddleButton)) {
    const double seconds = axes_.shownAt(panFrom_->y()) - axes_.shownAt(at.y());
    const double places = axes_.placeAt(panFrom_->x()) - axes_.placeAt(at.x());
    panFrom_ = at;
    showRange(panned(range_, seconds, places));
  } else if (marking_) {
    extendMarked(axes_.traceAt(at.x()));
  } else if (gesture_) {
    const auto edit = gesture_->moveTo(axes_, inPlot(at), isFree(*event));
    if (edit || live_) {
      live_ = true;
      emit proposed(edit.value_or(Edit{}), Phase::Live);
    }
  }
  hover(at);
}

void RecordView::mouseReleaseEvent(QMouseEvent* event) {
  if (event->button() == Qt::MiddleButton) {
    panFrom_.reset();
  }
  if (event->button() != Qt::LeftButton) {
    return;
  }
  marking_ = false;
  if (!gesture_) {
    return;
  }
  const auto edit = gesture_->release(axes_, inPlot(event->position()), isFree(*event));
  const auto trace = static_cast<std::size_t>(gesture_->trace());
  const bool stroke = gesture_->isStroke();
  gesture_.reset();
  if (edit) {
    emit proposed(*edit, Phase::Commit);
  } else if (live_) {
    emit proposed({}, Phase::Abandon);
  } else if (!stroke && shot().traces[trace].state == TraceState::Dead) {
    emit hint(tr("Trace %1 is marked dead, so it takes no pick; a right click marks it live.").arg(trace + 1));
  }
  update();
}

void RecordView::mouseDoubleClickEvent(QMouseEvent* event) {
  const bool beside = gather() != nullptr && !axes_.plot().contains(event->position());
  if (event->button() == Qt::MiddleButton || (event->button() == Qt::LeftButton && beside)) {
    perform(RecordCommand::ZoomHome);
  } else {
    // Two quick clicks on traces are two clicks.
    mousePressEvent(event);
  }
}

void RecordView::wheelEvent(QWheelEvent* event) {
  if (gather() == nullptr || gesture_) {
    return;
  }
  const QPoint turn = event->angleDelta();
  constexpr double kNotch = 120.0;
  // Some platforms turn the wheel sideways while Alt is held.
  const bool sideways = std::abs(turn.x()) > std::abs(turn.y());
  const double factor = std::pow(kWheelZoom, (sideways ? turn.x() : turn.y()) / kNotch);
  const bool traces = sideways || event->modifiers().testFlag(Qt::ControlModifier);
  zoom(traces ? 1.0 : factor, traces ? factor : 1.0, inPlot(event->position()));
  event->accept();
}

void RecordView::leaveEvent(QEvent*) {
  pointer_.reset();
  emit plumbLineWanted(Estimate::kNaN);
  emit hint({});
  update();
}

void RecordView::hover(const QPointF& at) {
  if (!axes_.plot().contains(at)) {
    unsetCursor();
    return;
  }
  const RecordTarget target = targetAt(axes_, shot(), scene_.selection.trace, at);
  const bool handle = target.on == RecordTarget::On::Pick || target.on == RecordTarget::On::Bracket;
  if (!gesture_) {
    setCursor(handle ? Qt::SizeVerCursor : Qt::CrossCursor);
  }
  if (target.trace >= 0) {
    emit plumbLineWanted(axes_.metresAt(at.x()));
    const QString words = hoverWords(picture(), target.trace, axes_.timeAt(target.trace, at.y()));
    emit hint(words);
  }
  if (display_.magnifier) {
    update();
  }
}

void RecordView::sayTrace() {
  if (!hasTrace()) {
    return;
  }
  const QString words = hoverWords(picture(), scene_.selection.trace, Estimate::kNaN);
  setAccessibleDescription(words);
  emit hint(words);
}

void RecordView::abandon() {
  if (!gesture_) {
    return;
  }
  gesture_.reset();
  emit proposed({}, Phase::Abandon);
  if (selectionAtPress_.shot == scene_.selection.shot) {
    select(selectionAtPress_);
  }
  update();
}

void RecordView::extendMarked(int trace) {
  if (trace < 0) {
    return;
  }
  if (markAnchor_ < 0 || marked_.first < 0) {
    markAnchor_ = scene_.selection.trace >= 0 ? scene_.selection.trace : trace;
  }
  marked_ = std::minmax(markAnchor_, trace);
  update();
}

void RecordView::contextMenuEvent(QContextMenuEvent* event) {
  if (gather() == nullptr) {
    return;
  }
  const bool byPointer = event->reason() == QContextMenuEvent::Mouse;
  int trace = byPointer ? axes_.traceAt(event->pos().x()) : scene_.selection.trace;
  if (byPointer && !axes_.plot().contains(event->pos())) {
    trace = -1;
  }
  if (trace >= 0) {
    select(Selection{scene_.selection.shot, trace, picture().layerOf(trace)});
  }
  QMenu* menu = makeMenu(trace);
  menu->setAttribute(Qt::WA_DeleteOnClose);
  const QPoint at = byPointer || trace < 0
                        ? event->globalPos()
                        : mapToGlobal(QPointF(axes_.xOf(trace), axes_.plot().center().y()).toPoint());
  menu->popup(at);
}

}  // namespace strikeplate
