// How the line strip looks.
#include <algorithm>
#include <cmath>

#include <QPainter>

#include "core/base/units.h"
#include "widgets/line_strip.h"

namespace strikeplate {
namespace {

constexpr double kLargestRing = 7.0;  // px

QFont sized(const QFont& font, double factor) {
  QFont small = font;
  small.setPointSizeF(std::max(6.0, font.pointSizeF() * factor));
  return small;
}

}  // namespace

// Rows from the top: numbers, rings, ruler, its figures.
double LineStrip::shotRow() const {
  return fontMetrics().height() + kLargestRing + 3.0;
}

double LineStrip::ruler() const {
  return shotRow() + kLargestRing + 12.0;
}

QSize LineStrip::sizeHint() const {
  return {600, static_cast<int>(ruler()) + 5 + fontMetrics().height()};
}

double LineStrip::pixel(double x) const {
  return marginLeft_ + (x - range_.left) / axis().metresPerPixel();
}

// As large as the closest neighbours leave room for.
double LineStrip::shotRadius() const {
  double gap = 2.0 * kLargestRing + 2.0;
  for (std::size_t i = 1; i < shots_.size(); ++i) {
    const double between = std::abs(pixel(shots_[i].point.x) - pixel(shots_[i - 1].point.x));
    gap = between > 1.0 ? std::min(gap, between) : gap;
  }
  return std::clamp(0.5 * gap - 1.0, 3.0, kLargestRing);
}

QPointF LineStrip::shotPlace(int shot) const {
  const double x = shots_[static_cast<std::size_t>(shot)].point.x;
  const double edge = kLargestRing + 2.0;
  return {std::clamp(pixel(x), marginLeft_ - edge, width() - marginRight_ + edge), shotRow()};
}

QPointF LineStrip::geophonePlace(int geophone) const {
  return {pixel(scene_.survey->geophones[static_cast<std::size_t>(geophone)].x), ruler() - 4.0};
}

void LineStrip::paintEvent(QPaintEvent*) {
  QPainter painter(this);
  painter.fillRect(rect(), look_.paper);
  painter.setRenderHint(QPainter::Antialiasing);
  if (empty()) {
    painter.setPen(look_.faint);
    painter.drawText(rect(), Qt::AlignCenter, tr("The line appears here once shot records are open."));
    return;
  }
  painter.setPen(look_.faint);
  painter.setFont(sized(font(), 0.85));
  painter.drawText(QRectF(0, ruler() + 4, marginLeft_ - 14.0, height() - ruler() - 4), Qt::AlignRight | Qt::AlignTop,
                   QString::fromStdString(Units{scene_.survey->settings.feet}.lengthUnit()));
  painter.save();
  painter.setClipRect(QRectF(marginLeft_ - 8.0, 0, width() - marginLeft_ - marginRight_ + 16.0, height()));
  paintRuler(painter);
  paintGeophones(painter);
  paintPlumbLine(painter);
  painter.restore();
  paintShots(painter);
}

void LineStrip::paintRuler(QPainter& painter) const {
  const Units units{scene_.survey->settings.feet};
  painter.setFont(sized(font(), 0.85));
  const double right = width() - marginRight_;
  painter.setPen(QPen(look_.ink, look_.lineWidth));
  painter.drawLine(QPointF(marginLeft_, ruler()), QPointF(right, ruler()));
  const double perPixel = units.fromMetres(axis().metresPerPixel());
  const double step = positionTickStep(perPixel, fontMetrics().height());
  const int decimals = step < 1.0 ? 1 : 0;
  const double first = std::ceil(units.fromMetres(range_.left) / step - 1e-9);
  for (double n = first; n * step <= units.fromMetres(range_.right) * (1.0 + 1e-12) + 1e-9; n += 1.0) {
    const double x = pixel(units.toMetres(n * step));
    painter.setPen(QPen(look_.ink, 1.0));
    painter.drawLine(QPointF(x, ruler()), QPointF(x, ruler() + 4));
    painter.drawText(QRectF(x - 40, ruler() + 4, 80, height() - ruler() - 4), Qt::AlignHCenter | Qt::AlignTop,
                     QString::number(n * step, 'f', decimals));
  }
}

void LineStrip::paintGeophones(QPainter& painter) const {
  const auto& geophones = scene_.survey->geophones;
  std::vector<const ShotTrace*> traces(geophones.size(), nullptr);
  int selected = -1;
  if (scene_.selection.shot >= 0 && scene_.selection.shot < static_cast<int>(scene_.survey->shots.size())) {
    const auto& of = scene_.survey->shots[static_cast<std::size_t>(scene_.selection.shot)].traces;
    for (std::size_t t = 0; t < of.size(); ++t) {
      traces[static_cast<std::size_t>(of[t].geophone)] = &of[t];
      selected = static_cast<int>(t) == scene_.selection.trace ? of[t].geophone : selected;
    }
  }
  const double perGeophone = axis().width / std::max(1.0, static_cast<double>(geophones.size())) *
                             wholeLine(*scene_.survey).width() / range_.width();
  const double size = std::clamp(0.6 * perGeophone, 4.0, 8.0);
  for (std::size_t g = 0; g < geophones.size(); ++g) {
    const bool chosen = static_cast<int>(g) == selected;
    const bool live = traces[g] != nullptr && traces[g]->state != TraceState::Dead;
    const QColor colour = chosen ? look_.accent : live ? look_.ink : look_.faint;
    painter.setPen(QPen(colour, 1.0));
    painter.setBrush(live ? QBrush(colour) : QBrush(Qt::NoBrush));
    const double s = chosen ? size + 3.0 : size;
    const QPointF foot(pixel(geophones[g].x), ruler());
    painter.drawPolygon(QPolygonF({foot, foot + QPointF(-0.45 * s, -0.9 * s), foot + QPointF(0.45 * s, -0.9 * s)}));
  }
}

void LineStrip::paintPlumbLine(QPainter& painter) const {
  if (std::isfinite(plumbLine_)) {
    painter.setPen(QPen(look_.accent, 1.0));
    painter.drawLine(QPointF(pixel(plumbLine_), 0), QPointF(pixel(plumbLine_), height()));
  }
}

void LineStrip::paintShots(QPainter& painter) const {
  const int selected = scene_.selection.shot;
  for (int s = 0; s < static_cast<int>(shots_.size()); ++s) {
    const double x = shots_[static_cast<std::size_t>(s)].point.x;
    if (s != selected && x >= range_.left && x <= range_.right) {
      paintShot(painter, s);
    }
  }
  if (selected >= 0 && selected < static_cast<int>(shots_.size())) {
    const double x = shots_[static_cast<std::size_t>(selected)].point.x;
    if (x >= range_.left && x <= range_.right) {
      paintShot(painter, selected);
    }
  }
  paintOutside(painter, true);
  paintOutside(painter, false);
}

void LineStrip::paintShot(QPainter& painter, int shot) const {
  const StripShot& strip = shots_[static_cast<std::size_t>(shot)];
  const bool chosen = shot == scene_.selection.shot;
  const QColor colour = chosen ? look_.accent : look_.ink;
  const QPointF centre = shotPlace(shot);
  const double r = shotRadius() + (chosen ? 1.0 : 0.0);
  // A stem to the place on the ruler; a buried shot's goes below the ground.
  painter.setPen(QPen(colour, 1.0));
  painter.drawLine(centre + QPointF(0, r), QPointF(centre.x(), ruler()));
  if (strip.point.depth > 0.0) {
    painter.drawLine(QPointF(centre.x(), ruler()), QPointF(centre.x(), ruler() + 6));
    painter.drawLine(QPointF(centre.x() - 3, ruler() + 6), QPointF(centre.x() + 3, ruler() + 6));
  }
  // The ring fills clockwise with the share of traces that are picked.
  const QRectF ring(centre - QPointF(r, r), QSizeF(2 * r, 2 * r));
  painter.setBrush(look_.paper);
  painter.drawEllipse(ring);
  painter.setPen(Qt::NoPen);
  painter.setBrush(colour);
  painter.drawPie(ring, 90 * 16, -static_cast<int>(std::lround(strip.picked() * 360 * 16)));
  painter.setBrush(Qt::NoBrush);
  painter.setPen(QPen(colour, chosen ? 2.0 * look_.lineWidth : look_.lineWidth));
  painter.drawEllipse(ring);
  if (strip.doubts > 0) {
    const double d = std::max(0.65 * r, 3.0);
    const QPointF corner = centre + QPointF(r + 0.3 * d, -r + 0.2 * d);
    painter.setPen(QPen(look_.paper, 1.0));
    painter.setBrush(look_.warning);
    painter.drawPolygon(
        QPolygonF({corner + QPointF(0, -d), corner + QPointF(d, 0.8 * d), corner + QPointF(-d, 0.8 * d)}));
  }
  painter.setFont(sized(font(), chosen ? 0.95 : 0.85));
  QFont bold = painter.font();
  bold.setBold(chosen);
  painter.setFont(bold);
  const double room = painter.fontMetrics().horizontalAdvance(QString::number(shots_.size())) + 4.0;
  const bool crowded = !chosen && 2.0 * shotRadius() + 2.0 < room && shot % 5 != 4;
  if (!crowded) {
    painter.setPen(colour);
    painter.drawText(QRectF(centre.x() - 20, 0, 40, shotRow() - r - 1.0), Qt::AlignHCenter | Qt::AlignBottom,
                     QString::number(shot + 1));
  }
}

// An arrow with the numbers of the shots that lie beyond one edge of the range.
void LineStrip::paintOutside(QPainter& painter, bool leftSide) const {
  std::vector<int> beyond;
  bool chosen = false;
  for (int s = 0; s < static_cast<int>(shots_.size()); ++s) {
    const double x = shots_[static_cast<std::size_t>(s)].point.x;
    if (leftSide ? x < range_.left : x > range_.right) {
      beyond.push_back(s + 1);
      chosen = chosen || s == scene_.selection.shot;
    }
  }
  if (beyond.empty()) {
    return;
  }
  const double sign = leftSide ? -1.0 : 1.0;
  const double edge = leftSide ? marginLeft_ - 4.0 : width() - marginRight_ + 4.0;
  painter.setPen(Qt::NoPen);
  painter.setBrush(chosen ? look_.accent : look_.ink);
  painter.drawPolygon(
      QPolygonF({QPointF(edge + sign * 8, shotRow()), QPointF(edge, shotRow() - 5), QPointF(edge, shotRow() + 5)}));
  painter.setPen(chosen ? look_.accent : look_.ink);
  painter.setFont(sized(font(), 0.85));
  const QString numbers =
      beyond.size() == 1 ? QString::number(beyond.front()) : tr("%1 to %2").arg(beyond.front()).arg(beyond.back());
  const QRectF place =
      leftSide ? QRectF(0, 0, marginLeft_ - 4.0, shotRow() - 7) : QRectF(width() - 80.0, 0, 78, shotRow() - 7);
  painter.drawText(place, Qt::AlignRight | Qt::AlignBottom, numbers);
}

}  // namespace strikeplate
