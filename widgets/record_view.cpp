#include "widgets/record_view.h"

#include <algorithm>
#include <cmath>

#include <QEvent>
#include <QPainter>

#include "widgets/record_frame.h"
#include "widgets/record_loupe.h"
#include "widgets/record_trace_paint.h"
#include "widgets/record_window.h"

namespace strikeplate {

RecordView::RecordView(QWidget* parent) : View(parent) {
  setFocusPolicy(Qt::StrongFocus);
  setMouseTracking(true);
  setMinimumSize(320, 240);
  setAttribute(Qt::WA_OpaquePaintEvent);
  setAccessibleName(tr("Record"));
}

const Gather* RecordView::gather() const {
  const auto s = static_cast<std::size_t>(scene_.selection.shot);
  const bool there = scene_.survey && scene_.gathers && scene_.selection.shot >= 0 && s < scene_.gathers->size() &&
                     s < scene_.survey->shots.size() && !(*scene_.gathers)[s].traces.empty();
  return there ? &(*scene_.gathers)[s] : nullptr;
}

const Shot& RecordView::shot() const {
  return scene_.survey->shots[static_cast<std::size_t>(scene_.selection.shot)];
}

RecordPicture RecordView::picture() const {
  return {scene_, *gather(), shot(), axes_, display_, look_, font()};
}

bool RecordView::hasTrace() const {
  return gather() != nullptr && scene_.selection.trace >= 0 && scene_.selection.trace < axes_.count();
}

void RecordView::showScene(const Scene& scene) {
  const bool newRecords = !scene_.survey || scene_.survey->records != scene.survey->records;
  scene_ = scene;
  if (gesture_ && !gesture_->fits(scene_)) {
    gesture_.reset();
  }
  if (nudge_ && (newRecords || nudge_->shot != scene_.selection.shot)) {
    nudge_.reset();
  }
  takeShot(newRecords);
}

void RecordView::showSelection(const Selection& selection) {
  scene_.selection = selection;
  if (gesture_ && !gesture_->fits(scene_)) {
    abandon();
  }
  takeShot(false);
  if (hasFocus() && !gesture_) {
    sayTrace();
  }
}

void RecordView::takeShot(bool newRecords) {
  const bool otherShot = shownShot_ != scene_.selection.shot;
  if (newRecords || otherShot) {
    marked_ = {-1, -1};
    markAnchor_ = -1;
  }
  if (gather() == nullptr) {
    shownGathers_.reset();
    shownShot_ = -1;
    axes_ = {};
    update();
    return;
  }
  const bool fresh = newRecords || otherShot || shownGathers_ != scene_.gathers;
  shownShot_ = scene_.selection.shot;
  shownGathers_ = scene_.gathers;
  atHome_ = atHome_ || newRecords;
  // Once most picks are there they say better what part matters; later ones do not move the picture under the hand.
  const bool knowsPicks = 2 * std::count_if(shot().traces.begin(), shot().traces.end(),
                                            [](const ShotTrace& trace) { return trace.pick.has_value(); }) >=
                          static_cast<std::ptrdiff_t>(shot().traces.size());
  const bool learnt = knowsPicks && !homeKnewPicks_ && !gesture_;
  homeKnewPicks_ = fresh ? knowsPicks : homeKnewPicks_ || learnt;
  if (fresh || learnt) {
    conditionTraces();
    if (atHome_) {
      goHome();
    } else {
      setRange(range_);
    }
  }
  placeAxes();
}

void RecordView::conditionTraces() {
  RecordDisplay plain = display_;
  plain.reducingVelocity = 0.0;
  const RecordRange home = homeRange(*gather(), shot(), shownShot_, scene_.interpretation.get(), plain);
  const double correction = shot().triggerCorrection;
  traces_ = ShownTraces(*gather(), shot(), display_);
  units_ = traces_.units(home.first - correction, home.last - correction, display_.scale);
}

void RecordView::goHome() {
  if (gather() == nullptr) {
    return;
  }
  setRange(homeRange(*gather(), shot(), shownShot_, scene_.interpretation.get(), display_));
  atHome_ = true;
}

void RecordView::showAll() {
  setRange(fullRange(*gather(), shot(), display_));
}

void RecordView::setRange(const RecordRange& wanted) {
  RecordRange limits = fullRange(*gather(), shot(), display_);
  limits.first = std::min(limits.first, -0.02);
  const double leastPlaces = 2.0 * (limits.right - limits.left) / std::max(1, static_cast<int>(traces_.count()));
  RecordRange range = wanted;
  if (display_.truePosition) {
    // The other panes may well be looking beyond the geophones.
    limits.left = std::min(limits.left, std::isfinite(positionLeft_) ? positionLeft_ : range.left) - 1e3;
    limits.right = std::max(limits.right, std::isfinite(positionRight_) ? positionRight_ : range.right) + 1e3;
  }
  range_ = within(range, limits, 20.0 * gather()->sampleInterval, leastPlaces);
  atHome_ = false;
  placeAxes();
}

void RecordView::placeAxes() {
  if (gather() == nullptr) {
    return;
  }
  RecordRange range = range_;
  if (display_.truePosition && std::isfinite(positionLeft_)) {
    range.left = positionLeft_;
    range.right = positionRight_;
  }
  range_ = range;
  const QMarginsF margins = recordMargins(QFontMetricsF(font()));
  QRectF plot = QRectF(rect()).marginsRemoved(margins);
  plot = QRectF(std::round(plot.left()), std::round(plot.top()), std::max(20.0, std::round(plot.width())),
                std::max(20.0, std::round(plot.height())));
  axes_ = RecordAxes(*gather(), shot().triggerCorrection, display_, plot, range_);
  update();
}

void RecordView::zoom(double timeFactor, double traceFactor, const QPointF& about) {
  RecordRange range = zoomedTime(range_, timeFactor, axes_.shownAt(about.y()));
  range = zoomedTraces(range, traceFactor, axes_.placeAt(about.x()));
  const bool shared = display_.truePosition && traceFactor != 1.0;
  if (shared) {
    positionLeft_ = range.left;
    positionRight_ = range.right;
  }
  setRange(range);
  if (shared) {
    emit positionRangeWanted(range_.left, range_.right);
  }
}

void RecordView::showPlumbLine(double x) {
  plumbLine_ = x;
  update();
}

void RecordView::showPositionRange(double left, double right) {
  positionLeft_ = left;
  positionRight_ = right;
  if (display_.truePosition) {
    placeAxes();
  }
}

void RecordView::setLook(const Look& look) {
  look_ = look;
  update();
}

void RecordView::setDisplay(const RecordDisplay& display) {
  if (display == display_) {
    return;
  }
  const RecordDisplay before = std::exchange(display_, display);
  if (gather() == nullptr) {
    return;
  }
  if (!sameConditioning(before, display)) {
    conditionTraces();
  }
  if (before.truePosition != display.truePosition) {
    placeLimits(*gather(), display.truePosition, range_.left, range_.right);
  }
  if (atHome_ || before.reducingVelocity != display.reducingVelocity) {
    const RecordRange places = range_;
    goHome();
    range_.left = places.left;
    range_.right = places.right;
  }
  placeAxes();
}

void RecordView::changeDisplay(const RecordDisplay& display) {
  setDisplay(display);
  emit displayChanged(display);
}

void RecordView::resizeEvent(QResizeEvent*) {
  placeAxes();
}

void RecordView::changeEvent(QEvent* event) {
  if (event->type() == QEvent::FontChange) {
    placeAxes();
    image_ = {};
  }
  View::changeEvent(event);
}

void RecordView::paintEvent(QPaintEvent*) {
  QPainter painter(this);
  if (gather() == nullptr) {
    painter.fillRect(rect(), look_.paper);
    painter.setPen(look_.ink);
    painter.drawText(rect().adjusted(16, 16, -16, -16), Qt::AlignCenter | Qt::TextWordWrap,
                     tr("No record. Drop shot records on the window, or open them from the File menu."));
    return;
  }
  paintTraces();
  painter.drawImage(0, 0, image_);
  painter.setRenderHint(QPainter::Antialiasing);
  paintOverlay(painter);
}

void RecordView::paintTraces() {
  Painted wanted{scene_.gathers.get(),
                 scene_.selection.shot,
                 shot().triggerCorrection,
                 scene_.survey->settings.feet,
                 range_,
                 display_,
                 size(),
                 devicePixelRatioF(),
                 look_.kind};
  // These lie over the traces.
  wanted.display.magnifier = wanted.display.predicted = wanted.display.reciprocal = false;
  if (image_.isNull() || !(wanted == painted_)) {
    painted_ = wanted;
    drawTraces();
  }
}

void RecordView::drawTraces() {
  const double scale = devicePixelRatioF();
  if (image_.size() != size() * scale) {
    image_ = QImage(size() * scale, QImage::Format_RGB32);
  }
  image_.setDevicePixelRatio(scale);
  image_.fill(look_.paper);
  {
    QPainter painter(&image_);
    paintRecordFrame(painter, picture());
  }
  const QRectF& plot = axes_.plot();
  const QRect area = QRectF(plot.topLeft() * scale, plot.size() * scale).toRect().intersected(image_.rect());
  TraceInk ink{display_.style, look_.ink.rgb(), look_.paper.rgb(), 0.8 * look_.lineWidth * scale};
  TracePainter painter(image_, area, ink, display_.timeUp);
  const auto rows = static_cast<std::size_t>(area.height() * kRowsPerPixel);
  const double interval = gather()->sampleInterval;
  const double perRow = (range_.last - range_.first) / static_cast<double>(rows) / interval;
  RowExtremes extremes;
  for (int t = 0; t < axes_.count(); ++t) {
    const auto i = static_cast<std::size_t>(t);
    const double reach = std::max(display_.clip, 3.0) * axes_.spacing();
    const double x = axes_.xOf(t);
    if (!(units_[i] > 0.0F) || x + reach < plot.left() || x - reach > plot.right()) {
      continue;
    }
    rowExtremes(traces_.trace(i), (axes_.recorderTime(t, range_.first) - gather()->start) / interval, perRow, rows,
                extremes);
    const double spacing = scale * axes_.spacing();
    painter.setInk(shot().traces[i].state == TraceState::Dead ? look_.faint.rgb() : look_.ink.rgb());
    painter.paint(extremes, {scale * x, spacing * display_.gain / static_cast<double>(units_[i]),
                             spacing * display_.clip, scale * x - 0.5 * spacing, scale * x + 0.5 * spacing});
  }
  QPainter words(&image_);
  paintTraceStates(words, picture());
}

void RecordView::paintOverlay(QPainter& painter) {
  const RecordPicture shown = picture();
  painter.save();
  painter.setClipRect(axes_.plot().adjusted(0, -1, 0, 1));
  RecordMarks marks{scene_.selection.trace, marked_, -1, plumbLine_};
  if (std::isfinite(plumbLine_)) {
    const int nearest = axes_.traceAt(axes_.xOfMetres(plumbLine_));
    marks.underPlumbLine = std::isfinite(axes_.xOfMetres(plumbLine_)) ? nearest : -1;
  }
  paintRecordMarks(painter, shown, marks);
  if (display_.predicted) {
    paintPredicted(painter, shown);
  }
  if (display_.reciprocal) {
    // A shot at the end of the spread stands on the frame.
    painter.setClipRect(axes_.plot().adjusted(-6, 0, 12, 0));
    paintReciprocal(painter, shown);
    painter.setClipRect(axes_.plot().adjusted(0, -1, 0, 1));
  }
  paintPicks(painter, shown, scene_.selection.trace);
  if (gesture_ && gesture_->isStroke()) {
    QColor colour = look_.accent;
    colour.setAlpha(110);
    painter.setPen(QPen(colour, 4.0, Qt::SolidLine, Qt::RoundCap, Qt::RoundJoin));
    painter.drawPolyline(gesture_->path().data(), static_cast<int>(gesture_->path().size()));
  }
  if (display_.magnifier && pointer_ && axes_.plot().contains(*pointer_)) {
    paintLoupe(painter, shown, traces_, *pointer_);
  }
  painter.restore();
  if (gather()->traces.front().empty()) {
    painter.setPen(look_.faint);
    painter.drawText(axes_.plot().adjusted(8, 8, -8, -8), Qt::AlignRight | Qt::AlignBottom | Qt::TextWordWrap,
                     tr("Times without a record"));
  }
}

}  // namespace strikeplate
