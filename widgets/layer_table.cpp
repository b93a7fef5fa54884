#include "widgets/layer_table.h"

#include <algorithm>
#include <cmath>

#include <QHeaderView>
#include <QLabel>
#include <QPainter>
#include <QTableWidget>
#include <QVBoxLayout>

#include "core/base/numbers.h"
#include "core/base/units.h"
#include "widgets/section_content.h"

namespace strikeplate {
namespace {

enum Column { kLayer, kVelocity, kLeast, kMean, kMost, kUnder, kDip, kColumns };

QIcon symbolIcon(const Look& look, int layer) {
  QPixmap picture(32, 32);
  picture.setDevicePixelRatio(2.0);
  picture.fill(Qt::transparent);
  QPainter painter(&picture);
  painter.setRenderHint(QPainter::Antialiasing);
  painter.setPen(QPen(look.layerColour(layer), 1.6));
  paintLayerSymbol(painter, layer, {8.0, 8.0}, 10.0);
  return QIcon(picture);
}

QString dipWords(const Estimate& dip) {
  return dip.determined ? QString::fromStdString(fixed(dip.value, 1) + "\u00b0 (" + fixed(dip.low95, 1) + " to " +
                                                 fixed(dip.high95, 1) + ")")
                        : LayerTable::tr("not determined");
}

}  // namespace

DepthsAlong depthsAlong(const Survey& survey, const Section& section, int layer) {
  DepthsAlong along;
  const auto found = std::find_if(section.interfaces.begin(), section.interfaces.end(),
                                  [layer](const SectionInterface& i) { return i.layer == layer; });
  if (!section.determined || found == section.interfaces.end() || survey.geophones.empty()) {
    return along;
  }
  int count = 0, known = 0;
  double sum = 0.0;
  for (const Geophone& geophone : survey.geophones) {
    ++count;
    if (const Estimate depth = section.depthAt(layer, geophone.x); depth.determined) {
      along.least = known == 0 ? depth.value : std::min(along.least, depth.value);
      along.most = known == 0 ? depth.value : std::max(along.most, depth.value);
      sum += depth.value;
      ++known;
    }
  }
  along.mean = known > 0 ? sum / known : Estimate::kNaN;
  along.share = count > 0 ? static_cast<double>(known) / count : 0.0;
  return along;
}

LayerTable::LayerTable(QWidget* parent)
    : QWidget(parent), table_(new QTableWidget(0, kColumns, this)), reason_(new QLabel(this)) {
  table_->setEditTriggers(QAbstractItemView::NoEditTriggers);
  table_->setSelectionBehavior(QAbstractItemView::SelectRows);
  table_->setSelectionMode(QAbstractItemView::SingleSelection);
  table_->setShowGrid(false);
  table_->setFrameShape(QFrame::NoFrame);
  table_->verticalHeader()->hide();
  table_->verticalHeader()->setDefaultSectionSize(fontMetrics().height() + 3);
  table_->horizontalHeader()->setHighlightSections(false);
  table_->horizontalHeader()->setSectionResizeMode(QHeaderView::ResizeToContents);
  table_->horizontalHeader()->setStretchLastSection(true);
  table_->horizontalHeader()->setDefaultAlignment(Qt::AlignLeft | Qt::AlignVCenter);
  table_->setAccessibleName(tr("Layers"));
  reason_->setWordWrap(true);
  reason_->setAlignment(Qt::AlignTop | Qt::AlignLeft);
  reason_->setContentsMargins(8, 4, 8, 4);
  reason_->hide();
  setFocusProxy(table_);
  auto* layout = new QVBoxLayout(this);
  layout->setContentsMargins(0, 0, 0, 0);
  layout->addWidget(table_);
  layout->addWidget(reason_);
  connect(table_, &QTableWidget::currentCellChanged, this, [this](int row) {
    if (row >= 0) {
      emit layerWanted(row + 1);
    }
  });
}

void LayerTable::showScene(const Scene& scene) {
  const bool other = scene.interpretation != scene_.interpretation || scene.survey != scene_.survey;
  scene_ = scene;
  if (other) {
    fill();
  }
  showSelection(scene.selection);
}

void LayerTable::showSelection(const Selection& selection) {
  scene_.selection = selection;
  const QSignalBlocker quiet(table_);
  if (selection.layer >= 1 && selection.layer <= table_->rowCount()) {
    table_->setCurrentCell(selection.layer - 1, std::max(table_->currentColumn(), 0));
  } else {
    table_->setCurrentCell(-1, -1);
  }
}

void LayerTable::showPlumbLine(double x) {
  // What it last stood on stays readable after the pointer has left.
  if (std::isfinite(x)) {
    plumbLine_ = x;
    fillPlumbColumn();
  }
}

void LayerTable::setLook(const Look& look) {
  look_ = look;
  if (scene_.survey) {
    fill();
  }
}

void LayerTable::put(int row, int column, const QString& text, const QString& tip) {
  QTableWidgetItem* item = table_->item(row, column);
  if (item == nullptr) {
    item = new QTableWidgetItem;
    table_->setItem(row, column, item);
  }
  item->setText(text);
  item->setToolTip(tip);
}

void LayerTable::fill() {
  const QSignalBlocker quiet(table_);
  const QString reason = emptyWords(scene_);
  table_->setRowCount(reason.isEmpty() ? scene_.interpretation->section.layers : 0);
  table_->setVisible(reason.isEmpty());
  reason_->setVisible(!reason.isEmpty());
  reason_->setText(reason);
  for (int row = 0; row < table_->rowCount(); ++row) {
    fillRow(row);
  }
  fillPlumbColumn();
}

void LayerTable::fillRow(int row) {
  const Units units{scene_.survey->settings.feet};
  const Section& section = scene_.interpretation->section;
  const int layer = row + 1;
  put(row, kLayer, QString::number(layer));
  table_->item(row, kLayer)->setIcon(symbolIcon(look_, layer));
  put(row, kVelocity, velocityWords(units, section.velocities[static_cast<std::size_t>(row)]),
      tr("Mean along the line, with its 95 % interval"));
  if (layer == 1) {
    for (const int column : {kLeast, kMean, kMost, kDip}) {
      put(row, column, column == kLeast ? tr("the ground") : QString());
    }
    return;
  }
  const DepthsAlong along = depthsAlong(*scene_.survey, section, layer);
  const QString known = along.share < 1.0
                            ? tr("Determined under %1 % of the geophones").arg(100.0 * along.share, 0, 'f', 0)
                            : tr("Under the geophones");
  const auto depth = [&](double metres) {
    return std::isfinite(metres) ? QString::fromStdString(units.length(metres)) : tr("not determined");
  };
  put(row, kLeast, depth(along.least), known);
  put(row, kMean, depth(along.mean), known);
  put(row, kMost, depth(along.most), known);
  put(row, kDip, dipWords(section.interfaces[static_cast<std::size_t>(row - 1)].meanDip),
      tr("Mean dip along the line with its 95 % interval; positive where it deepens towards larger positions"));
}

void LayerTable::fillPlumbColumn() {
  if (!scene_.survey) {
    return;
  }
  const QSignalBlocker quiet(table_);
  const Units units{scene_.survey->settings.feet};
  const bool pointed = std::isfinite(plumbLine_);
  table_->setHorizontalHeaderLabels({tr("Layer"), tr("Velocity (95 %)"), tr("Top: least"), tr("mean"), tr("most"),
                                     pointed
                                         ? tr("Under %1 (95 %)").arg(QString::fromStdString(units.length(plumbLine_)))
                                         : tr("Under the pointer"),
                                     tr("Dip (95 %)")});
  for (int row = 0; row < table_->rowCount(); ++row) {
    put(row, kUnder,
        row == 0 || !pointed ? QString()
                             : depthWords(units, scene_.interpretation->section.depthAt(row + 1, plumbLine_)));
  }
}

}  // namespace strikeplate
