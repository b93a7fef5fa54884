// The window's dealings with the several lines of one job.
#include <QMenu>

#include "app/main_window.h"
#include "core/survey/lines.h"
#include "widgets/line_tabs.h"

namespace strikeplate {

void MainWindow::buildLinesMenu(QMenu* menu) {
  const auto addStep = [&](const QString& text, const QKeySequence& key, int step) {
    QAction* action = menu->addAction(text, this, [this, step] { lineTabs_->stepLine(step); });
    action->setShortcut(key);
    severalLinesActions_.push_back(action);
  };
  addStep(tr("&Next line of the job"), QKeySequence(tr("Ctrl+PgDown")), 1);
  addStep(tr("Pre&vious line of the job"), QKeySequence(tr("Ctrl+PgUp")), -1);
  severalLinesActions_.push_back(
      menu->addAction(tr("&Remove this line from the job"), this, &MainWindow::removeLine));
}

// Nothing is lost: it is an edit like any other, and can be undone.
void MainWindow::removeLine() {
  if (lineCount(desk_.survey()) > 1) {
    desk_.commit(edits::removeLine(desk_.survey()));
  }
}

}  // namespace strikeplate
