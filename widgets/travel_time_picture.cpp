#include "widgets/travel_time_picture.h"

#include <algorithm>
#include <cmath>
#include <limits>
#include <optional>

#include <QCoreApplication>
#include <qcustomplot.h>

#include "core/base/units.h"
#include "core/traveltime/line_fit.h"
#include "widgets/plot_look.h"

namespace strikeplate {
namespace {

constexpr int kSymbols = 7;  // layer 0 (none) to 6
constexpr double kEndSize = 13.0;
constexpr int kSteppedBack = 45;  // opacity of the side that does not stand out

QString tr(const char* text) {
  return QCoreApplication::translate("strikeplate::TravelTimePlot", text);
}

QString lineText(const Branch& branch, const Units& units) {
  const QString velocity = QString::fromStdString(units.velocityUnit());
  QString text = branch.velocity.determined && std::isfinite(branch.velocity.high95)
                     ? QString("%1 ± %2 %3")
                           .arg(std::lround(units.fromMetres(branch.velocity.value)))
                           .arg(std::lround(units.fromMetres(kNormal95 * branch.velocity.sigma)))
                           .arg(velocity)
                     : QString::fromStdString(units.velocity(branch.velocity.value));
  if (!branch.fit.throughOrigin) {
    text += ", " + QString::fromStdString(milliseconds(branch.fit.intercept));
  }
  return text;
}

}  // namespace

double shownTime(const Interpretation& interpretation, int arrival, const TravelTimeDisplay& display) {
  const auto i = static_cast<std::size_t>(arrival);
  const Arrival& a = interpretation.times.arrivals[i];
  if (display.residuals) {
    const bool known = interpretation.section.determined && i < interpretation.section.predicted.size();
    return known ? 1e3 * (a.time - interpretation.section.predicted[i]) : Estimate::kNaN;
  }
  return 1e3 * a.time - display.reductionAt(interpretation.times.offset(a));
}

double TravelTimePicture::positionOf(int geophone) const {
  const Units units{scene_.survey->settings.feet};
  return units.fromMetres(scene_.interpretation->times.geophones[static_cast<std::size_t>(geophone)].x);
}

int TravelTimePicture::strength(double signedOffset, int full) const {
  return display_.side != 0 && signedOffset * display_.side < 0.0 ? kSteppedBack : full;
}

bool TravelTimePicture::isSelected(const Arrival& arrival) const {
  return arrival.shot == scene_.selection.shot;
}

void TravelTimePicture::draw(const Scene& scene, const Look& look, const TravelTimeDisplay& display,
                             const std::set<TraceOfShot>& marked) {
  if (!(display == display_)) {
    top_ = bottom_ = 0.0;
  }
  scene_ = scene;
  look_ = look;
  display_ = display;
  marked_ = marked;
  for (QCPItemText* text : labels_) {
    plot_.removeItem(text);
  }
  labels_.clear();
  const QString velocity =
      QString::fromStdString(Units{scene.survey->settings.feet}.velocity(display.reductionVelocity));
  plot_.yAxis->setLabel(display.residuals                 ? tr("Pick minus section (ms)")
                        : display.reductionVelocity > 0.0 ? tr("Time less offset over %1 (ms)").arg(velocity)
                                                          : tr("Time (ms)"));
  if (!scene.interpretation) {
    plot_.yAxis->setRange(0.0, 100.0);
    return;
  }
  setTimeAxis();
  drawCurves(false);
  drawPicks(false);
  drawCurves(true);
  drawReciprocals();
  drawLines();
  drawBranchMarks();
  drawMarked();
  drawPicks(true);
  drawEnds();
}

void TravelTimePicture::setTimeAxis() {
  double most = display_.residuals ? 1.0 : 10.0;
  double least = display_.residuals ? -1.0 : 0.0;
  for (std::size_t i = 0; i < scene_.interpretation->times.arrivals.size(); ++i) {
    const double t = shownTime(*scene_.interpretation, static_cast<int>(i), display_);
    if (std::isfinite(t)) {
      most = std::max(most, t);
      least = std::min(least, t);
    }
  }
  if (display_.residuals) {
    // A gross mispick must not flatten all others.
    most = std::min(most, 10.0);
    least = std::max(least, -10.0);
  }
  // The axis stays while a pick is dragged within it, so that nothing jumps under the pointer.
  if (most > top_ || most < 0.75 * top_) {
    top_ = 1.1 * most;
  }
  if (least < bottom_ || least > 0.75 * bottom_) {
    bottom_ = 1.1 * least;
  }
  plot_.yAxis->setRange(bottom_, top_);
}

void TravelTimePicture::drawCurves(bool selected) {
  if (!display_.predicted || display_.residuals || !scene_.interpretation->section.determined) {
    return;
  }
  const auto& arrivals = scene_.interpretation->times.arrivals;
  const auto& predicted = scene_.interpretation->section.predicted;
  QVector<double> key, x, t;
  double n = 0.0;
  int last = -1;
  for (std::size_t i = 0; i < std::min(arrivals.size(), predicted.size()); ++i) {
    if (isSelected(arrivals[i]) != selected || !display_.shows(arrivals[i].shot, scene_.selection) ||
        strength(scene_.interpretation->times.signedOffset(arrivals[i]), 255) < 255) {
      continue;
    }
    if (last >= 0 && arrivals[i].shot != last) {
      key << n++;
      x << 0.0;
      t << Estimate::kNaN;
    }
    last = arrivals[i].shot;
    key << n++;
    x << positionOf(arrivals[i].geophone);
    t << 1e3 * predicted[i] - display_.reductionAt(scene_.interpretation->times.offset(arrivals[i]));
  }
  auto* curve = new QCPCurve(plot_.xAxis, plot_.yAxis);
  curve->setData(key, x, t, true);
  QColor colour = selected ? look_.ink : look_.faint;
  colour.setAlpha(selected ? 255 : 130);
  curve->setPen(QPen(colour, (selected ? 1.4 : 0.8) * look_.lineWidth));
}

void TravelTimePicture::drawPicks(bool selected) {
  const TravelTimes& times = scene_.interpretation->times;
  // For every layer, first those that stand out and then those of the side that steps back.
  struct Points {
    QVector<double> x, t, bar;
  };
  Points points[kSymbols][2];
  for (std::size_t i = 0; i < times.arrivals.size(); ++i) {
    const Arrival& a = times.arrivals[i];
    const double time = shownTime(*scene_.interpretation, static_cast<int>(i), display_);
    if (isSelected(a) == selected && display_.shows(a.shot, scene_.selection) && std::isfinite(time)) {
      Points& of = points[std::clamp(a.layer, 0, kSymbols - 1)][strength(times.signedOffset(a), 255) < 255 ? 1 : 0];
      of.x << positionOf(a.geophone);
      of.t << time;
      of.bar << 1e3 * kNormal95 * a.sigma;
    }
  }
  for (int layer = 0; layer < kSymbols; ++layer) {
    for (const int back : {1, 0}) {
      const Points& of = points[layer][back];
      if (of.x.isEmpty()) {
        continue;
      }
      auto* graph = plot_.addGraph();
      graph->setData(of.x, of.t);
      graph->setLineStyle(QCPGraph::lsNone);
      QCPScatterStyle style = layerScatter(look_, layer, selected ? 7.0 : 4.5);
      QColor colour = look_.layerColour(layer);
      colour.setAlpha(back != 0 ? kSteppedBack : selected ? 255 : 150);
      style.setPen(QPen(colour, (selected ? 1.5 : 1.0) * look_.lineWidth));
      graph->setScatterStyle(style);
      auto* bars = new QCPErrorBars(plot_.xAxis, plot_.yAxis);
      bars->setDataPlottable(graph);
      bars->setData(of.bar);
      bars->setSymbolGap(selected ? 7.0 : 4.5);
      bars->setWhiskerWidth(selected ? 4.0 : 0.0);
      bars->setPen(QPen(colour, 0.8 * look_.lineWidth));
    }
  }
}

void TravelTimePicture::drawLines() {
  if (!display_.fittedLines || display_.residuals) {
    return;
  }
  const Units units{scene_.survey->settings.feet};
  const TravelTimes& times = scene_.interpretation->times;
  for (const Branch& branch : scene_.interpretation->branches) {
    if (branch.shot != scene_.selection.shot || !branch.fit.determined || branch.arrivals.size() < 2 ||
        strength(branch.side, 255) < 255) {
      continue;
    }
    const double shot = times.shots[static_cast<std::size_t>(branch.shot)].x;
    const double from = times.offset(times.arrivals[static_cast<std::size_t>(branch.arrivals.front())]);
    const double to = times.offset(times.arrivals[static_cast<std::size_t>(branch.arrivals.back())]);
    const auto segment = [&](double a, double b, Qt::PenStyle style, double width) {
      auto* line = new QCPCurve(plot_.xAxis, plot_.yAxis);
      for (const double offset : {a, b}) {
        line->addData(units.fromMetres(shot + branch.side * offset),
                      1e3 * branch.fit.at(offset) - display_.reductionAt(offset));
      }
      line->setPen(QPen(look_.layerColour(branch.layer), width * look_.lineWidth, style));
    };
    segment(0.0, from, branch.fit.throughOrigin ? Qt::SolidLine : Qt::DashLine, branch.fit.throughOrigin ? 1.8 : 1.0);
    segment(from, to, Qt::SolidLine, 1.8);
    const double middle = 0.5 * (from + to);
    label(branch, units.fromMetres(shot + branch.side * middle),
          1e3 * branch.fit.at(middle) - display_.reductionAt(middle));
  }
}

void TravelTimePicture::label(const Branch& branch, double x, double time) {
  if (!plot_.xAxis->range().contains(x)) {
    return;
  }
  const QString text = lineText(branch, Units{scene_.survey->settings.feet});
  const QFontMetrics metrics(plot_.font());
  const QSizeF size(metrics.horizontalAdvance(text) + 4, metrics.height() + 2);
  const QPointF at(plot_.xAxis->coordToPixel(x), plot_.yAxis->coordToPixel(time));
  const QRectF inside = plot_.axisRect()->rect();
  const auto rectOf = [](const QCPItemText* item) {
    return QRectF(item->topLeft->pixelPosition(), item->bottomRight->pixelPosition());
  };
  // Beside the middle of its line, where it covers no other text and the fewest picks.
  std::optional<QRectF> best;
  int fewest = std::numeric_limits<int>::max();
  for (const double dy : {-22.0, 22.0, -40.0, 40.0, -58.0, 58.0}) {
    for (const double dx : {0.0, -0.55, 0.55}) {
      QRectF place(QPointF(at.x() + (dx - 0.5) * size.width(), at.y() + dy - 0.5 * size.height()), size);
      place.moveLeft(
          std::clamp(place.left(), inside.left() + 2, std::max(inside.left() + 2, inside.right() - size.width())));
      const bool free = inside.contains(place) && std::none_of(labels_.begin(), labels_.end(), [&](auto* other) {
                          return rectOf(other).intersects(place);
                        });
      const int covered = free ? picksUnder(place) : fewest;
      if (covered < fewest) {
        fewest = covered;
        best = place;
      }
    }
  }
  if (!best) {
    return;
  }
  auto* item = new QCPItemText(&plot_);
  item->setText(text);
  item->setFont(plot_.font());
  item->setColor(look_.ink);
  QColor behind = look_.paper;
  behind.setAlpha(200);
  item->setBrush(behind);
  item->setPadding(QMargins(2, 1, 2, 1));
  item->setPositionAlignment(Qt::AlignTop | Qt::AlignLeft);
  item->setClipToAxisRect(true);
  item->position->setType(QCPItemPosition::ptAbsolute);
  item->position->setCoords(best->topLeft());
  item->setSelectable(false);
  labels_.push_back(item);
}

int TravelTimePicture::picksUnder(const QRectF& place) const {
  const QRectF room = place.adjusted(-5, -5, 5, 5);
  int count = 0;
  const auto& arrivals = scene_.interpretation->times.arrivals;
  for (std::size_t i = 0; i < arrivals.size(); ++i) {
    if (isSelected(arrivals[i])) {
      const double time = shownTime(*scene_.interpretation, static_cast<int>(i), display_);
      count +=
          room.contains(plot_.xAxis->coordToPixel(positionOf(arrivals[i].geophone)), plot_.yAxis->coordToPixel(time))
              ? 1
              : 0;
    }
  }
  return count;
}

void TravelTimePicture::drawMarked() {
  QVector<double> x, t;
  const auto& arrivals = scene_.interpretation->times.arrivals;
  for (std::size_t i = 0; i < arrivals.size(); ++i) {
    const Arrival& a = arrivals[i];
    const bool chosen = isSelected(a) && a.trace == scene_.selection.trace;
    if (chosen || marked_.contains({a.shot, a.trace})) {
      x << positionOf(a.geophone);
      t << shownTime(*scene_.interpretation, static_cast<int>(i), display_);
    }
  }
  auto* graph = plot_.addGraph();
  graph->setData(x, t);
  graph->setLineStyle(QCPGraph::lsNone);
  QColor halo = look_.accent;
  halo.setAlpha(90);
  graph->setScatterStyle(QCPScatterStyle(QCPScatterStyle::ssDisc, QPen(Qt::NoPen), halo, 15));
}

void TravelTimePicture::drawEnds() {
  for (const BranchEnd& end : branchEnds(scene_.interpretation->branches, scene_.selection.shot)) {
    const Arrival& a = scene_.interpretation->times.arrivals[static_cast<std::size_t>(end.arrival)];
    auto* graph = plot_.addGraph();
    graph->setData({positionOf(a.geophone)}, {shownTime(*scene_.interpretation, end.arrival, display_)});
    graph->setLineStyle(QCPGraph::lsNone);
    graph->setScatterStyle(QCPScatterStyle(
        QCPScatterStyle::ssCircle, QPen(look_.layerColour(end.layer), 1.6 * look_.lineWidth), Qt::NoBrush, kEndSize));
  }
}

}  // namespace strikeplate
