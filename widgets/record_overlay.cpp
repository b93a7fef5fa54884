#include "widgets/record_overlay.h"

#include <algorithm>
#include <cmath>

#include <QPainter>

#include "widgets/record_gesture.h"
#include "widgets/record_steps.h"

namespace strikeplate {
namespace {

constexpr double kHalo = 3.0;  // px of paper around what lies over traces

/// The same drawing twice: broad in paper, so that it stands off the traces, then in its colour.
template <class Draw>
void withHalo(QPainter& painter, const Look& look, const QColor& colour, double width, Draw draw) {
  QColor under = look.paper;
  under.setAlpha(200);
  painter.setPen(QPen(under, width + kHalo, Qt::SolidLine, Qt::FlatCap));
  draw();
  painter.setPen(QPen(colour, width, Qt::SolidLine, Qt::FlatCap));
  draw();
}

void fillStrip(QPainter& painter, const RecordAxes& axes, int first, int last, QColor colour, int alpha) {
  const double half = 0.5 * axes.spacing();
  const double a = axes.xOf(first), b = axes.xOf(last);
  colour.setAlpha(alpha);
  painter.fillRect(
      QRectF(std::min(a, b) - half, axes.plot().top(), std::abs(b - a) + 2.0 * half, axes.plot().height())
          .intersected(axes.plot()),
      colour);
}

/// An upright bar with feet, from one time to another.
void drawBar(QPainter& painter, double x, double y1, double y2, double foot) {
  painter.drawLine(QPointF(x, y1), QPointF(x, y2));
  painter.drawLine(QPointF(x - foot, y1), QPointF(x + foot, y1));
  painter.drawLine(QPointF(x - foot, y2), QPointF(x + foot, y2));
}

struct PickPlace {
  double x, y, half, size, symbolX;
};

PickPlace placeOf(const RecordAxes& axes, int trace, const Pick& pick) {
  PickPlace place{};
  place.x = axes.xOf(trace);
  place.y = axes.yOf(trace, pick.time);
  place.half = std::clamp(0.42 * axes.spacing(), 2.0, 26.0);
  place.size = std::clamp(0.5 * axes.spacing(), 3.5, 9.0);
  // Beside the trace, so that the onset stays in sight, unless there is no room beside it.
  place.symbolX = axes.spacing() < 14.0 ? place.x : place.x - place.half;
  return place;
}

void paintBracket(QPainter& painter, const RecordPicture& picture, int trace, const Pick& pick) {
  const RecordAxes& axes = picture.axes;
  const double x = bracketX(axes, trace);
  const double early = axes.yOf(trace, pick.time - pick.sigma), late = axes.yOf(trace, pick.time + pick.sigma);
  withHalo(painter, picture.look, picture.look.accent, 2.0, [&] { drawBar(painter, x, early, late, 5.0); });
}

void paintPick(QPainter& painter, const RecordPicture& picture, int trace, const Pick& pick, bool selected) {
  const RecordAxes& axes = picture.axes;
  const PickPlace place = placeOf(axes, trace, pick);
  const QColor colour = picture.look.layerColour(picture.layerOf(trace));
  const double width = 1.4 * picture.look.lineWidth;
  const double early = axes.yOf(trace, pick.time - pick.sigma), late = axes.yOf(trace, pick.time + pick.sigma);
  withHalo(painter, picture.look, colour, width,
           [&] { painter.drawLine(QPointF(place.x - place.half, place.y), QPointF(place.x + place.half, place.y)); });
  withHalo(painter, picture.look, colour, 1.2,
           [&] { drawBar(painter, place.symbolX, early, late, 0.3 * place.size); });
  painter.setPen(QPen(colour, 1.5));
  painter.setBrush(pick.origin == PickOrigin::Hand ? colour : picture.look.paper);
  paintLayerSymbol(painter, picture.layerOf(trace), QPointF(place.symbolX, place.y), place.size);
  painter.setBrush(Qt::NoBrush);
  if (isDoubtful(picture.scene.interpretation.get(), picture.shotIndex(), trace)) {
    const double ring = std::max(5.5, place.size + 2.0);
    withHalo(painter, picture.look, picture.look.warning, 1.8,
             [&] { painter.drawEllipse(QPointF(place.symbolX, place.y), ring, ring); });
  }
  if (selected) {
    paintBracket(painter, picture, trace, pick);
  }
}

}  // namespace

void paintRecordMarks(QPainter& painter, const RecordPicture& picture, const RecordMarks& marks) {
  const RecordAxes& axes = picture.axes;
  if (marks.range.first >= 0 && marks.range.second < axes.count()) {
    fillStrip(painter, axes, marks.range.first, marks.range.second, picture.look.accent, 40);
  }
  if (marks.selected >= 0 && marks.selected < axes.count()) {
    fillStrip(painter, axes, marks.selected, marks.selected, picture.look.accent, 48);
  }
  double x = Estimate::kNaN;
  if (picture.display.truePosition) {
    x = axes.xAt(marks.plumbLine);
  } else if (marks.underPlumbLine >= 0 && marks.underPlumbLine < axes.count()) {
    x = axes.xOf(marks.underPlumbLine);
  }
  if (axes.plot().left() <= x && x <= axes.plot().right()) {
    painter.setPen(QPen(picture.look.accent, 1.0));
    painter.drawLine(QPointF(x, axes.plot().top()), QPointF(x, axes.plot().bottom()));
  }
}

void paintPredicted(QPainter& painter, const RecordPicture& picture) {
  const RecordAxes& axes = picture.axes;
  const double half = std::clamp(0.5 * axes.spacing(), 2.0, 30.0);
  for (int t = 0; t < axes.count(); ++t) {
    const double time = picture.predictedOf(t);
    if (!std::isfinite(time)) {
      continue;
    }
    const auto& layers = picture.scene.interpretation->section.layerOf;
    const auto a = static_cast<std::size_t>(picture.arrivalOf(t));
    const QColor colour = picture.look.layerColour(a < layers.size() ? layers[a] : picture.layerOf(t));
    const double x = axes.xOf(t), y = axes.yOf(t, time);
    QColor under = picture.look.paper;
    under.setAlpha(200);
    painter.setPen(QPen(under, 3.5));
    painter.drawLine(QPointF(x - half, y), QPointF(x + half, y));
    QPen pen(colour, 1.8, Qt::SolidLine, Qt::FlatCap);
    pen.setDashPattern({2.0, 2.0});
    painter.setPen(pen);
    painter.drawLine(QPointF(x - half, y), QPointF(x + half, y));
  }
}

void paintReciprocal(QPainter& painter, const RecordPicture& picture) {
  if (!picture.scene.interpretation) {
    return;
  }
  const RecordAxes& axes = picture.axes;
  const auto& shots = picture.scene.survey->shots;
  const QFontMetricsF metrics(picture.font);
  painter.setFont(picture.font);
  for (const ReciprocalPair& pair : picture.scene.interpretation->reciprocals) {
    const bool isA = pair.shotA == picture.shotIndex();
    const auto other = static_cast<std::size_t>(isA ? pair.shotB : pair.shotA);
    if ((!isA && pair.shotB != picture.shotIndex()) || other >= shots.size()) {
      continue;
    }
    const double x = axes.xOfMetres(shots[other].point.x);
    const double offset = std::abs(shots[other].point.x - picture.shot.point.x);
    const double v = picture.display.reducingVelocity;
    const double time = (isA ? pair.timeBA : pair.timeAB) - (v > 0.0 ? offset / v : 0.0);
    const double y = axes.yOfShown(time);
    if (!axes.plot().adjusted(-1, 0, 1, 0).contains(QPointF(x, y))) {
      continue;
    }
    const QColor colour = std::abs(pair.difference()) > pair.tolerance ? picture.look.warning : picture.look.ink;
    withHalo(painter, picture.look, colour, 1.4, [&] {
      drawBar(painter, x, axes.yOfShown(time - pair.tolerance), axes.yOfShown(time + pair.tolerance), 4.0);
      painter.drawPolyline(QPolygonF({QPointF(x - 5.0, y - 4.0), QPointF(x, y), QPointF(x - 5.0, y + 4.0)}));
      painter.drawPolyline(QPolygonF({QPointF(x + 5.0, y - 4.0), QPointF(x, y), QPointF(x + 5.0, y + 4.0)}));
    });
    const QString name = QString::number(other + 1);
    const double w = metrics.horizontalAdvance(name) + 4.0;
    const double left = x + 7.0 + w > axes.plot().right() ? x - 7.0 - w : x + 7.0;
    // Above the mark, for picks come in from the side.
    const QRectF box(left, y - 1.1 * metrics.height(), w, metrics.height());
    QColor under = picture.look.paper;
    under.setAlpha(210);
    painter.fillRect(box, under);
    painter.drawText(box, Qt::AlignCenter, name);
  }
}

void paintPicks(QPainter& painter, const RecordPicture& picture, int selected) {
  const auto paint = [&](int t) {
    const auto& pick = picture.shot.traces[static_cast<std::size_t>(t)].pick;
    if (pick) {
      paintPick(painter, picture, t, *pick, t == selected);
    }
  };
  for (int t = 0; t < picture.axes.count(); ++t) {
    if (t != selected) {
      paint(t);
    }
  }
  if (selected >= 0 && selected < picture.axes.count()) {
    paint(selected);
  }
}

}  // namespace strikeplate
