#include <algorithm>
#include <cmath>

#include "core/base/units.h"
#include "widgets/sheet_plots.h"

namespace strikeplate {
namespace {

constexpr double kLegendHeight = 4.5;  // mm
constexpr double kShotRoom = 6.0;      // mm above the plot, for the shots' marks and numbers

// Symbols shrink so that a long line's picks stay apart.
double symbolSize(std::size_t picks) {
  return picks < 400 ? 1.7 : picks < 1200 ? 1.3 : 0.9;
}

double latest(const TravelTimes& times) {
  double most = 0.01;
  for (const Arrival& a : times.arrivals) {
    most = std::max(most, a.time + kNormal95 * a.sigma);
  }
  return most;
}

void paintPicks(SheetPaper& paper, const SheetFrame& frame, const TravelTimes& times) {
  QPainter& painter = paper.painter();
  const double size = symbolSize(times.arrivals.size());
  for (const Arrival& a : times.arrivals) {
    const double x = times.geophones[static_cast<std::size_t>(a.geophone)].x;
    const QColor colour = paper.layerColour(a.layer);
    paper.line(frame.at(x, a.time - kNormal95 * a.sigma), frame.at(x, a.time + kNormal95 * a.sigma),
               paper.look().faint, 0.12);
    painter.setPen(QPen(colour.darker(150), 0.15));
    painter.setBrush(colour);
    paintLayerSymbol(painter, a.layer, frame.at(x, a.time), size);
  }
  painter.setBrush(Qt::NoBrush);
}

void paintFits(SheetPaper& paper, const SheetFrame& frame, const Interpretation& interpretation) {
  const TravelTimes& times = interpretation.times;
  for (const Branch& branch : interpretation.branches) {
    if (!branch.fit.determined || branch.arrivals.empty()) {
      continue;
    }
    const double shot = times.shots[static_cast<std::size_t>(branch.shot)].x;
    const double first = times.offset(times.arrivals[static_cast<std::size_t>(branch.arrivals.front())]);
    const double last = times.offset(times.arrivals[static_cast<std::size_t>(branch.arrivals.back())]);
    QPolygonF fit;
    fit << frame.at(shot + branch.side * first, branch.fit.at(first))
        << frame.at(shot + branch.side * last, branch.fit.at(last));
    for (const QPolygonF& part : lineWithin(fit, frame.area)) {
      paper.line(part.front(), part.back(), paper.layerColour(branch.layer).darker(125), 0.3);
    }
  }
}

// Numbers only where there is room for them.
void paintShots(SheetPaper& paper, const SheetFrame& frame, const TravelTimes& times) {
  const double y = frame.area.top() - 1.7;
  double free = -1e9;
  for (std::size_t s = 0; s < times.shots.size(); ++s) {
    const double x = frame.x(times.shots[s].x);
    paintShotMark(paper, {x, y}, 1.7);
    if (x > free) {
      paper.label({x, y - 1.6}, QString::number(s + 1), {6.0, false, paper.look().ink, Qt::AlignHCenter});
      free = x + 4.0;
    }
  }
}

void paintLegend(SheetPaper& paper, const QPointF& corner, const Interpretation& interpretation) {
  QPainter& painter = paper.painter();
  const SheetText style{6.5, false, paper.look().ink};
  double x = corner.x();
  const double y = corner.y() + 2.0;
  for (int layer = 1; layer <= interpretation.section.layers; ++layer) {
    painter.setPen(QPen(paper.layerColour(layer).darker(130), 0.2));
    painter.setBrush(paper.layerColour(layer));
    paintLayerSymbol(painter, layer, {x + 1.0, y - 0.8}, 1.8);
    painter.setBrush(Qt::NoBrush);
    const QString words = QStringLiteral("layer %1").arg(layer);
    paper.label({x + 2.8, y}, words, style);
    x += 6.0 + paper.width(words, style);
  }
  const QString rest = QStringLiteral("bars: 95 % of each pick     lines: fitted to each branch     numbers: shots");
  paper.label({x + 1.0, y}, rest, style);
}

}  // namespace

void paintShotMark(SheetPaper& paper, const QPointF& centre, double size) {
  if (!paper.dry()) {
    paper.painter().setPen(QPen(paper.look().ink, 0.3));
    paintLayerSymbol(paper.painter(), 6, centre, size);
  }
}

void paintTravelTimes(SheetPaper& paper, const QRectF& area, const SheetFigures& figures) {
  if (paper.dry()) {
    return;
  }
  const TravelTimes& times = figures.interpretation.times;
  if (times.arrivals.empty()) {
    paper.text(area.topLeft(), area.width(), QStringLiteral("No travel times can be drawn: there is no used pick."),
               {8.0, false, paper.look().faint});
    return;
  }
  SheetFrame frame;
  frame.area = area.adjusted(kAxisLeft, kShotRoom, -2.0, -kAxisBottom - kLegendHeight);
  const SheetSpan span = sheetSpan(figures);
  frame.left = span.left;
  frame.right = span.right;
  frame.bottom = 0.0;
  frame.top = 1.05 * latest(times);
  const Units units{figures.sheet.feet};
  paintAxes(paper, frame,
            {QStringLiteral("distance along the line (%1)").arg(QString::fromStdString(units.lengthUnit())),
             QStringLiteral("time after the blow (ms)"), units.fromMetres(1.0), 1e3});
  QPainter& painter = paper.painter();
  painter.save();
  painter.setClipRect(frame.area);
  paintFits(paper, frame, figures.interpretation);
  paintPicks(paper, frame, times);
  painter.restore();
  painter.setPen(QPen(paper.look().ink, 0.2));
  painter.drawRect(frame.area);
  paintShots(paper, frame, times);
  paintLegend(paper, {frame.area.left(), area.bottom() - kLegendHeight + 1.2}, figures.interpretation);
}

}  // namespace strikeplate
