#include "widgets/line_tabs.h"

#include <QHBoxLayout>
#include <QSignalBlocker>
#include <QTabBar>

#include "core/survey/lines.h"

namespace strikeplate {

LineTabs::LineTabs(QWidget* parent) : View(parent), tabs_(new QTabBar(this)) {
  tabs_->setAccessibleName(tr("Lines of the job"));
  tabs_->setDrawBase(false);
  tabs_->setExpanding(false);
  auto* layout = new QHBoxLayout(this);
  layout->setContentsMargins(0, 0, 0, 0);
  layout->addWidget(tabs_);
  layout->addStretch(1);
  hide();
  connect(tabs_, &QTabBar::currentChanged, this, &LineTabs::showLine);
}

void LineTabs::showScene(const Scene& scene) {
  scene_ = scene;
  const Survey& survey = *scene.survey;
  const int count = lineCount(survey);
  const QSignalBlocker quiet(tabs_);
  while (tabs_->count() > count) {
    tabs_->removeTab(tabs_->count() - 1);
  }
  for (int index = 0; index < count; ++index) {
    // A tab takes "&" for a key's mark.
    const QString name = QString::fromStdString(lineName(survey, index)).replace('&', "&&");
    if (index == tabs_->count()) {
      tabs_->addTab(name);
    } else if (tabs_->tabText(index) != name) {
      tabs_->setTabText(index, name);
    }
  }
  tabs_->setCurrentIndex(survey.lineAtHand);
  setVisible(count > 1);
}

void LineTabs::showSelection(const Selection& /*selection*/) {}

void LineTabs::showPlumbLine(double /*x*/) {}

void LineTabs::showPositionRange(double /*left*/, double /*right*/) {}

void LineTabs::setLook(const Look& /*look*/) {}

void LineTabs::stepLine(int step) {
  const int count = lineCount(*scene_.survey);
  showLine(((scene_.survey->lineAtHand + step) % count + count) % count);
}

void LineTabs::showLine(int index) {
  if (index >= 0 && index != scene_.survey->lineAtHand) {
    emit proposed(edits::showLine(*scene_.survey, index), Phase::Commit);
  }
}

}  // namespace strikeplate
