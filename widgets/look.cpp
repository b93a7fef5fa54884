#include "widgets/look.h"

#include <array>

#include <QPainter>
#include <QPolygonF>

namespace strikeplate {

Look Look::of(LookKind kind) {
  Look look;
  look.kind = kind;
  switch (kind) {
    case LookKind::Light:
      look.window = QColor(0xf3, 0xf3, 0xf1);
      look.paper = QColor(0xff, 0xff, 0xff);
      look.ink = QColor(0x1d, 0x22, 0x28);
      look.faint = QColor(0x6a, 0x72, 0x7a);
      look.grid = QColor(0xe4, 0xe6, 0xe8);
      look.accent = QColor(0x7a, 0x2f, 0x8f);
      look.warning = QColor(0xb0, 0x3a, 0x1e);
      look.ground = QColor(0x5f, 0x4b, 0x32);
      look.lineWidth = 1.3;
      break;
    case LookKind::Dark:
      look.window = QColor(0x22, 0x25, 0x29);
      look.paper = QColor(0x17, 0x19, 0x1c);
      look.ink = QColor(0xe8, 0xea, 0xec);
      look.faint = QColor(0x9a, 0xa2, 0xaa);
      look.grid = QColor(0x2f, 0x34, 0x39);
      look.accent = QColor(0xd0, 0x8c, 0xe6);
      look.warning = QColor(0xff, 0x8a, 0x65);
      look.ground = QColor(0xc8, 0xad, 0x87);
      look.lineWidth = 1.3;
      break;
    case LookKind::Sun:
      look.window = QColor(0xff, 0xff, 0xff);
      look.paper = QColor(0xff, 0xff, 0xff);
      look.ink = QColor(0x00, 0x00, 0x00);
      look.faint = QColor(0x30, 0x30, 0x30);
      look.grid = QColor(0xc8, 0xc8, 0xc8);
      look.accent = QColor(0x6a, 0x00, 0x8a);
      look.warning = QColor(0xc0, 0x00, 0x00);
      look.ground = QColor(0x40, 0x2c, 0x10);
      look.lineWidth = 2.4;
      break;
  }
  return look;
}

QColor Look::layerColour(int layer) const {
  static const std::array<QColor, 7> kColours = {
      QColor(0x88, 0x88, 0x88), QColor(0xe6, 0x9f, 0x00), QColor(0x00, 0x72, 0xb2), QColor(0x00, 0x9e, 0x73),
      QColor(0xcc, 0x79, 0xa7), QColor(0xd5, 0x5e, 0x00), QColor(0x56, 0xb4, 0xe9)};
  const QColor colour = kColours[layer >= 1 && layer <= 6 ? static_cast<std::size_t>(layer) : 0U];
  if (kind == LookKind::Dark && layer == 2) {
    return QColor(0x4a, 0xa8, 0xe8);
  }
  return kind == LookKind::Sun ? colour.darker(120) : colour;
}

void paintLayerSymbol(QPainter& painter, int layer, const QPointF& centre, double size) {
  const double r = size / 2.0;
  const auto at = [&](double dx, double dy) { return centre + QPointF(dx * r, dy * r); };
  switch (layer) {
    case 1:
      painter.drawEllipse(centre, r, r);
      break;
    case 2:
      painter.drawRect(QRectF(at(-0.9, -0.9), at(0.9, 0.9)));
      break;
    case 3:
      painter.drawPolygon(QPolygonF({at(0, -1.1), at(1, 0.8), at(-1, 0.8)}));
      break;
    case 4:
      painter.drawPolygon(QPolygonF({at(0, -1.2), at(1.2, 0), at(0, 1.2), at(-1.2, 0)}));
      break;
    case 5:
      painter.drawPolygon(QPolygonF({at(0, 1.1), at(1, -0.8), at(-1, -0.8)}));
      break;
    case 6:
      painter.drawLine(at(0, -1), at(0, 1));
      painter.drawLine(at(-0.87, -0.5), at(0.87, 0.5));
      painter.drawLine(at(-0.87, 0.5), at(0.87, -0.5));
      break;
    default:
      painter.drawLine(at(-0.8, -0.8), at(0.8, 0.8));
      painter.drawLine(at(-0.8, 0.8), at(0.8, -0.8));
      break;
  }
}

}  // namespace strikeplate
