// The menus of the window and what they do.
#include <QActionGroup>
#include <QApplication>
#include <QFileDialog>
#include <QFileInfo>
#include <QMenuBar>
#include <QMessageBox>
#include <QPageLayout>
#include <QPrintDialog>
#include <QPrinter>
#include <QSettings>

#include "app/answer_line.h"
#include "app/borehole_dialog.h"
#include "app/info_dialog.h"
#include "app/main_window.h"
#include "app/trigger_dialog.h"
#include "app/versions.h"
#include "core/report/csv_out.h"
#include "core/report/section_dxf.h"
#include "core/survey/geometry_edit.h"
#include "core/survey/picks_in.h"
#include "widgets/record_view.h"
#include "widgets/section_panel.h"
#include "widgets/sheet_painter.h"
#include "widgets/travel_time_plot.h"

namespace strikeplate {
namespace {

template <class Receiver, class Method>
QAction* add(QMenu* menu, const QString& text, const QKeySequence& key, Receiver* receiver, Method method) {
  QAction* action = menu->addAction(text);
  action->setShortcut(key);
  QObject::connect(action, &QAction::triggered, receiver, method);
  return action;
}

}  // namespace

void MainWindow::buildMenus() {
  buildFileMenu();
  buildEditMenu();
  buildPicksMenu();
  buildSectionMenu();
  buildViewMenu();
  buildHelpMenu();
}

void MainWindow::buildFileMenu() {
  QMenu* menu = menuBar()->addMenu(tr("&File"));
  add(menu, tr("Open &records..."), QKeySequence::Open, this, [this] { chooseRecords(false); });
  add(menu, tr("&Add records to this line..."), {}, this, [this] { chooseRecords(true); });
  add(menu, tr("Open &survey..."), QKeySequence(tr("Ctrl+Shift+O")), this, &MainWindow::chooseSurvey);
  add(menu, tr("Save survey &as..."), QKeySequence::SaveAs, this, &MainWindow::saveSurveyAs);
  menu->addSeparator();
  add(menu, tr("Lay a &geometry table over the headers..."), {}, this, &MainWindow::loadGeometry);
  add(menu, tr("Read &picks from a table..."), {}, this, &MainWindow::importPicks);
  menu->addSeparator();
  add(menu, tr("&Print sheet..."), QKeySequence::Print, this, &MainWindow::printSheet);
  add(menu, tr("Save sheet as P&DF..."), QKeySequence(tr("Ctrl+Shift+P")), this, &MainWindow::saveSheet);
  add(menu, tr("Write &tables and section (CSV, DXF)..."), {}, this, &MainWindow::exportCsv);
  menu->addSeparator();
  add(menu, tr("Open the &demo line"), {}, this, &MainWindow::openDemo);
  add(menu, tr("&Quit"), QKeySequence::Quit, this, &QWidget::close);
}

void MainWindow::buildEditMenu() {
  QMenu* menu = menuBar()->addMenu(tr("&Edit"));
  undo_ = add(menu, tr("Undo"), QKeySequence::Undo, &desk_, &Desk::undo);
  redo_ = add(menu, tr("Redo"), QKeySequence::Redo, &desk_, &Desk::redo);
  menu->addSeparator();
  add(menu, tr("&Job, client and crew..."), {}, this, &MainWindow::editInfo);
  add(menu, tr("&Boreholes..."), {}, this, &MainWindow::editBoreholes);
}

void MainWindow::buildPicksMenu() {
  QMenu* menu = menuBar()->addMenu(tr("&Picks"));
  add(menu, tr("Pick the &line automatically"), QKeySequence(tr("F5")), this, &MainWindow::pickLine);
  add(menu, tr("Pick this &shot automatically"), QKeySequence(tr("Shift+F5")), this, &MainWindow::pickShot);
  menu->addSeparator();
  add(menu, tr("&Trigger corrections..."), {}, this, &MainWindow::askTriggerCorrections);
  add(menu, tr("&Stop"), QKeySequence(tr("Ctrl+.")), this, [this] { job_.cancel(); });
}

void MainWindow::buildSectionMenu() {
  QMenu* menu = menuBar()->addMenu(tr("&Section"));
  auto* group = new QActionGroup(this);
  for (const int layers : {0, 2, 3, 4, 5, 6}) {
    QAction* action = menu->addAction(layers == 0 ? tr("Number of layers by evidence") : tr("%1 layers").arg(layers));
    action->setCheckable(true);
    action->setData(layers);
    group->addAction(action);
    layerActions_.push_back(action);
    connect(action, &QAction::triggered, this, [this, layers] { setLayers(layers); });
  }
  menu->addSeparator();
  solveTriggers_ = menu->addAction(tr("Solve for each shot's trigger delay"));
  solveTriggers_->setCheckable(true);
  connect(solveTriggers_, &QAction::triggered, this, [this](bool on) {
    SurveySettings settings = desk_.survey().settings;
    settings.solveTriggerDelays = on;
    desk_.commit(edits::setSettings(desk_.survey(), settings,
                                    on ? "Solve for trigger delays" : "Do not solve for trigger delays"));
  });
}

void MainWindow::buildViewMenu() {
  QMenu* menu = menuBar()->addMenu(tr("&View"));
  auto* looks = new QActionGroup(this);
  const int present = QSettings().value("look", 0).toInt();
  int kind = 0;
  for (const QString& name : {tr("&Light"), tr("&Dark"), tr("&Bright sun")}) {
    QAction* action = menu->addAction(name);
    action->setCheckable(true);
    action->setChecked(kind == present);
    looks->addAction(action);
    connect(action, &QAction::triggered, this, [this, kind] { setLookKind(static_cast<LookKind>(kind)); });
    ++kind;
  }
  menu->addSeparator();
  feet_ = menu->addAction(tr("&Feet instead of metres"));
  feet_->setCheckable(true);
  connect(feet_, &QAction::triggered, this, &MainWindow::setFeet);
  add(menu, tr("&Whole line"), QKeySequence(tr("Ctrl+0")), this, [this] {
    rangeSet_ = false;
    showScene();
  });
}

void MainWindow::buildHelpMenu() {
  QMenu* menu = menuBar()->addMenu(tr("&Help"));
  add(menu, tr("&Keys and gestures"), QKeySequence(tr("F1")), this, &MainWindow::showKeys);
  add(menu, tr("&About Strikeplate"), {}, this, &MainWindow::showAbout);
}

void MainWindow::chooseRecords(bool addToLine) {
  const QStringList paths = QFileDialog::getOpenFileNames(
      this, tr("Open shot records"), QSettings().value("folder").toString(),
      tr("Shot records (*.sg2 *.seg2 *.dat *.sgy *.segy *.SG2 *.SEG2 *.DAT *.SGY *.SEGY);;All files (*)"));
  if (!paths.isEmpty()) {
    QSettings().setValue("folder", QFileInfo(paths.front()).path());
    openRecords(paths, addToLine);
  }
}

void MainWindow::chooseSurvey() {
  const QString path = QFileDialog::getOpenFileName(this, tr("Open a survey"), QSettings().value("folder").toString(),
                                                    tr("Strikeplate surveys (*.splate)"));
  if (!path.isEmpty()) {
    openSurvey(path);
  }
}

void MainWindow::saveSurveyAs() {
  QString path = QFileDialog::getSaveFileName(this, tr("Save the survey as"), QSettings().value("folder").toString(),
                                              tr("Strikeplate surveys (*.splate)"));
  if (path.isEmpty()) {
    return;
  }
  if (!path.endsWith(".splate")) {
    path += ".splate";
  }
  if (const Outcome saved = desk_.saveAs(path); !saved) {
    say(tr("Not saved"), QString::fromStdString(saved.message()));
  }
}

void MainWindow::importPicks() {
  const QString path = QFileDialog::getOpenFileName(
      this, tr("Read picks from a table"), QSettings().value("folder").toString(), tr("Tables (*.csv *.txt)"));
  if (path.isEmpty()) {
    return;
  }
  const auto imported = strikeplate::importPicks(desk_.survey(), path.toStdString());
  if (!imported) {
    say(tr("No picks read"), QString::fromStdString(imported.message()));
    return;
  }
  if (!imported->edit.changes.empty()) {
    desk_.commit(imported->edit);
  }
  if (!imported->problems.empty()) {
    say(tr("Part of the table was not used"), QString::fromStdString(imported->problems.front()));
  }
}

void MainWindow::loadGeometry() {
  const QString path =
      QFileDialog::getOpenFileName(this, tr("Lay a geometry table over the headers"),
                                   QSettings().value("folder").toString(), tr("Tables (*.csv *.txt)"));
  if (path.isEmpty()) {
    return;
  }
  const auto edit = geometryEdit(desk_.survey(), path.toStdString());
  if (edit) {
    rangeSet_ = false;
    desk_.commit(*edit);
  } else {
    say(tr("Geometry not changed"), QString::fromStdString(edit.message()));
  }
}

void MainWindow::exportCsv() {
  const QString folder = QFileDialog::getExistingDirectory(this, tr("Folder for the tables"));
  if (folder.isEmpty() || !desk_.scene().interpretation) {
    return;
  }
  const std::string base = (folder + "/").toStdString();
  const Survey& survey = desk_.survey();
  const Interpretation& interpretation = *desk_.scene().interpretation;
  QStringList problems;
  for (const Outcome& outcome : {writeTextFile(base + "picks.csv", picksCsv(survey, interpretation)),
                                 writeTextFile(base + "depths.csv", depthsCsv(survey, interpretation)),
                                 writeTextFile(base + "layers.csv", layersCsv(interpretation)),
                                 writeTextFile(base + "opinions.csv", opinionsCsv(interpretation)),
                                 writeTextFile(base + "doubts.csv", doubtsCsv(interpretation)),
                                 writeSectionDxf(base + "section.dxf", survey, interpretation)}) {
    if (!outcome) {
      problems << QString::fromStdString(outcome.message());
    }
  }
  if (problems.isEmpty()) {
    answerLine_->setHint(tr("Tables and section written to %1").arg(folder));
  } else {
    say(tr("Not everything could be written"), problems.join("\n"));
  }
}

void MainWindow::printSheet() {
  if (!desk_.scene().interpretation) {
    say(tr("Nothing to print"), tr("There is no interpretation yet; open records and pick them first."));
    return;
  }
  QPrinter printer(QPrinter::HighResolution);
  printer.setDocName(tr("Refraction interpretation"));
  printer.setPageMargins(QMarginsF(0, 0, 0, 0), QPageLayout::Millimeter);
  QPrintDialog dialog(&printer, this);
  if (dialog.exec() != QDialog::Accepted) {
    return;
  }
  SheetOptions options;
  options.edits = desk_.editCount();
  if (const Outcome printed = paintSheet(printer, desk_.survey(), *desk_.scene().interpretation, options); !printed) {
    say(tr("Not printed"), QString::fromStdString(printed.message()));
  }
}

void MainWindow::saveSheet() {
  if (!desk_.scene().interpretation) {
    say(tr("Nothing to print"), tr("There is no interpretation yet; open records and pick them first."));
    return;
  }
  QString path = QFileDialog::getSaveFileName(this, tr("Save the sheet as PDF"),
                                              QSettings().value("folder").toString(), tr("PDF (*.pdf)"));
  if (path.isEmpty()) {
    return;
  }
  if (!path.endsWith(".pdf", Qt::CaseInsensitive)) {
    path += ".pdf";
  }
  SheetOptions options;
  options.edits = desk_.editCount();
  if (const Outcome written = writeSheetPdf(path, desk_.survey(), *desk_.scene().interpretation, options); !written) {
    say(tr("Not written"), QString::fromStdString(written.message()));
  } else {
    answerLine_->setHint(tr("Sheet written to %1").arg(path));
  }
}

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

void MainWindow::showKeys() {
  say(tr("Keys and gestures"),
      tr("<table cellpadding=3>"
         "<tr><td><b>Record</b></td><td></td></tr>"
         "<tr><td>Click</td><td>sets the first break at the onset nearby (Alt: exactly there)</td></tr>"
         "<tr><td>Drag a pick</td><td>moves it</td></tr>"
         "<tr><td>Delete</td><td>deletes the pick</td></tr>"
         "<tr><td>Page up, Page down</td><td>shot before, next shot</td></tr>"
         "<tr><td><b>Travel times</b></td><td></td></tr>"
         "<tr><td>1 to 6, 0</td><td>assigns the selected pick to a layer; 0 leaves it to the program</td></tr>"
         "<tr><td><b>Everywhere</b></td><td></td></tr>"
         "<tr><td>Escape</td><td>abandons the gesture</td></tr>"
         "<tr><td>Ctrl+Z, Ctrl+Shift+Z</td><td>undo, redo</td></tr>"
         "<tr><td>F5</td><td>picks the line automatically</td></tr>"
         "<tr><td>Ctrl+P</td><td>prints the sheet</td></tr>"
         "</table>"));
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
