#include "widgets/section_panel.h"

#include <cmath>

#include <QSplitter>
#include <QTabWidget>
#include <QVBoxLayout>

#include "widgets/doubts_list.h"
#include "widgets/layer_table.h"
#include "widgets/opinions_view.h"
#include "widgets/section_plot.h"

namespace strikeplate {
namespace {

/// Least height of the tabs in lines of text: room for the table of three layers.
constexpr int kTabLines = 7;

}  // namespace

SectionPanel::SectionPanel(QWidget* parent)
    : View(parent),
      plot_(new SectionPlot(this)),
      layers_(new LayerTable(this)),
      opinions_(new OpinionsView(this)),
      doubts_(new DoubtsList(this)),
      tabs_(new QTabWidget(this)),
      splitter_(new QSplitter(Qt::Vertical, this)) {
  setAccessibleName(tr("Section"));
  tabs_->setDocumentMode(true);
  tabs_->addTab(layers_, tr("&Layers"));
  tabs_->addTab(opinions_, tr("Second &opinions"));
  tabs_->addTab(doubts_, tr("&Doubts"));
  tabs_->setMinimumHeight(kTabLines * fontMetrics().height());
  splitter_->addWidget(plot_);
  splitter_->addWidget(tabs_);
  splitter_->setStretchFactor(0, 5);
  splitter_->setStretchFactor(1, 2);
  splitter_->setCollapsible(0, false);
  splitter_->setSizes({500, 200});
  auto* layout = new QVBoxLayout(this);
  layout->setContentsMargins(0, 0, 0, 0);
  layout->addWidget(splitter_);
  connect(plot_, &View::selectionWanted, this, &View::selectionWanted);
  connect(plot_, &View::plumbLineWanted, this, &View::plumbLineWanted);
  connect(plot_, &View::positionRangeWanted, this, &View::positionRangeWanted);
  connect(plot_, &View::hint, this, &View::hint);
  connect(opinions_, &OpinionsView::hint, this, &View::hint);
  connect(doubts_, &DoubtsList::proposed, this, &View::proposed);
  connect(doubts_, &DoubtsList::doubtChosen, this, &SectionPanel::goTo);
  connect(layers_, &LayerTable::layerWanted, this, [this](int layer) {
    emit selectionWanted({scene_.selection.shot, scene_.selection.trace, layer});
  });
}

void SectionPanel::goTo(const Doubt& doubt) {
  Selection selection = scene_.selection;
  if (doubt.shot >= 0) {
    selection.shot = doubt.shot;
    selection.trace = doubt.trace;
  }
  selection.layer = doubt.layer > 0 ? doubt.layer : selection.layer;
  if (!(selection == scene_.selection)) {
    emit selectionWanted(selection);
  }
  if (std::isfinite(doubt.x)) {
    if (doubt.x < range_.left || doubt.x > range_.right) {
      emit positionRangeWanted(doubt.x - 0.5 * range_.width(), doubt.x + 0.5 * range_.width());
    }
    emit plumbLineWanted(doubt.x);
  }
}

void SectionPanel::setAxisMargins(int left, int right) {
  plot_->setAxisMargins(left, right);
}

void SectionPanel::showScene(const Scene& scene) {
  scene_ = scene;
  plot_->showScene(scene);
  layers_->showScene(scene);
  opinions_->showScene(scene);
  doubts_->showScene(scene);
  const std::size_t count = scene.interpretation ? scene.interpretation->doubts.size() : 0;
  tabs_->setTabText(tabs_->indexOf(doubts_), count > 0 ? tr("&Doubts (%1)").arg(count) : tr("&Doubts"));
}

void SectionPanel::showSelection(const Selection& selection) {
  scene_.selection = selection;
  plot_->showSelection(selection);
  layers_->showSelection(selection);
  opinions_->showSelection(selection);
}

void SectionPanel::showPlumbLine(double x) {
  plot_->showPlumbLine(x);
  layers_->showPlumbLine(x);
  opinions_->showPlumbLine(x);
}

void SectionPanel::showPositionRange(double left, double right) {
  range_ = {left, right};
  plot_->showPositionRange(left, right);
}

void SectionPanel::setLook(const Look& look) {
  plot_->setLook(look);
  layers_->setLook(look);
  opinions_->setLook(look);
}

}  // namespace strikeplate
