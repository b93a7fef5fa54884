#include "widgets/position_view.h"

#include <cmath>

#include <qcustomplot.h>

#include "core/base/units.h"
#include "widgets/plot_look.h"

namespace strikeplate {

PositionView::PositionView(QWidget* parent) : View(parent), plot_(new QCustomPlot(this)) {
  plot_->addLayer("plumb line");
  plot_->layer("plumb line")->setMode(QCPLayer::lmBuffered);
  line_ = new QCPItemStraightLine(plot_);
  line_->setLayer("plumb line");
  line_->setVisible(false);
}

void PositionView::setAxisMargins(int left, int right) {
  plot_->axisRect()->setAutoMargins(QCP::msTop | QCP::msBottom);
  plot_->axisRect()->setMargins(QMargins(left, 0, right, 0));
}

void PositionView::showScene(const Scene& scene) {
  scene_ = scene;
  draw();
}

void PositionView::showPlumbLine(double x) {
  plumbLine_ = x;
  placePlumbLine();
  plot_->layer("plumb line")->replot();
}

void PositionView::showPositionRange(double left, double right) {
  left_ = left;
  right_ = right;
  draw();
}

void PositionView::setLook(const Look& look) {
  look_ = look;
  applyLook(*plot_, look);
  draw();
}

void PositionView::placePlumbLine() {
  line_->setVisible(std::isfinite(plumbLine_) && scene_.survey);
  if (line_->visible()) {
    const double x = Units{scene_.survey->settings.feet}.fromMetres(plumbLine_);
    line_->point1->setCoords(x, 0.0);
    line_->point2->setCoords(x, 1.0);
    line_->setPen(QPen(look_.accent, 1.0));
  }
}

void PositionView::draw() {
  plot_->clearPlottables();
  if (!scene_.survey) {
    return;
  }
  const Units units{scene_.survey->settings.feet};
  plot_->xAxis->setRange(units.fromMetres(left_), units.fromMetres(right_));
  drawData();
  placePlumbLine();
  plot_->replot(QCustomPlot::rpQueuedReplot);
}

}  // namespace strikeplate
