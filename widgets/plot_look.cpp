#include "widgets/plot_look.h"

#include <cmath>

namespace strikeplate {

void applyLook(QCustomPlot& plot, const Look& look) {
  plot.setBackground(look.paper);
  for (QCPAxis* axis : {plot.xAxis, plot.yAxis}) {
    for (const auto setPen : {&QCPAxis::setBasePen, &QCPAxis::setTickPen, &QCPAxis::setSubTickPen}) {
      (axis->*setPen)(QPen(look.faint));
    }
    axis->setTickLabelColor(look.ink);
    axis->setLabelColor(look.ink);
    axis->grid()->setPen(QPen(look.grid));
    axis->grid()->setZeroLinePen(QPen(look.grid));
  }
}

void fixSideMargins(QCustomPlot& plot, int left, int right) {
  plot.axisRect()->setAutoMargins(QCP::msTop | QCP::msBottom);
  plot.axisRect()->setMargins(QMargins(left, 0, right, 0));
}

QCPScatterStyle layerScatter(const Look& look, int layer, double size) {
  static constexpr QCPScatterStyle::ScatterShape kShapes[] = {
      QCPScatterStyle::ssCross,    QCPScatterStyle::ssCircle,  QCPScatterStyle::ssSquare,
      QCPScatterStyle::ssTriangle, QCPScatterStyle::ssDiamond, QCPScatterStyle::ssTriangleInverted,
      QCPScatterStyle::ssStar};
  return {kShapes[layer % 7], QPen(look.layerColour(layer), 1.5), QBrush(Qt::NoBrush), size};
}

void addPlumbLine(QCustomPlot& plot, const Look& look, double x) {
  if (std::isfinite(x)) {
    auto* line = new QCPItemStraightLine(&plot);
    line->point1->setCoords(x, 0.0);
    line->point2->setCoords(x, 1.0);
    line->setPen(QPen(look.accent, 1.0));
  }
}

}  // namespace strikeplate
