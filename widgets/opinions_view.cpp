#include "widgets/opinions_view.h"

#include <algorithm>
#include <cmath>

#include <QLabel>
#include <QVBoxLayout>

#include "core/base/numbers.h"
#include "widgets/opinions_chart.h"
#include "widgets/section_content.h"

namespace strikeplate {

OpinionsView::OpinionsView(QWidget* parent)
    : QWidget(parent), head_(new QLabel(this)), chart_(new OpinionsChart(this)) {
  head_->setContentsMargins(8, 2, 8, 2);
  head_->setTextInteractionFlags(Qt::TextSelectableByMouse);
  head_->setWordWrap(true);
  head_->setAccessibleName(tr("Means of the second opinions"));
  setFocusProxy(chart_);
  auto* layout = new QVBoxLayout(this);
  layout->setContentsMargins(0, 0, 0, 0);
  layout->setSpacing(0);
  layout->addWidget(head_);
  layout->addWidget(chart_, 1);
  connect(chart_, &OpinionsChart::rowHovered, this, &OpinionsView::hint);
}

void OpinionsView::showScene(const Scene& scene) {
  scene_ = scene;
  refresh();
}

void OpinionsView::showSelection(const Selection& selection) {
  scene_.selection = selection;
  refresh();
}

void OpinionsView::showPlumbLine(double x) {
  // What it last stood on stays readable after the pointer has left.
  if (std::isfinite(x)) {
    plumbLine_ = x;
    refresh();
  }
}

void OpinionsView::showEvent(QShowEvent* event) {
  refresh();
  QWidget::showEvent(event);
}

void OpinionsView::setLook(const Look& look) {
  chart_->setLook(look);
}

int OpinionsView::layer() const {
  return std::max(scene_.selection.layer, 2);
}

double OpinionsView::position() const {
  const auto& geophones = scene_.survey->geophones;
  return std::isfinite(plumbLine_) || geophones.empty() ? plumbLine_ : geophones[geophones.size() / 2].x;
}

// While another tab is in front nothing is drawn, so that a drag pays only for what is seen.
void OpinionsView::refresh() {
  if (!scene_.survey || !isVisible()) {
    return;
  }
  const Units units{scene_.survey->settings.feet};
  shown_ = scene_.interpretation;
  chart_->showSummary(shown_ ? opinionsAt(*shown_, layer(), position()) : OpinionSummary{}, units);
  head_->setText(headWords());
}

QString OpinionsView::headWords() const {
  if (!scene_.survey || !scene_.interpretation) {
    return tr("No interpretation yet.");
  }
  const Units units{scene_.survey->settings.feet};
  const auto length = [&](double metres, int decimals) {
    return QString::fromStdString(units.length(metres, decimals));
  };
  const double x = position();
  const OpinionSummary summary = opinionsAt(*scene_.interpretation, layer(), x);
  QString words =
      tr("Layer %1 under %2: section %3.").arg(layer()).arg(length(x, 1), depthWords(units, summary.section));
  if (summary.count == 0) {
    return words + tr(" No other route leads there.");
  }
  words += tr(" Others (%1): weighted mean %2, plain mean ").arg(summary.count).arg(length(summary.weightedMean, 1));
  return words +
         (summary.count < 2 ? length(summary.mean, 1)
                            : QString::fromStdString(fixed(units.fromMetres(summary.mean), 1)) + " \u00b1 " +
                                  length(summary.deviation, 1)) +
         ".";
}

}  // namespace strikeplate
