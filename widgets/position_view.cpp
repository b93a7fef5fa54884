#include "widgets/position_view.h"

#include <algorithm>
#include <cmath>

#include <QKeyEvent>
#include <QMouseEvent>
#include <QWheelEvent>
#include <qcustomplot.h>

#include "core/base/units.h"
#include "widgets/plot_look.h"

namespace strikeplate {

PositionView::PositionView(QWidget* parent)
    : View(parent), plot_(new QCustomPlot(this)), ticker_(new QCPAxisTickerFixed) {
  plot_->addLayer("plumb line");
  plot_->layer("plumb line")->setMode(QCPLayer::lmBuffered);
  line_ = new QCPItemStraightLine(plot_);
  line_->setLayer("plumb line");
  line_->setVisible(false);
  plot_->installEventFilter(this);
  plot_->xAxis->setTicker(ticker_);
  // Ticks are laid before the width is known, so a new step takes another round.
  connect(plot_, &QCustomPlot::afterLayout, this, [this] {
    const double before = ticker_->tickStep();
    placeTicks();
    if (ticker_->tickStep() != before) {
      plot_->replot(QCustomPlot::rpQueuedReplot);
    }
  });
}

PositionGesture::Axis PositionView::axis() const {
  const QRect rect = plot_->axisRect()->rect();
  return {static_cast<double>(rect.left()), std::max(1.0, static_cast<double>(rect.width())), range(),
          wholeLine(*scene_.survey)};
}

void PositionView::wantRange(const PositionRange& range) {
  emit positionRangeWanted(range.left, range.right);
}

bool PositionView::gesture(QEvent* event) {
  const auto* mouse = dynamic_cast<QMouseEvent*>(event);
  const auto pans = [&] {
    return mouse->button() == Qt::MiddleButton || (mouse->button() == Qt::LeftButton && leftDragPans());
  };
  switch (event->type()) {
    case QEvent::Wheel:
      wantRange(PositionGesture::wheel(*dynamic_cast<QWheelEvent*>(event), axis()));
      return true;
    case QEvent::MouseButtonPress:
      if (pans()) {
        gesture_.press(mouse->position(), axis());
      }
      return false;
    case QEvent::MouseMove:
      if (const auto wanted = gesture_.move(mouse->position())) {
        wantRange(*wanted);
        return true;
      }
      return false;
    case QEvent::MouseButtonRelease:
      return gesture_.pressed() && pans() && gesture_.release();
    case QEvent::Leave:
      emit plumbLineWanted(Estimate::kNaN);
      emit hint(QString());
      return false;
    default:
      return false;
  }
}

bool PositionView::eventFilter(QObject* watched, QEvent* event) {
  return (watched == plot_ && scene_.survey && gesture(event)) || View::eventFilter(watched, event);
}

void PositionView::keyPressEvent(QKeyEvent* event) {
  const double about = plumbLine_ > left_ && plumbLine_ < right_ ? plumbLine_ : 0.5 * (left_ + right_);
  const auto zoom = [&](double factor) { wantRange(zoomed(range(), about, factor, wholeLine(*scene_.survey))); };
  if (!scene_.survey) {
    View::keyPressEvent(event);
  } else if (event->key() == Qt::Key_Plus || event->key() == Qt::Key_Equal) {
    zoom(0.8);
  } else if (event->key() == Qt::Key_Minus) {
    zoom(1.25);
  } else if (event->key() == Qt::Key_Home) {
    wantRange(wholeLine(*scene_.survey));
  } else if (event->key() == Qt::Key_Escape && gesture_.pressed()) {
    wantRange(*gesture_.abandon());
  } else {
    View::keyPressEvent(event);
  }
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

void PositionView::placeTicks() {
  const double width = std::max(plot_->axisRect()->width(), 100);
  ticker_->setTickStep(positionTickStep(plot_->xAxis->range().size() / width, fontMetrics().height()));
}

void PositionView::draw() {
  plot_->clearPlottables();
  if (!scene_.survey) {
    return;
  }
  const Units units{scene_.survey->settings.feet};
  plot_->xAxis->setRange(units.fromMetres(left_), units.fromMetres(right_));
  placeTicks();
  drawData();
  placePlumbLine();
  plot_->replot(QCustomPlot::rpQueuedReplot);
}

}  // namespace strikeplate
