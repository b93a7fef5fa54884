#include "widgets/section_drawing.h"

#include <algorithm>
#include <cmath>

namespace strikeplate {

double SectionFrame::exaggeration() const {
  const double along = std::abs(xAxis->coordToPixel(1.0) - xAxis->coordToPixel(0.0));
  const double upwards = std::abs(yAxis->coordToPixel(1.0) - yAxis->coordToPixel(0.0));
  return along > 0.0 ? upwards / along : 1.0;
}

void drawWordsOnPaper(QPainter& painter, const Look& look, const QRectF& place, const QString& words,
                      const QColor& colour) {
  QColor paper = look.paper;
  paper.setAlpha(210);
  painter.fillRect(place.adjusted(-3, 0, 3, 0), paper);
  painter.setPen(colour);
  painter.drawText(place, Qt::AlignLeft | Qt::AlignVCenter, words);
}

void spreadApart(std::vector<double>& tops, double height, const QRectF& area) {
  for (std::size_t i = 0; i < tops.size(); ++i) {
    tops[i] = std::max(tops[i], i > 0 ? tops[i - 1] + height : area.top());
  }
  double limit = area.bottom() - height;
  for (auto top = tops.rbegin(); top != tops.rend(); ++top) {
    *top = std::min(*top, limit);
    limit = *top - height;
  }
}

SectionDrawing::SectionDrawing(QCustomPlot* plot) : QCPAbstractItem(plot) {}

void SectionDrawing::show(const Scene& scene, const Look& look) {
  if (scene.survey != scene_.survey) {
    ground_ = groundOf(*scene.survey);
  }
  if (scene.interpretation != scene_.interpretation) {
    allowances_.clear();
    if (scene.interpretation && scene.interpretation->section.determined) {
      allowances_ = hiddenAllowances(scene.interpretation->section);
    }
  }
  scene_ = scene;
  look_ = look;
}

SectionFrame SectionDrawing::frame() const {
  return {parentPlot()->xAxis, parentPlot()->yAxis, Units{scene_.survey && scene_.survey->settings.feet}};
}

void SectionDrawing::draw(QCPPainter* painter) {
  if (!scene_.survey) {
    return;
  }
  painter->setAntialiasing(true);
  const QString reason = emptyWords(scene_);
  const Section* section = reason.isEmpty() ? &scene_.interpretation->section : nullptr;
  if (section != nullptr) {
    for (std::size_t i = 0; i < section->interfaces.size(); ++i) {
      drawAllowance(*painter, *section, i);
    }
    for (std::size_t i = 0; i < section->interfaces.size(); ++i) {
      drawBand(*painter, *section, i);
    }
    for (std::size_t i = 0; i < section->interfaces.size(); ++i) {
      drawInterface(*painter, *section, i);
    }
  }
  if (!scene_.survey->shots.empty()) {
    drawGround(*painter);
    for (const Borehole& hole : scene_.survey->boreholes) {
      drawBorehole(*painter, hole);
    }
    drawShots(*painter);
    drawLegend(*painter, section != nullptr);
  }
  if (section != nullptr) {
    drawLayerNames(*painter, *section);
  } else {
    drawReason(*painter, reason);
  }
}

void SectionDrawing::drawGround(QPainter& painter) const {
  const SectionFrame f = frame();
  const QRectF area = f.area();
  QPolygonF line;
  const auto& points = ground_.points();
  line << QPointF(std::min(area.left(), points.empty() ? area.left() : f.x(points.front().x)),
                  f.y(points.empty() ? 0.0 : points.front().elevation));
  for (const Geophone& point : points) {
    line << f.at(point.x, point.elevation);
  }
  line << QPointF(std::max(area.right(), line.back().x()), line.back().y());
  painter.setBrush(Qt::NoBrush);
  painter.setPen(QPen(look_.ground, 1.6 * look_.lineWidth));
  painter.drawPolyline(line);
  painter.setPen(Qt::NoPen);
  painter.setBrush(look_.ink);
  for (const Geophone& geophone : scene_.survey->geophones) {
    paintLayerSymbol(painter, 5, f.at(geophone.x, geophone.elevation) - QPointF(0, 3.5), 5.0);
  }
}

void SectionDrawing::drawShots(QPainter& painter) const {
  const SectionFrame f = frame();
  for (int s = 0; s < static_cast<int>(scene_.survey->shots.size()); ++s) {
    const ShotPoint& point = scene_.survey->shots[static_cast<std::size_t>(s)].point;
    const bool chosen = s == scene_.selection.shot;
    painter.setPen(QPen(chosen ? look_.accent : look_.ink, 1.2 * look_.lineWidth));
    painter.setBrush(chosen ? look_.accent : look_.paper);
    const double above = point.depth > 0.0 ? 0.0 : 6.0;
    painter.drawEllipse(f.at(point.x, point.elevation - point.depth) - QPointF(0, above), chosen ? 5.0 : 4.0,
                        chosen ? 5.0 : 4.0);
  }
}

// The drilled depth as a stick with the 95 % interval at its foot; dashed when it is only compared.
void SectionDrawing::drawBorehole(QPainter& painter, const Borehole& hole) const {
  const SectionFrame f = frame();
  const double ground = ground_.at(hole.x);
  const QPointF top = f.at(hole.x, ground);
  const QPointF met = f.at(hole.x, ground - hole.depth);
  painter.setPen(QPen(look_.ink, 1.6 * look_.lineWidth, hole.used ? Qt::SolidLine : Qt::DashLine));
  painter.drawLine(top, met);
  painter.setPen(QPen(look_.layerColour(hole.layer), 2.2 * look_.lineWidth));
  painter.drawLine(met - QPointF(7, 0), met + QPointF(7, 0));
  painter.setPen(QPen(look_.ink, look_.lineWidth));
  for (const double sign : {-1.0, 1.0}) {
    const double y = f.y(ground - hole.depth + sign * kNormal95 * hole.sigma);
    painter.drawLine(QPointF(met.x() - 4, y), QPointF(met.x() + 4, y));
  }
  const QString name = QString::fromStdString(hole.name);
  const QSizeF size(painter.fontMetrics().horizontalAdvance(name) + 1.0, painter.fontMetrics().height());
  const QRectF area = f.area();
  const double left =
      std::clamp(top.x() - size.width() / 2.0, area.left(), std::max(area.left(), area.right() - size.width()));
  if (top.x() >= area.left() && top.x() <= area.right()) {
    drawWordsOnPaper(painter, look_, QRectF(QPointF(left, top.y() - 12.0 - size.height()), size), name, look_.ink);
  }
}

void SectionDrawing::drawLegend(QPainter& painter, bool section) const {
  const QRectF area = frame().area();
  QString words = QCoreApplication::translate("Section", "Vertical exaggeration %1 x")
                      .arg(frame().exaggeration(), 0, 'f', frame().exaggeration() < 10.0 ? 1 : 0);
  if (section) {
    const QString more = words + QCoreApplication::translate(
                                     "Section", "    Bands 68 and 95 %    Hatched: if an unseen layer hides above");
    words = painter.fontMetrics().horizontalAdvance(more) < area.width() - 40.0 ? more : words;
  }
  const QSizeF size(painter.fontMetrics().horizontalAdvance(words) + 1.0, painter.fontMetrics().height());
  drawWordsOnPaper(painter, look_, QRectF(QPointF(area.left() + 8, area.bottom() - size.height() - 3), size), words,
                   look_.ink);
}

void SectionDrawing::drawReason(QPainter& painter, const QString& words) const {
  const QRectF area = frame().area();
  const QRectF wide = area.adjusted(24, 24, -24, -24);
  const QRectF place = painter.fontMetrics().boundingRect(wide.toRect(), Qt::AlignCenter | Qt::TextWordWrap, words);
  painter.fillRect(place.adjusted(-8, -4, 8, 4), look_.paper);
  painter.setPen(look_.ink);
  painter.drawText(place, Qt::AlignCenter | Qt::TextWordWrap, words);
}

}  // namespace strikeplate
