#include "widgets/travel_time_plot.h"

#include <algorithm>
#include <cmath>

#include <QMouseEvent>
#include <QRubberBand>
#include <QVBoxLayout>
#include <qcustomplot.h>

#include "core/base/units.h"
#include "widgets/lasso_line.h"
#include "widgets/travel_time_words.h"

namespace strikeplate {
namespace {

constexpr double kReach = 14.0;  // px about the pointer in which a pick is meant
constexpr double kEndReach = 10.0;
constexpr double kMarkReach = 7.0;
constexpr double kLeastBand = 5.0;  // px; less is a click

}  // namespace

TravelTimePlot::TravelTimePlot(QWidget* parent)
    : PositionView(parent),
      picture_(plot()),
      lasso_(new LassoLine(&plot())),
      band_(new QRubberBand(QRubberBand::Rectangle, &plot())) {
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
  emit displayChanged();
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
    const auto place = display_.shows(scene_.interpretation->times.arrivals[i].shot, scene_.selection)
                           ? placeOf(static_cast<int>(i))
                           : std::nullopt;
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
    drawn_ = {event->position()};
    freehand_ = event->modifiers().testFlag(Qt::AltModifier);
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
  } else if (!drawn_.isEmpty()) {
    drawn_ << event->position();
    const QRectF area = QRectF(drawn_.front(), event->position()).normalized();
    if (freehand_) {
      lasso_->show(drawn_);
    } else {
      band_->setGeometry(area.toRect());
      band_->setVisible(std::max(area.width(), area.height()) > kLeastBand);
    }
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
  } else if (!drawn_.isEmpty()) {
    const QPolygonF area = freehand_ ? drawn_ : QPolygonF(QRectF(drawn_.front(), event->position()).normalized());
    drawn_.clear();
    band_->hide();
    lasso_->hide();
    markInside(area, event->modifiers().testFlag(Qt::ControlModifier));
  }
}

void TravelTimePlot::markInside(const QPolygonF& area, bool add) {
  if (!add) {
    marked_.clear();
  }
  if (std::max(area.boundingRect().width(), area.boundingRect().height()) > kLeastBand && scene_.interpretation) {
    const auto& arrivals = scene_.interpretation->times.arrivals;
    for (std::size_t i = 0; i < arrivals.size(); ++i) {
      const auto place = placeOf(static_cast<int>(i));
      if (place && area.containsPoint(*place, Qt::OddEvenFill) &&
          display_.shows(arrivals[i].shot, scene_.selection)) {
        marked_.insert({arrivals[i].shot, arrivals[i].trace});
      }
    }
    emit hint(tr("Marked picks: %1. Keys 1 to 6 give them to a layer, 0 back to the program.").arg(marked_.size()));
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
  emit hint(wordsAt(position));
}

// Smaller things come first: an end, a mark, a pick, then lines.
QString TravelTimePlot::wordsAt(const QPointF& position) const {
  if (!scene_.interpretation) {
    return {};
  }
  if (const auto end = endAt(position)) {
    return tr("End of the layer %1 branch: drag it along the curve. %2")
        .arg(end->layer)
        .arg(arrivalWords(scene_, end->arrival));
  }
  const auto near = [&](const QPointF& place, double reach) {
    return std::hypot(place.x() - position.x(), place.y() - position.y()) < reach;
  };
  if (display_.marks && !display_.residuals) {
    for (const BranchMark& mark : branchMarks(*scene_.survey, *scene_.interpretation, scene_.selection.shot)) {
      const double shot = scene_.interpretation->times.shots[static_cast<std::size_t>(mark.shot)].x;
      if (near(pixel(shot + mark.side * mark.offset, mark.offset, mark.time), kMarkReach)) {
        return markWords(scene_, mark);
      }
    }
  }
  if (const int arrival = arrivalAt(position, kReach); arrival >= 0) {
    return arrivalWords(scene_, arrival);
  }
  const auto& shots = scene_.interpretation->times.shots;
  for (const ReciprocalPair& pair : scene_.interpretation->reciprocals) {
    const double xA = shots[static_cast<std::size_t>(pair.shotA)].x,
                 xB = shots[static_cast<std::size_t>(pair.shotB)].x;
    const bool shown = display_.reciprocals && !display_.residuals &&
                       (pair.shotA == scene_.selection.shot || pair.shotB == scene_.selection.shot);
    if (shown && (near(pixel(xA, std::abs(xB - xA), pair.timeBA), kReach) ||
                  near(pixel(xB, std::abs(xB - xA), pair.timeAB), kReach))) {
      return reciprocalWords(pair);
    }
  }
  const double x = Units{scene_.survey->settings.feet}.toMetres(plot().xAxis->pixelToCoord(position.x()));
  for (const Branch& branch : scene_.interpretation->branches) {
    const double offset = branch.side * (x - shots[static_cast<std::size_t>(branch.shot)].x);
    if (branch.shot == scene_.selection.shot && display_.fittedLines && !display_.residuals && offset > 0.0 &&
        branch.fit.determined && near(pixel(x, offset, branch.fit.at(offset)), kMarkReach)) {
      return branchWords(scene_, branch);
    }
  }
  return {};
}

QPointF TravelTimePlot::pixel(double x, double offset, double time) const {
  const Units units{scene_.survey->settings.feet};
  return {plot().xAxis->coordToPixel(units.fromMetres(x)),
          plot().yAxis->coordToPixel(1e3 * time - display_.reductionAt(offset))};
}

}  // namespace strikeplate
