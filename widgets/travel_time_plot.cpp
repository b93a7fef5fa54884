#include "widgets/travel_time_plot.h"

#include <algorithm>
#include <cmath>

#include <QKeyEvent>
#include <QMenu>
#include <QMouseEvent>
#include <QRubberBand>
#include <QVBoxLayout>
#include <qcustomplot.h>

#include "core/base/units.h"

namespace strikeplate {
namespace {

constexpr double kReach = 14.0;  // px about the pointer in which a pick is meant
constexpr double kEndReach = 10.0;
constexpr double kLeastBand = 5.0;  // px; less is a click
constexpr int kMostLayer = 6;

}  // namespace

TravelTimePlot::TravelTimePlot(QWidget* parent)
    : PositionView(parent), picture_(plot()), band_(new QRubberBand(QRubberBand::Rectangle, &plot())) {
  setFocusPolicy(Qt::StrongFocus);
  setMinimumHeight(160);
  setAccessibleName(tr("Travel times"));
  setAccessibleDescription(tr("First-break times over position, with branches whose ends can be moved"));
  auto* layout = new QVBoxLayout(this);
  layout->setContentsMargins(0, 0, 0, 0);
  layout->addWidget(&plot());
  plot().setFocusPolicy(Qt::NoFocus);
  plot().setMouseTracking(true);
  connect(&plot(), &QCustomPlot::mousePress, this, &TravelTimePlot::press);
  connect(&plot(), &QCustomPlot::mouseMove, this, &TravelTimePlot::move);
  connect(&plot(), &QCustomPlot::mouseRelease, this, &TravelTimePlot::release);
}

void TravelTimePlot::showScene(const Scene& scene) {
  const bool otherShots =
      !scene_.survey || !scene.survey || scene.survey->shots.size() != scene_.survey->shots.size();
  if (otherShots) {
    marked_.clear();
    drag_.reset();
  }
  PositionView::showScene(scene);
}

void TravelTimePlot::showSelection(const Selection& selection) {
  scene_.selection = selection;
  draw();
}

void TravelTimePlot::setDisplay(const TravelTimeDisplay& display) {
  display_ = display;
  draw();
}

void TravelTimePlot::drawData() {
  picture_.draw(scene_, look(), display_, marked_);
}

std::vector<TraceOfShot> TravelTimePlot::chosen() const {
  if (!marked_.empty()) {
    return {marked_.begin(), marked_.end()};
  }
  const Selection& s = scene_.selection;
  return s.shot >= 0 && s.trace >= 0 ? std::vector<TraceOfShot>{{s.shot, s.trace}} : std::vector<TraceOfShot>{};
}

std::optional<QPointF> TravelTimePlot::placeOf(int arrival) const {
  if (!scene_.interpretation || arrival < 0 ||
      arrival >= static_cast<int>(scene_.interpretation->times.arrivals.size())) {
    return std::nullopt;
  }
  const TravelTimes& times = scene_.interpretation->times;
  const Arrival& a = times.arrivals[static_cast<std::size_t>(arrival)];
  const Units units{scene_.survey->settings.feet};
  const double time = shownTime(*scene_.interpretation, arrival, display_);
  const double x = units.fromMetres(times.geophones[static_cast<std::size_t>(a.geophone)].x);
  const QPointF place(plot().xAxis->coordToPixel(x), plot().yAxis->coordToPixel(time));
  return std::isfinite(time) ? std::optional(place) : std::nullopt;
}

int TravelTimePlot::arrivalAt(const QPointF& position, double reach) const {
  int nearest = -1;
  double least = reach;
  const std::size_t count = scene_.interpretation ? scene_.interpretation->times.arrivals.size() : 0;
  for (std::size_t i = 0; i < count; ++i) {
    const bool selected = scene_.interpretation->times.arrivals[i].shot == scene_.selection.shot;
    const auto place = selected || display_.allShots ? placeOf(static_cast<int>(i)) : std::nullopt;
    if (!place) {
      continue;
    }
    // Where curves cross, the shot that is selected already comes first.
    const double distance = std::hypot(place->x() - position.x(), place->y() - position.y()) - (selected ? 3.0 : 0.0);
    if (distance < least) {
      least = distance;
      nearest = static_cast<int>(i);
    }
  }
  return nearest;
}

std::optional<BranchEnd> TravelTimePlot::endAt(const QPointF& position) const {
  std::optional<BranchEnd> nearest;
  double least = kEndReach;
  if (!scene_.interpretation) {
    return nearest;
  }
  for (const BranchEnd& end : branchEnds(scene_.interpretation->branches, scene_.selection.shot)) {
    const auto place = placeOf(end.arrival);
    const double distance = place ? std::hypot(place->x() - position.x(), place->y() - position.y()) : least;
    if (distance < least) {
      least = distance;
      nearest = end;
    }
  }
  return nearest;
}

void TravelTimePlot::press(QMouseEvent* event) {
  setFocus();
  if (!scene_.interpretation) {
    return;
  }
  if (event->button() == Qt::RightButton) {
    menuAt(event->pos());
    return;
  }
  if (event->button() != Qt::LeftButton) {
    return;
  }
  if (const auto end = endAt(event->position())) {
    drag_ = EndDrag{*end, scene_.survey, scene_.interpretation, end->arrival};
    return;
  }
  const int arrival = arrivalAt(event->position(), kReach);
  if (arrival < 0) {
    bandFrom_ = event->position();
    return;
  }
  const Arrival& a = scene_.interpretation->times.arrivals[static_cast<std::size_t>(arrival)];
  const TraceOfShot trace{a.shot, a.trace};
  if (event->modifiers().testFlag(Qt::ControlModifier)) {
    if (!marked_.erase(trace)) {
      marked_.insert(trace);
    }
  } else {
    marked_.clear();
  }
  const Selection wanted{a.shot, a.trace, a.layer};
  draw();
  emit selectionWanted(wanted);
}

void TravelTimePlot::move(QMouseEvent* event) {
  if (drag_) {
    const Units units{scene_.survey->settings.feet};
    const double x = units.toMetres(plot().xAxis->pixelToCoord(event->position().x()));
    const int to = arrivalUnder(drag_->before->times, drag_->end, x);
    if (to != drag_->to) {
      drag_->to = to;
      emit proposed(slideBranchEnd(*drag_->atPress, drag_->before->times, drag_->end, to), Phase::Live);
    }
    emit plumbLineWanted(x);
  } else if (bandFrom_) {
    const QRectF area = QRectF(*bandFrom_, event->position()).normalized();
    band_->setGeometry(area.toRect());
    band_->setVisible(std::max(area.width(), area.height()) > kLeastBand);
  } else {
    hover(event->position());
  }
}

void TravelTimePlot::release(QMouseEvent* event) {
  if (event->button() != Qt::LeftButton) {
    return;
  }
  if (drag_) {
    const Edit edit = slideBranchEnd(*drag_->atPress, drag_->before->times, drag_->end, drag_->to);
    drag_.reset();
    emit proposed(edit, edit.changes.empty() ? Phase::Abandon : Phase::Commit);
  } else if (bandFrom_) {
    const QRectF area = QRectF(*bandFrom_, event->position()).normalized();
    bandFrom_.reset();
    band_->hide();
    markInside(area, event->modifiers().testFlag(Qt::ControlModifier));
  }
}

void TravelTimePlot::markInside(const QRectF& area, bool add) {
  if (!add) {
    marked_.clear();
  }
  if (std::max(area.width(), area.height()) > kLeastBand && scene_.interpretation) {
    const auto& arrivals = scene_.interpretation->times.arrivals;
    for (std::size_t i = 0; i < arrivals.size(); ++i) {
      const auto place = placeOf(static_cast<int>(i));
      if (place && area.contains(*place) && (display_.allShots || arrivals[i].shot == scene_.selection.shot)) {
        marked_.insert({arrivals[i].shot, arrivals[i].trace});
      }
    }
    emit hint(tr("%n pick(s) marked: keys 1 to 6 give them to a layer, 0 back to the program", "",
                 static_cast<int>(marked_.size())));
  }
  draw();
}

void TravelTimePlot::hover(const QPointF& position) {
  if (!scene_.survey) {
    return;
  }
  const Units units{scene_.survey->settings.feet};
  emit plumbLineWanted(units.toMetres(plot().xAxis->pixelToCoord(position.x())));
  const auto end = endAt(position);
  plot().setCursor(end ? Qt::SizeHorCursor : Qt::ArrowCursor);
  const int arrival = end ? end->arrival : arrivalAt(position, kReach);
  emit hint(arrival < 0 ? QString()
            : end
                ? tr("End of the layer %1 branch: drag it along the curve. %2").arg(end->layer).arg(describe(arrival))
                : describe(arrival));
}

QString TravelTimePlot::describe(int arrival) const {
  const Interpretation& interpretation = *scene_.interpretation;
  const auto i = static_cast<std::size_t>(arrival);
  const Arrival& a = interpretation.times.arrivals[i];
  const Units units{scene_.survey->settings.feet};
  QString text = tr("Shot %1, trace %2 at %3: %4 ± %5")
                     .arg(a.shot + 1)
                     .arg(a.trace + 1)
                     .arg(QString::fromStdString(
                         units.length(interpretation.times.geophones[static_cast<std::size_t>(a.geophone)].x)))
                     .arg(1e3 * a.time, 0, 'f', 2)
                     .arg(QString::fromStdString(milliseconds(kNormal95 * a.sigma, 2)));
  if (interpretation.section.determined && i < interpretation.section.predicted.size()) {
    const double predicted = interpretation.section.predicted[i];
    text += tr(", section %1, difference %2")
                .arg(QString::fromStdString(milliseconds(predicted, 2)))
                .arg(QString::fromStdString(milliseconds(a.time - predicted, 2)));
  }
  const QString by = a.layerByHand ? tr("by hand") : tr("by the program");
  return a.layer > 0 ? text + tr(", layer %1 %2").arg(a.layer).arg(by) : text + tr(", no layer");
}

void TravelTimePlot::menuAt(const QPoint& position) {
  const int arrival = arrivalAt(position, kReach);
  if (arrival >= 0) {
    const Arrival& a = scene_.interpretation->times.arrivals[static_cast<std::size_t>(arrival)];
    if (!marked_.contains({a.shot, a.trace})) {
      marked_.clear();
      emit selectionWanted({a.shot, a.trace, a.layer});
    }
  }
  const auto count = static_cast<int>(chosen().size());
  auto* menu = new QMenu(this);
  menu->setAttribute(Qt::WA_DeleteOnClose);
  for (int layer = 1; layer <= kMostLayer; ++layer) {
    QAction* action = menu->addAction(tr("Give %n pick(s) to layer %1", "", count).arg(layer));
    connect(action, &QAction::triggered, this, [this, layer] { assignChosen(layer); });
  }
  connect(menu->addAction(tr("Let the program assign %n pick(s)", "", count)), &QAction::triggered, this,
          [this] { assignChosen(0); });
  menu->addSeparator();
  connect(menu->addAction(tr("Delete %n pick(s)", "", count)), &QAction::triggered, this,
          &TravelTimePlot::deleteChosen);
  for (QAction* action : menu->actions()) {
    action->setEnabled(count > 0);
  }
  menu->popup(plot().mapToGlobal(position));
}

void TravelTimePlot::assignChosen(int layer) {
  const std::vector<TraceOfShot> traces = chosen();
  if (!scene_.survey || traces.empty()) {
    return;
  }
  const Edit edit = assignTraces(*scene_.survey, traces, layer);
  if (!edit.changes.empty()) {
    emit proposed(edit, Phase::Commit);
  }
}

void TravelTimePlot::deleteChosen() {
  std::vector<PickChange> changes;
  for (const TraceOfShot& t : chosen()) {
    if (scene_.survey->shots[static_cast<std::size_t>(t.shot)].traces[static_cast<std::size_t>(t.trace)].pick) {
      changes.push_back({t.shot, t.trace, std::nullopt, std::nullopt});
    }
  }
  if (!changes.empty()) {
    const std::string text =
        changes.size() == 1 ? "Delete a pick" : "Delete " + std::to_string(changes.size()) + " picks";
    emit proposed(edits::setPicks(*scene_.survey, changes, text), Phase::Commit);
    marked_.clear();
  }
}

void TravelTimePlot::abandon() {
  band_->hide();
  bandFrom_.reset();
  if (drag_) {
    drag_.reset();
    emit proposed({}, Phase::Abandon);
  } else if (!marked_.empty()) {
    marked_.clear();
    draw();
  }
}

void TravelTimePlot::stepTrace(int by, bool mark) {
  const Selection s = scene_.selection;
  if (!scene_.interpretation || s.shot < 0) {
    return;
  }
  const auto& arrivals = scene_.interpretation->times.arrivals;
  std::vector<std::size_t> curve;
  std::ptrdiff_t at = -1;
  for (std::size_t i = 0; i < arrivals.size(); ++i) {
    if (arrivals[i].shot == s.shot) {
      at = arrivals[i].trace == s.trace ? std::ssize(curve) : at;
      curve.push_back(i);
    }
  }
  if (curve.empty()) {
    return;
  }
  const std::ptrdiff_t next = at < 0 ? 0 : std::clamp<std::ptrdiff_t>(at + by, 0, std::ssize(curve) - 1);
  const Arrival& a = arrivals[curve[static_cast<std::size_t>(next)]];
  if (mark) {
    marked_.insert({a.shot, a.trace});
    if (s.trace >= 0) {
      marked_.insert({s.shot, s.trace});
    }
  } else {
    marked_.clear();
  }
  const int arrival = static_cast<int>(curve[static_cast<std::size_t>(next)]);
  emit hint(describe(arrival));
  emit selectionWanted({a.shot, a.trace, a.layer});
  emit plumbLineWanted(scene_.interpretation->times.geophones[static_cast<std::size_t>(a.geophone)].x);
  draw();
}

void TravelTimePlot::stepShot(int by) {
  const int last = scene_.survey ? static_cast<int>(scene_.survey->shots.size()) - 1 : -1;
  if (last >= 0) {
    emit selectionWanted({std::clamp(scene_.selection.shot + by, 0, last), -1, 0});
  }
}

void TravelTimePlot::keyPressEvent(QKeyEvent* event) {
  const bool shift = event->modifiers().testFlag(Qt::ShiftModifier);
  const int layer = event->key() - Qt::Key_0;
  if (layer >= 0 && layer <= kMostLayer && !event->modifiers().testFlag(Qt::ControlModifier)) {
    assignChosen(layer);
    return;
  }
  switch (event->key()) {
    case Qt::Key_Left:
    case Qt::Key_Right:
      stepTrace(event->key() == Qt::Key_Left ? -1 : 1, shift);
      break;
    case Qt::Key_PageUp:
    case Qt::Key_PageDown:
      stepShot(event->key() == Qt::Key_PageUp ? -1 : 1);
      break;
    case Qt::Key_Delete:
    case Qt::Key_Backspace:
      deleteChosen();
      break;
    case Qt::Key_Escape:
      abandon();
      PositionView::keyPressEvent(event);
      break;
    default:
      PositionView::keyPressEvent(event);
  }
}

}  // namespace strikeplate
