// What the window asks the user, and how it looks.
#include <QApplication>
#include <QFile>
#include <QInputDialog>
#include <QMessageBox>
#include <QSettings>

#include "app/answer_line.h"
#include "app/blows_dialog.h"
#include "app/borehole_dialog.h"
#include "app/handbook.h"
#include "app/info_dialog.h"
#include "app/key_list.h"
#include "app/main_window.h"
#include "app/trigger_dialog.h"
#include "app/versions.h"
#include "core/base/units.h"
#include "widgets/geometry_dialog.h"
#include "widgets/travel_time_plot.h"

namespace strikeplate {

void MainWindow::editInfo() {
  InfoDialog dialog(desk_.survey().info, this);
  if (dialog.exec() == QDialog::Accepted && !(dialog.info() == desk_.survey().info)) {
    desk_.commit(edits::setInfo(desk_.survey(), dialog.info()));
  }
}

void MainWindow::editBoreholes() {
  BoreholeDialog dialog(desk_.survey(), this);
  if (dialog.exec() == QDialog::Accepted && dialog.boreholes() != desk_.survey().boreholes) {
    desk_.commit(edits::setBoreholes(desk_.survey(), dialog.boreholes(), "Change boreholes"));
  }
}

void MainWindow::editBlows() {
  if (desk_.survey().records.empty()) {
    say(tr("No blows yet"), tr("Open shot records first; blows at one shot point are then listed here."));
    return;
  }
  BlowsDialog dialog(desk_.survey(), this);
  if (dialog.exec() == QDialog::Accepted && !dialog.edit().changes.empty()) {
    desk_.commit(dialog.edit());
  }
}

void MainWindow::editGeometry() {
  if (desk_.survey().shots.empty()) {
    say(tr("No line yet"), tr("Open shot records first; their geometry can then be put right here."));
    return;
  }
  GeometryDialog dialog(desk_.survey(), this);
  if (dialog.exec() == QDialog::Accepted && !dialog.edit().changes.empty()) {
    desk_.commit(dialog.edit());
  }
}

void MainWindow::askTriggerCorrections() {
  TriggerDialog dialog(desk_.scene(), this);
  if (dialog.exec() != QDialog::Accepted) {
    return;
  }
  const Edit edit = dialog.edit();
  if (!edit.changes.empty()) {
    desk_.commit(edit);
  }
}

void MainWindow::askReduction() {
  const Units units{desk_.survey().settings.feet};
  TravelTimeDisplay display = travelTimePlot_->display();
  bool chosen = false;
  const double velocity = QInputDialog::getDouble(
      this, tr("Reduced time"),
      tr("Reduction velocity (%1); 0 shows times as they are:").arg(QString::fromStdString(units.velocityUnit())),
      units.fromMetres(display.reductionVelocity), 0.0, 30000.0, 0, &chosen);
  if (chosen) {
    display.reductionVelocity = units.toMetres(velocity);
    travelTimePlot_->setDisplay(display);
  }
}

void MainWindow::setLayers(int layers) {
  SurveySettings settings = desk_.survey().settings;
  settings.layers = layers;
  desk_.commit(
      edits::setSettings(desk_.survey(), settings,
                         layers == 0 ? "Number of layers by evidence" : "Set " + std::to_string(layers) + " layers"));
}

void MainWindow::setFeet(bool feet) {
  SurveySettings settings = desk_.survey().settings;
  settings.feet = feet;
  desk_.commit(edits::setSettings(desk_.survey(), settings, feet ? "Show feet" : "Show metres"));
}

void MainWindow::setLookKind(LookKind kind) {
  QSettings().setValue("look", static_cast<int>(kind));
  const Look look = Look::of(kind);
  QPalette palette;
  palette.setColor(QPalette::Window, look.window);
  palette.setColor(QPalette::WindowText, look.ink);
  palette.setColor(QPalette::Base, look.paper);
  palette.setColor(QPalette::AlternateBase, look.window);
  palette.setColor(QPalette::Text, look.ink);
  palette.setColor(QPalette::Button, look.window);
  palette.setColor(QPalette::ButtonText, look.ink);
  palette.setColor(QPalette::Highlight, look.accent);
  palette.setColor(QPalette::HighlightedText, look.paper);
  palette.setColor(QPalette::ToolTipBase, look.paper);
  palette.setColor(QPalette::ToolTipText, look.ink);
  palette.setColor(QPalette::PlaceholderText, look.faint);
  for (const auto role : {QPalette::WindowText, QPalette::Text, QPalette::ButtonText}) {
    palette.setColor(QPalette::Disabled, role, look.faint);
  }
  QApplication::setPalette(palette);
  for (View* view : views_) {
    view->setLook(look);
  }
  answerLine_->setLook(look);
}

void MainWindow::showHandbook(const QString& chapter) {
  if (handbook_ == nullptr) {
    QFile file(":/handbook.md");
    if (!file.open(QIODevice::ReadOnly)) {
      say(tr("No handbook"), tr("The handbook is missing from this copy of the program; install it again."));
      return;
    }
    handbook_ = new Handbook(QString::fromUtf8(file.readAll()), this);
  }
  handbook_->show();
  handbook_->raise();
  handbook_->activateWindow();
  if (!chapter.isEmpty()) {
    handbook_->showChapter(chapter);
  }
}

void MainWindow::showKeys() {
  KeyList(this).exec();
}

void MainWindow::showAbout() {
  say(tr("About Strikeplate"),
      tr("Near-surface seismic refraction: from shot records to a printed depth.<br><br>"
         "What it gives is an interpretation, not a fact. Confirm it by drilling before anything is designed or dug "
         "on it; "
         "local codes and a licensed professional decide.<br><br>Licence: GPL-3.0-or-later.<br><br>") +
          QString::fromStdString(versionText("Strikeplate")).replace("\n", "<br>"));
}

}  // namespace strikeplate
