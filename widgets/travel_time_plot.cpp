#include "widgets/travel_time_plot.h"

#include <algorithm>
#include <cmath>

#include <QKeyEvent>
#include <QMouseEvent>
#include <QVBoxLayout>
#include <qcustomplot.h>

#include "core/base/units.h"
#include "widgets/plot_look.h"

namespace strikeplate {

TravelTimePlot::TravelTimePlot(QWidget* parent) : PositionView(parent) {
  setFocusPolicy(Qt::StrongFocus);
  setMinimumHeight(160);
  setAccessibleName(tr("Travel times"));
  auto* layout = new QVBoxLayout(this);
  layout->setContentsMargins(0, 0, 0, 0);
  layout->addWidget(&plot());
  connect(&plot(), &QCustomPlot::mousePress, this, [this](QMouseEvent* event) { click(event->position()); });
  connect(&plot(), &QCustomPlot::mouseMove, this, [this](QMouseEvent* event) {
    const Units units{scene_.survey && scene_.survey->settings.feet};
    emit plumbLineWanted(units.toMetres(plot().xAxis->pixelToCoord(event->position().x())));
  });
}

void TravelTimePlot::showSelection(const Selection& selection) {
  scene_.selection = selection;
  draw();
}

void TravelTimePlot::drawData() {
  const Units units{scene_.survey->settings.feet};
  plot().yAxis->setLabel(tr("Time (ms)"));
  double most = 10.0;
  if (scene_.interpretation) {
    const TravelTimes& times = scene_.interpretation->times;
    const Section& section = scene_.interpretation->section;
    for (std::size_t i = 0; i < times.arrivals.size();) {
      const int shot = times.arrivals[i].shot;
      QVector<double> x, t;
      QVector<double> px, pt;
      const double weight = shot == scene_.selection.shot ? 2.0 : 0.8;
      QVector<QVector<double>> lx(7), lt(7);
      for (; i < times.arrivals.size() && times.arrivals[i].shot == shot; ++i) {
        const Arrival& a = times.arrivals[i];
        const double gx = units.fromMetres(times.geophones[static_cast<std::size_t>(a.geophone)].x);
        most = std::max(most, 1e3 * a.time);
        lx[a.layer % 7] << gx;
        lt[a.layer % 7] << 1e3 * a.time;
        if (section.determined && i < static_cast<std::size_t>(section.predicted.size())) {
          px << gx;
          pt << 1e3 * section.predicted[i];
        }
      }
      auto* curve = plot().addGraph();
      curve->setData(px, pt, true);
      curve->setPen(QPen(shot == scene_.selection.shot ? look().ink : look().faint, weight));
      for (int layer = 0; layer < 7; ++layer) {
        auto* graph = plot().addGraph();
        graph->setData(lx[layer], lt[layer], true);
        graph->setLineStyle(QCPGraph::lsNone);
        graph->setScatterStyle(layerScatter(look(), layer, shot == scene_.selection.shot ? 8.0 : 5.0));
      }
    }
  }
  plot().yAxis->setRange(0.0, 1.06 * most);
}

void TravelTimePlot::click(const QPointF& position) {
  if (!scene_.interpretation) {
    return;
  }
  const Units units{scene_.survey->settings.feet};
  double nearest = 20.0;
  for (const Arrival& a : scene_.interpretation->times.arrivals) {
    const double x = plot().xAxis->coordToPixel(
        units.fromMetres(scene_.interpretation->times.geophones[static_cast<std::size_t>(a.geophone)].x));
    const double distance = std::hypot(x - position.x(), plot().yAxis->coordToPixel(1e3 * a.time) - position.y());
    if (distance < nearest) {
      nearest = distance;
      scene_.selection = {a.shot, a.trace, a.layer};
    }
  }
  setFocus();
  emit selectionWanted(scene_.selection);
}

void TravelTimePlot::keyPressEvent(QKeyEvent* event) {
  const Selection& s = scene_.selection;
  const int layer = event->key() - Qt::Key_0;
  if (layer >= 0 && layer <= 6 && s.shot >= 0 && s.trace >= 0) {
    emit proposed(edits::assignLayer(*scene_.survey, s.shot, {s.trace}, layer), Phase::Commit);
  } else {
    PositionView::keyPressEvent(event);
  }
}

}  // namespace strikeplate
