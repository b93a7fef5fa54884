#include "widgets/section_panel.h"

#include <algorithm>

#include <QListWidget>
#include <QVBoxLayout>
#include <qcustomplot.h>

#include "core/base/units.h"
#include "widgets/plot_look.h"

namespace strikeplate {

SectionPanel::SectionPanel(QWidget* parent) : PositionView(parent), doubts_(new QListWidget(this)) {
  setMinimumHeight(220);
  setAccessibleName(tr("Section"));
  doubts_->setMaximumHeight(96);
  doubts_->setWordWrap(true);
  doubts_->setAccessibleName(tr("Doubts"));
  auto* layout = new QVBoxLayout(this);
  layout->setContentsMargins(0, 0, 0, 0);
  layout->setSpacing(0);
  layout->addWidget(&plot(), 1);
  layout->addWidget(doubts_);
  connect(doubts_, &QListWidget::currentRowChanged, this, [this](int row) {
    if (row >= 0 && scene_.interpretation && row < static_cast<int>(scene_.interpretation->doubts.size())) {
      const Doubt& doubt = scene_.interpretation->doubts[static_cast<std::size_t>(row)];
      emit plumbLineWanted(doubt.x);
      if (doubt.shot >= 0) {
        emit selectionWanted({doubt.shot, doubt.trace, doubt.layer});
      }
    }
  });
}

void SectionPanel::showScene(const Scene& scene) {
  const bool other = scene.interpretation != scene_.interpretation;
  scene_ = scene;
  if (other) {
    const QSignalBlocker quiet(doubts_);
    doubts_->clear();
    for (std::size_t i = 0; scene_.interpretation && i < scene_.interpretation->doubts.size(); ++i) {
      const Doubt& doubt = scene_.interpretation->doubts[i];
      auto* item = new QListWidgetItem(QString::fromStdString(doubt.says), doubts_);
      item->setToolTip(QString::fromStdString(doubt.restsOn + "\n" + doubt.wouldSettle));
    }
  }
  draw();
}

void SectionPanel::drawInterface(const Section& section, std::size_t index, double& lowest) {
  const Units units{scene_.survey->settings.feet};
  const SectionInterface& interface = section.interfaces[index];
  QVector<double> x, middle, low, high;
  for (std::size_t i = 0; i < section.x.size(); ++i) {
    const Estimate& d = interface.depth[i];
    if (d.determined) {
      x << units.fromMetres(section.x[i]);
      middle << units.fromMetres(section.ground[i] - d.value);
      low << units.fromMetres(section.ground[i] - d.high95);
      high << units.fromMetres(section.ground[i] - d.low95);
      lowest = std::min(lowest, low.back());
    }
  }
  const QColor colour = look().layerColour(interface.layer);
  QColor fill = colour;
  fill.setAlpha(60);
  auto* top = plot().addGraph();
  top->setData(x, high, true);
  top->setPen(Qt::NoPen);
  auto* bottom = plot().addGraph();
  bottom->setData(x, low, true);
  bottom->setPen(Qt::NoPen);
  top->setBrush(fill);
  top->setChannelFillGraph(bottom);
  auto* line = plot().addGraph();
  line->setData(x, middle, true);
  line->setPen(QPen(colour, 1.6 * look().lineWidth));
}

void SectionPanel::drawData() {
  const Units units{scene_.survey->settings.feet};
  const QString unit = QString::fromStdString(units.lengthUnit());
  plot().xAxis->setLabel(tr("Position along the line (%1)").arg(unit));
  plot().yAxis->setLabel(tr("Elevation (%1)").arg(unit));
  QVector<double> x, ground;
  for (const Geophone& geophone : scene_.survey->geophones) {
    x << units.fromMetres(geophone.x);
    ground << units.fromMetres(geophone.elevation);
  }
  auto* surface = plot().addGraph();
  surface->setData(x, ground, true);
  surface->setPen(QPen(look().ground, 1.6 * look().lineWidth));
  surface->setScatterStyle(QCPScatterStyle(QCPScatterStyle::ssTriangleInverted, 5));
  const double highest = ground.isEmpty() ? 0.0 : *std::max_element(ground.begin(), ground.end());
  double lowest = highest - 5.0;
  if (scene_.interpretation && scene_.interpretation->section.determined) {
    for (std::size_t i = 0; i < scene_.interpretation->section.interfaces.size(); ++i) {
      drawInterface(scene_.interpretation->section, i, lowest);
    }
  }
  const double edge = 0.1 * (highest - lowest);
  plot().yAxis->setRange(lowest - edge, highest + edge);
}

}  // namespace strikeplate
