#include <algorithm>
#include <cmath>

#include "core/base/file_names.h"
#include "core/base/units.h"
#include "core/survey/gathers.h"
#include "widgets/record_traces.h"
#include "widgets/sheet_plots.h"

namespace strikeplate {
namespace {

constexpr double kTitleRoom = 4.6;    // mm
constexpr double kPointSpace = 0.25;  // mm along time between the points that a trace is drawn with
constexpr double kSwing = 0.95;       // of the trace spacing, at most

// Time after the blow that is shown, s: a little noise before it, and half as much again as the latest pick.
struct Window {
  double from = 0.0, to = 0.1;
};

Window windowOf(const Gather& gather, const Shot& shot) {
  const double start = gather.start + shot.triggerCorrection;
  const double end = start + gather.sampleInterval * static_cast<double>(gather.traces.front().size());
  double latest = 0.0;
  for (const ShotTrace& trace : shot.traces) {
    latest = std::max(latest, trace.pick ? trace.pick->time + shot.triggerCorrection : 0.0);
  }
  const double to = latest > 0.0 ? std::min(end, 1.5 * latest) : end;
  return {std::max(start, -0.08 * to), to};
}

QString titleOf(const Survey& survey, int shotIndex, const Units& units) {
  const Shot& shot = survey.shots[static_cast<std::size_t>(shotIndex)];
  QString names;
  int used = 0;
  for (const Blow& blow : shot.blows) {
    if (blow.used) {
      const std::string name = lastPart(survey.records[static_cast<std::size_t>(blow.record)]->file);
      names += (used++ > 0 ? QStringLiteral(" + ") : QString()) + QString::fromStdString(name);
    }
  }
  return QStringLiteral("Shot %1 at %2: %3")
      .arg(shotIndex + 1)
      .arg(QString::fromStdString(units.length(shot.point.x)), names);
}

// The smallest distance between neighbouring geophones on paper, so that no trace runs into the next but one.
double spacingOf(const SheetFrame& frame, const Gather& gather) {
  double least = 12.0;  // mm; a single trace is no wider
  for (std::size_t t = 1; t < gather.geophones.size(); ++t) {
    const double step = std::abs(frame.x(gather.geophones[t].x) - frame.x(gather.geophones[t - 1].x));
    least = step > 0.0 ? std::min(least, step) : least;
  }
  return least;
}

// A point in the middle of an upright stretch is left out: quiet traces need few.
void addPoint(QPolygonF& points, const QPointF& point) {
  constexpr double kSame = 0.01;  // mm
  const qsizetype n = points.size();
  const auto same = [&](const QPointF& other) { return std::abs(other.x() - point.x()) < kSame; };
  if (n >= 2 && same(points[n - 1]) && same(points[n - 2])) {
    points[n - 1] = point;
  } else {
    points << point;
  }
}

// A trace as points on paper: where samples are closer than the points, the largest swing among them stands for all.
QPolygonF pointsOf(const SheetFrame& frame, std::span<const float> samples, double start, double interval,
                   double rest, double swing, float unit) {
  QPolygonF points;
  const double perPoint = std::max(1.0, kPointSpace / (std::abs(frame.y(interval) - frame.y(0.0)) + 1e-12));
  const auto count = static_cast<double>(samples.size());
  for (double i = std::max(0.0, std::ceil((frame.top - start) / interval - 1e-9)); i + 1.0 <= count; i += perPoint) {
    const double time = start + i * interval;
    if (time > frame.bottom) {
      break;
    }
    const auto first = static_cast<std::size_t>(i);
    const auto last = std::min(samples.size(), std::max(first + 1, static_cast<std::size_t>(i + perPoint)));
    float value = samples[first];
    for (std::size_t k = first; k < last; ++k) {
      value = std::abs(samples[k]) > std::abs(value) ? samples[k] : value;
    }
    const double size = unit > 0.0F ? std::clamp(static_cast<double>(value / unit), -1.0, 1.0) : 0.0;
    addPoint(points, {rest + swing * size, frame.y(time)});
  }
  return points;
}

void paintTrace(SheetPaper& paper, const QPolygonF& points, double rest, const QColor& line) {
  if (points.size() < 2) {
    return;
  }
  QPolygonF area;
  area << QPointF(rest, points.front().y());
  for (const QPointF& point : points) {
    area << QPointF(std::max(rest, point.x()), point.y());
  }
  area << QPointF(rest, points.back().y());
  QPainter& painter = paper.painter();
  painter.setPen(Qt::NoPen);
  painter.setBrush(QColor(0xa4, 0xa4, 0xa4));
  painter.drawPolygon(area);
  painter.setBrush(Qt::NoBrush);
  painter.setPen(QPen(line, 0.08));
  painter.drawPolyline(points);
}

void paintPicks(SheetPaper& paper, const SheetFrame& frame, const SheetFigures& figures, int shotIndex, double half) {
  const Shot& shot = figures.survey.shots[static_cast<std::size_t>(shotIndex)];
  const TravelTimes& times = figures.interpretation.times;
  const double size = std::clamp(1.3 * half, 0.9, 1.7);
  QPainter& painter = paper.painter();
  for (std::size_t t = 0; t < shot.traces.size(); ++t) {
    const ShotTrace& trace = shot.traces[t];
    if (!trace.pick || trace.state == TraceState::Dead) {
      continue;
    }
    const int arrival = figures.interpretation.arrivalOf(shotIndex, static_cast<int>(t));
    const int layer = arrival >= 0 ? times.arrivals[static_cast<std::size_t>(arrival)].layer : trace.pick->layer;
    const double time = trace.pick->time + shot.triggerCorrection;
    const double x = figures.survey.geophones[static_cast<std::size_t>(trace.geophone)].x;
    const double bar = kNormal95 * trace.pick->sigma;
    paper.line(frame.at(x, time - bar), frame.at(x, time + bar), paper.look().ink, 0.25);
    painter.setPen(QPen(paper.look().ink, 0.15));
    painter.setBrush(paper.layerColour(layer));
    paintLayerSymbol(painter, layer, frame.at(x, time), size);
  }
  painter.setBrush(Qt::NoBrush);
}

}  // namespace

void paintRecord(SheetPaper& paper, const QRectF& area, const SheetFigures& figures, int shotIndex) {
  if (paper.dry()) {
    return;
  }
  const Look& look = paper.look();
  const Units units{figures.sheet.feet};
  const Shot& shot = figures.survey.shots[static_cast<std::size_t>(shotIndex)];
  paper.text(area.topLeft(), area.width(), titleOf(figures.survey, shotIndex, units),
             {7.5, true, look.ink, Qt::AlignLeft, 1});
  const Gather gather = gatherOf(figures.survey, shotIndex);
  if (gather.traces.empty() || gather.traces.front().empty()) {
    paper.text(area.topLeft() + QPointF(0.0, kTitleRoom), area.width(),
               QStringLiteral("There is no record of this shot; its times came from a table."),
               {7.0, false, look.ink});
    return;
  }
  const Window window = windowOf(gather, shot);
  const SheetSpan span = sheetSpan(figures);
  SheetFrame frame;
  frame.area = area.adjusted(kAxisLeft, kTitleRoom, -2.0, -kAxisBottom);
  frame.left = span.left;
  frame.right = span.right;
  frame.top = window.from;  // time runs down the page
  frame.bottom = window.to;
  paintAxes(paper, frame,
            {QStringLiteral("distance along the line (%1)").arg(QString::fromStdString(units.lengthUnit())),
             QStringLiteral("time after the blow (ms)"), units.fromMetres(1.0), 1e3});
  QPainter& painter = paper.painter();
  painter.save();
  painter.setClipRect(frame.area);
  const ShownTraces shown(gather, shot, {});
  const std::vector<float> largest =
      shown.units(window.from - shot.triggerCorrection, window.to - shot.triggerCorrection, TraceScale::Trace);
  const double spacing = spacingOf(frame, gather);
  for (std::size_t t = 0; t < shown.count(); ++t) {
    const double rest = frame.x(gather.geophones[t].x);
    const bool dead = shot.traces[t].state == TraceState::Dead;
    if (dead) {
      painter.setPen(QPen(look.faint, 0.2, Qt::DashLine));
      painter.drawLine(QPointF(rest, frame.area.top()), QPointF(rest, frame.area.bottom()));
      continue;
    }
    paintTrace(paper,
               pointsOf(frame, shown.trace(t), gather.start + shot.triggerCorrection, gather.sampleInterval, rest,
                        kSwing * spacing, largest[t]),
               rest, look.faint);
  }
  paintPicks(paper, frame, figures, shotIndex, 0.5 * spacing);
  paintShotMark(paper, {frame.x(shot.point.x), frame.y(std::max(0.0, window.from))}, 2.2);
  painter.restore();
  painter.setPen(QPen(look.ink, 0.2));
  painter.drawRect(frame.area);
}

}  // namespace strikeplate
