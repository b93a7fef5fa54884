#include "widgets/record_view.h"

#include <algorithm>
#include <cmath>

#include <QEvent>

#include "widgets/record_frame.h"
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
  if (selection.trace != scene_.selection.trace) {
    marked_ = {-1, -1};
  }
  scene_.selection = selection;
  if (gesture_ && !gesture_->fits(scene_)) {
    abandon();
  }
  takeShot(false);
  if (!gesture_) {
    reveal();
  }
  if (hasFocus() && !gesture_) {
    sayTrace();
  }
}

void RecordView::reveal() {
  if (!hasTrace()) {
    return;
  }
  const int trace = scene_.selection.trace;
  const auto& pick = shot().traces[static_cast<std::size_t>(trace)].pick;
  const QPointF at(axes_.xOf(trace), pick ? axes_.yOf(trace, pick->time) : axes_.plot().center().y());
  const QPointF nearest = inPlot(at);
  if (at != nearest) {
    // A little further in than the edge, so that the neighbours are seen too.
    const QPointF way = at - nearest;
    const double room = way.x() == 0.0 ? 0.0 : std::copysign(2.0 * axes_.spacing(), way.x());
    const double places = axes_.placeAt(at.x() + room) - axes_.placeAt(nearest.x());
    const double seconds =
        way.y() == 0.0 ? 0.0 : axes_.shownTime(trace, pick->time) - axes_.shownAt(axes_.plot().center().y());
    // What is selected elsewhere does not move the axis that all panes share.
    showRange(panned(range_, seconds, display_.truePosition && !hasFocus() ? 0.0 : places));
  }
}

void RecordView::showRange(const RecordRange& range) {
  const bool shared = display_.truePosition && (range.left != range_.left || range.right != range_.right);
  if (shared) {
    positionLeft_ = range.left;
    positionRight_ = range.right;
  }
  setRange(range);
  if (shared) {
    emit positionRangeWanted(range_.left, range_.right);
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
  showRange(range);
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

}  // namespace strikeplate
