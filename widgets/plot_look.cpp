#include "widgets/plot_look.h"

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

QCPScatterStyle layerScatter(const Look& look, int layer, double size) {
  static constexpr QCPScatterStyle::ScatterShape kShapes[] = {
      QCPScatterStyle::ssCross,    QCPScatterStyle::ssCircle,  QCPScatterStyle::ssSquare,
      QCPScatterStyle::ssTriangle, QCPScatterStyle::ssDiamond, QCPScatterStyle::ssTriangleInverted,
      QCPScatterStyle::ssStar};
  return {kShapes[layer % 7], QPen(look.layerColour(layer), 1.5), QBrush(Qt::NoBrush), size};
}

}  // namespace strikeplate
