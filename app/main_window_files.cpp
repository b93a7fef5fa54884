// What the window opens, saves, prints and writes.
#include <algorithm>

#include <QFileDialog>
#include <QFileInfo>
#include <QMenu>
#include <QSettings>

#include "app/answer_line.h"
#include "app/main_window.h"
#include "app/times_dialog.h"
#include "app/versions.h"
#include "core/base/checksum.h"
#include "core/report/csv_out.h"
#include "core/report/geojson_out.h"
#include "core/report/section_dxf.h"
#include "core/report/tables_xlsx.h"
#include "core/survey/geometry_edit.h"
#include "core/survey/picks_in.h"
#include "widgets/sheet_preview.h"

namespace strikeplate {

void MainWindow::chooseRecords(Into into) {
  const QStringList paths = QFileDialog::getOpenFileNames(
      this, tr("Open shot records, or a table of travel times"), QSettings().value("folder").toString(),
      tr("Shot records (*.sg2 *.seg2 *.dat *.sgy *.segy *.SG2 *.SEG2 *.DAT *.SGY *.SEGY);;"
         "Tables of travel times (*.csv *.txt *.tsv);;All files (*)"));
  if (!paths.isEmpty()) {
    QSettings().setValue("folder", QFileInfo(paths.front()).path());
    openRecords(paths, into);
  }
}

// First breaks that were read elsewhere, without their records.
void MainWindow::openTimes(const QString& path, Into into) {
  const auto table = readTimesTable(path.toStdString());
  if (!table) {
    say(tr("Nothing could be read"), QString::fromStdString(table.message()));
    return;
  }
  TimesDialog dialog(*table, this);
  if (dialog.exec() == QDialog::Accepted) {
    const Result<Survey> survey = dialog.survey();
    LoadedLine line;
    line.survey = *survey;
    line.survey.info.tables.push_back({path.toStdString(), fileChecksum(path.toStdString()).value_or("")});
    line.filesRead = 1;
    takeLine(line, into, false);
  }
}

void MainWindow::chooseSurvey() {
  const QString path = QFileDialog::getOpenFileName(this, tr("Open a survey"), QSettings().value("folder").toString(),
                                                    tr("Strikeplate surveys (*.splate)"));
  if (!path.isEmpty()) {
    openSurvey(path);
  }
}

void MainWindow::rememberSurvey() {
  constexpr qsizetype kMost = 9;
  QSettings settings;
  QStringList recent = settings.value("recent").toStringList();
  const QString path = desk_.path();
  if (path.isEmpty() || (!recent.isEmpty() && recent.front() == path)) {
    return;
  }
  recent.removeAll(path);
  recent.prepend(path);
  settings.setValue("recent", recent.mid(0, kMost));
}

void MainWindow::fillRecent(QMenu* menu) {
  menu->clear();
  for (const QString& path : QSettings().value("recent").toStringList()) {
    if (QFileInfo::exists(path) && path != desk_.path()) {
      QAction* action = menu->addAction(QFileInfo(path).completeBaseName(), this, [this, path] { openSurvey(path); });
      action->setToolTip(path);
      action->setStatusTip(path);
    }
  }
  menu->setToolTipsVisible(true);
  if (menu->isEmpty()) {
    menu->addAction(tr("None yet"))->setEnabled(false);
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
    Edit edit = imported->edit;
    edit.changes.push_back(edits::noteTable(desk_.survey(), path.toStdString()));
    desk_.commit(edit);
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

void MainWindow::saveGeometryTable() {
  const auto table = geometryTableOf(desk_.survey());
  if (!table) {
    say(tr("No table written"), QString::fromStdString(table.message()));
    return;
  }
  const QString path =
      QFileDialog::getSaveFileName(this, tr("Write the geometry as a table"),
                                   QSettings().value("folder").toString() + "/geometry.csv", tr("Tables (*.csv)"));
  if (path.isEmpty()) {
    return;
  }
  if (const Outcome written = writeTextFile(path.toStdString(), geometryCsv(*table)); !written) {
    say(tr("No table written"), QString::fromStdString(written.message()));
  } else {
    answerLine_->setHint(tr("Geometry written to %1").arg(path));
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
  for (const Outcome& outcome :
       {writeTextFile(base + "picks.csv", picksCsv(survey, interpretation)),
        writeTextFile(base + "depths.csv", depthsCsv(survey, interpretation)),
        writeTextFile(base + "layers.csv", layersCsv(interpretation)),
        writeTextFile(base + "opinions.csv", opinionsCsv(interpretation)),
        writeTextFile(base + "doubts.csv", doubtsCsv(interpretation)),
        writeTextFile(base + "boreholes.csv", boreholesCsv(survey, interpretation)),
        writeTablesXlsx(base + "tables.xlsx", survey, interpretation),
        writeSectionDxf(base + "section.dxf", survey, interpretation),
        writeSheetFigure(folder + "/section.svg", {}, survey, interpretation, sheetOptions()),
        writeSheetFigure(folder + "/travel_times.svg", {SheetFigure::Kind::TravelTimes}, survey, interpretation,
                         sheetOptions())}) {
    if (!outcome) {
      problems << QString::fromStdString(outcome.message());
    }
  }
  if (survey.info.map) {
    const auto text = geoJson(survey, interpretation);
    const Outcome written = text ? writeTextFile(base + "line.geojson", *text) : Outcome(text.failure());
    if (!written) {
      problems << QString::fromStdString(written.message());
    }
  }
  if (problems.isEmpty()) {
    answerLine_->setHint(tr("Tables and plots written to %1").arg(folder));
  } else {
    say(tr("Not everything could be written"), problems.join("\n"));
  }
}

void MainWindow::makeSheet() {
  if (!desk_.scene().interpretation) {
    say(tr("Nothing to print"), tr("There is no interpretation yet; open records and pick them first."));
    return;
  }
  SheetOptions options = sheetOptions();
  SheetPreview preview(desk_.survey(), *desk_.scene().interpretation, options, this);
  preview.setFolder(QSettings().value("folder").toString());
  if (QSettings().contains("letter")) {
    preview.setPaper(QSettings().value("letter").toBool() ? QPageSize::Letter : QPageSize::A4);
  }
  connect(&preview, &SheetPreview::written, answerLine_, &AnswerLine::setHint);
  preview.exec();
  options = preview.options();
  QSettings().setValue("letter", preview.paper() == QPageSize::Letter);
  QSettings().setValue("blackAndWhite", options.blackAndWhite);
  if (const SheetChoices choices = sheetChoicesOf(options); !(choices == desk_.survey().info.sheet)) {
    desk_.commit(edits::setSheet(desk_.survey(), choices));
  }
}

SheetOptions MainWindow::sheetOptions() const {
  SheetOptions options = sheetOptionsOf(desk_.survey());
  options.edits = desk_.editCount();
  options.builtOn = libraryVersions();
  options.blackAndWhite = QSettings().value("blackAndWhite").toBool();
  return options;
}

void MainWindow::savePlot(SheetFigure::Kind kind) {
  if (!desk_.scene().interpretation) {
    say(tr("Nothing to draw"), tr("There is no interpretation yet; open records and pick them first."));
    return;
  }
  QString path = QFileDialog::getSaveFileName(this, tr("Save the plot as"), QSettings().value("folder").toString(),
                                              tr("Drawing (*.svg);;Picture (*.png)"));
  if (path.isEmpty()) {
    return;
  }
  if (QFileInfo(path).suffix().isEmpty()) {
    path += ".svg";
  }
  SheetFigure figure;
  figure.kind = kind;
  figure.shot = std::max(0, desk_.scene().selection.shot);
  if (const Outcome written =
          writeSheetFigure(path, figure, desk_.survey(), *desk_.scene().interpretation, sheetOptions());
      !written) {
    say(tr("Not written"), QString::fromStdString(written.message()));
  } else {
    answerLine_->setHint(tr("Plot written to %1").arg(path));
  }
}

}  // namespace strikeplate
