#include "widgets/section_plot.h"

#include <algorithm>
#include <cmath>

#include <QMouseEvent>
#include <QVBoxLayout>
#include <qcustomplot.h>

#include "widgets/section_readout.h"

namespace strikeplate {
namespace {

constexpr double kNear = 8.0;  // px

}  // namespace

SectionPlot::SectionPlot(QWidget* parent)
    : PositionView(parent),
      elevationTicker_(new QCPAxisTickerFixed),
      drawing_(new SectionDrawing(&plot())),
      readout_(new PlumbReadout(&plot(), *drawing_)) {
  setFocusPolicy(Qt::StrongFocus);
  setMinimumHeight(120);
  setAccessibleName(tr("Section"));
  readout_->setLayer("plumb line");
  auto* layout = new QVBoxLayout(this);
  layout->setContentsMargins(0, 0, 0, 0);
  layout->addWidget(&plot());
  plot().yAxis->setTicker(elevationTicker_);
  connect(&plot(), &QCustomPlot::afterLayout, this, [this] {
    // Ticks are laid before the height is known, so a new height takes another round.
    if (plot().axisRect()->height() != height_) {
      setElevationAxis();
      plot().replot(QCustomPlot::rpQueuedReplot);
    }
  });
  connect(&plot(), &QCustomPlot::mouseMove, this, [this](QMouseEvent* event) { follow(event->position()); });
  connect(&plot(), &QCustomPlot::mousePress, this, [this] { setFocus(Qt::MouseFocusReason); });
  connect(&plot(), &QCustomPlot::mouseRelease, this, [this](QMouseEvent* event) {
    if (event->button() == Qt::LeftButton) {
      click(event->position());
    }
  });
}

void SectionPlot::showSelection(const Selection& selection) {
  scene_.selection = selection;
  draw();
}

void SectionPlot::showPlumbLine(double x) {
  readout_->show(scene_, look(), x);
  PositionView::showPlumbLine(x);
}

QPointF SectionPlot::placeOf(double x, double elevation) const {
  return drawing_->frame().at(x, elevation);
}

void SectionPlot::drawData() {
  const Units units{scene_.survey->settings.feet};
  const QString unit = QString::fromStdString(units.lengthUnit());
  plot().xAxis->setLabel(tr("Position along the line (%1)").arg(unit));
  plot().yAxis->setLabel(tr("Elevation (%1)").arg(unit));
  elevations_ = elevationRange(scene_);
  setElevationAxis();
  drawing_->show(scene_, look());
  readout_->show(scene_, look(), plumbLine());
}

// Above the ground there is room for the marks of geophones and shots and the names of boreholes, below the section
// for the legend, however high the plot is.
void SectionPlot::setElevationAxis() {
  if (!scene_.survey) {
    return;
  }
  const Units units{scene_.survey->settings.feet};
  const double marks = scene_.survey->boreholes.empty() ? 18.0 : 18.0 + fontMetrics().height();
  const double legend = fontMetrics().height() + 6.0;
  height_ = plot().axisRect()->height();
  const double height = std::max<double>(height_, 2.0 * (marks + legend));
  const double perPixel = (elevations_.top - elevations_.bottom) / (height - marks - legend);
  elevationTicker_->setTickStep(niceStep(units.fromMetres(perPixel) * 2.2 * fontMetrics().height()));
  plot().yAxis->setRange(units.fromMetres(elevations_.bottom - legend * perPixel),
                         units.fromMetres(elevations_.top + marks * perPixel));
}

bool SectionPlot::atBorehole(const QPointF& position, const Borehole& hole) const {
  const double ground = groundOf(*scene_.survey).at(hole.x);
  const QPointF top = placeOf(hole.x, ground);
  const QPointF met = placeOf(hole.x, ground - hole.depth);
  return std::abs(position.x() - top.x()) < kNear && position.y() > top.y() && position.y() < met.y() + kNear;
}

void SectionPlot::follow(const QPointF& position) {
  if (!scene_.survey || scene_.survey->shots.empty()) {
    return;
  }
  const SectionFrame frame = drawing_->frame();
  const double x = frame.units.toMetres(plot().xAxis->pixelToCoord(position.x()));
  emit plumbLineWanted(x);
  for (const Borehole& hole : scene_.survey->boreholes) {
    if (atBorehole(position, hole)) {
      emit hint(boreholeWords(scene_, hole));
      return;
    }
  }
  const double elevation = frame.units.toMetres(plot().yAxis->pixelToCoord(position.y()));
  const double reach =
      std::abs(frame.units.toMetres(plot().yAxis->pixelToCoord(kNear) - plot().yAxis->pixelToCoord(0.0)));
  emit hint(sectionWords(scene_, x, elevation, reach));
}

void SectionPlot::click(const QPointF& position) {
  if (!scene_.survey) {
    return;
  }
  for (int s = 0; s < static_cast<int>(scene_.survey->shots.size()); ++s) {
    const ShotPoint& point = scene_.survey->shots[static_cast<std::size_t>(s)].point;
    const QPointF away = placeOf(point.x, point.elevation - point.depth) - QPointF(0, 3.0) - position;
    if (std::hypot(away.x(), away.y()) < kNear) {
      emit selectionWanted({s, -1, scene_.selection.layer});
      return;
    }
  }
  if (!scene_.interpretation) {
    return;
  }
  const SectionFrame frame = drawing_->frame();
  const double x = frame.units.toMetres(plot().xAxis->pixelToCoord(position.x()));
  const double elevation = frame.units.toMetres(plot().yAxis->pixelToCoord(position.y()));
  const Section& section = scene_.interpretation->section;
  const double depth = groundOf(*scene_.survey).at(x) - elevation;
  int layer = layerAt(section, x, depth);
  for (const SectionInterface& interface : section.interfaces) {
    const Estimate top = section.depthAt(interface.layer, x);
    if (top.determined && std::abs(placeOf(x, elevation + depth - top.value).y() - position.y()) < kNear) {
      layer = interface.layer;
    }
  }
  if (layer > 0) {
    emit selectionWanted({scene_.selection.shot, scene_.selection.trace, layer});
  }
}

}  // namespace strikeplate
