// The menus of the window.
#include <QActionGroup>
#include <QMenuBar>
#include <QSettings>

#include "app/main_window.h"
#include "widgets/record_display_menu.h"
#include "widgets/record_view.h"
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
  add(menu, tr("Open &records or a table of travel times..."), QKeySequence::Open, this,
      [this] { chooseRecords(Into::NewSurvey); });
  add(menu, tr("&Add records to this line..."), {}, this, [this] { chooseRecords(Into::LineAtHand); });
  add(menu, tr("Open records as another &line of this job..."), {}, this,
      [this] { chooseRecords(Into::AnotherLine); });
  add(menu, tr("Open &survey..."), QKeySequence(tr("Ctrl+Shift+O")), this, &MainWindow::chooseSurvey);
  QMenu* recent = menu->addMenu(tr("Re&cent surveys"));
  connect(recent, &QMenu::aboutToShow, this, [this, recent] { fillRecent(recent); });
  add(menu, tr("Save survey &as..."), QKeySequence::SaveAs, this, &MainWindow::saveSurveyAs);
  menu->addSeparator();
  add(menu, tr("Lay a &geometry table over the headers..."), {}, this, &MainWindow::loadGeometry);
  add(menu, tr("Write the geometry as a ta&ble..."), {}, this, &MainWindow::saveGeometryTable);
  add(menu, tr("Read &picks from a table..."), {}, this, &MainWindow::importPicks);
  menu->addSeparator();
  add(menu, tr("&Print the sheet, or save it as PDF..."), QKeySequence::Print, this, &MainWindow::makeSheet);
  add(menu, tr("Write &tables and plots (CSV, XLSX, DXF, SVG, GeoJSON)..."), {}, this, &MainWindow::exportCsv);
  QMenu* plots = menu->addMenu(tr("Save a p&lot (SVG, PNG)"));
  for (const auto& [text, kind] : {std::pair{tr("&Section..."), SheetFigure::Kind::Section},
                                   std::pair{tr("&Travel times..."), SheetFigure::Kind::TravelTimes},
                                   std::pair{tr("&Residuals..."), SheetFigure::Kind::Residuals},
                                   std::pair{tr("Record of the &chosen shot..."), SheetFigure::Kind::Record}}) {
    add(plots, text, {}, this, [this, kind = kind] { savePlot(kind); });
  }
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
  add(menu, tr("&Geometry..."), QKeySequence(tr("Ctrl+G")), this, &MainWindow::editGeometry);
  add(menu, tr("Blows and &stack..."), {}, this, &MainWindow::editBlows);
  add(menu, tr("&Boreholes..."), {}, this, &MainWindow::editBoreholes);
  menu->addSeparator();
  buildLinesMenu(menu);
}

void MainWindow::buildPicksMenu() {
  QMenu* menu = menuBar()->addMenu(tr("&Picks"));
  add(menu, tr("Pick the &line automatically"), QKeySequence(tr("F5")), this, &MainWindow::pickLine);
  add(menu, tr("Pick this &shot automatically"), QKeySequence(tr("Shift+F5")), this, &MainWindow::pickShot);
  menu->addSeparator();
  QMenu* layers = menu->addMenu(tr("&Give the marked picks to a layer"));
  for (int layer = 1; layer <= 6; ++layer) {
    layers->addAction(tr("Layer &%1 (key %1 on the travel-time plot)").arg(layer), this,
                      [this, layer] { travelTimePlot_->assignChosen(layer); });
  }
  layers->addAction(tr("Let the &program assign (key 0)"), this, [this] { travelTimePlot_->assignChosen(0); });
  menu->addAction(tr("&Delete the marked picks"), this, [this] { travelTimePlot_->deleteChosen(); });
  QMenu* branch = menu->addMenu(tr("&Branch of the selected pick"));
  branch->addAction(tr("&Split here (key S on the travel-time plot)"), travelTimePlot_,
                    &TravelTimePlot::splitBranchHere);
  branch->addAction(tr("&Merge with the one beyond (key M)"), travelTimePlot_, &TravelTimePlot::mergeBranchHere);
  branch->addAction(tr("&Dissolve: leave it to the program (key D)"), travelTimePlot_,
                    &TravelTimePlot::dissolveBranchHere);
  branch->addAction(tr("End one pick &out (Alt+arrow)"), this, [this] { travelTimePlot_->slideFarEnd(1); });
  branch->addAction(tr("End one pick &in (Alt+arrow)"), this, [this] { travelTimePlot_->slideFarEnd(-1); });
  menu->addAction(tr("&Critical distance of this shot..."), this,
                  [this] { travelTimePlot_->askMark(MarkKind::CriticalDistance, 0.0); });
  menu->addAction(tr("&Reflection time of this shot..."), this,
                  [this] { travelTimePlot_->askMark(MarkKind::ReflectionTime, 0.0); });
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
  fillDisplayMenu(*menu->addMenu(tr("&Record")), *recordView_);
  buildTravelTimeMenu(menu->addMenu(tr("Travel &times")));
  menu->addSeparator();
  feet_ = menu->addAction(tr("&Feet instead of metres"));
  feet_->setCheckable(true);
  connect(feet_, &QAction::triggered, this, &MainWindow::setFeet);
  add(menu, tr("&Whole line"), QKeySequence(tr("Ctrl+0")), this, [this] {
    rangeSet_ = false;
    showScene();
  });
}

void MainWindow::buildTravelTimeMenu(QMenu* menu) {
  const auto addSwitch = [&](const QString& text, const QKeySequence& key, bool TravelTimeDisplay::*what) {
    QAction* action = menu->addAction(text);
    action->setShortcut(key);
    action->setCheckable(true);
    action->setChecked(travelTimePlot_->display().*what);
    connect(travelTimePlot_, &TravelTimePlot::displayChanged, action,
            [this, action, what] { action->setChecked(travelTimePlot_->display().*what); });
    connect(action, &QAction::toggled, this, [this, what](bool on) {
      TravelTimeDisplay display = travelTimePlot_->display();
      display.*what = on;
      travelTimePlot_->setDisplay(display);
    });
  };
  addSwitch(tr("&All shots"), QKeySequence(tr("Ctrl+Alt+A")), &TravelTimeDisplay::allShots);
  addSwitch(tr("&Fitted lines"), QKeySequence(tr("Ctrl+Alt+L")), &TravelTimeDisplay::fittedLines);
  addSwitch(tr("The &section's curves"), QKeySequence(tr("Ctrl+Alt+C")), &TravelTimeDisplay::predicted);
  addSwitch(tr("&Residuals: pick minus section"), QKeySequence(tr("Ctrl+Alt+R")), &TravelTimeDisplay::residuals);
  addSwitch(tr("&Crossover and critical distances"), QKeySequence(tr("Ctrl+Alt+X")), &TravelTimeDisplay::marks);
  addSwitch(tr("Reci&procal times of the shot"), QKeySequence(tr("Ctrl+Alt+P")), &TravelTimeDisplay::reciprocals);
  menu->addAction(tr("&Keep the shot in view (key K)"), travelTimePlot_, &TravelTimePlot::keepShot);
  menu->addAction(tr("For&ward, reverse or both stand out (key F)"), travelTimePlot_, &TravelTimePlot::nextSide);
  menu->addSeparator();
  QAction* reduced = menu->addAction(tr("Re&duced time..."));
  connect(reduced, &QAction::triggered, this, &MainWindow::askReduction);
}

void MainWindow::buildHelpMenu() {
  QMenu* menu = menuBar()->addMenu(tr("&Help"));
  add(menu, tr("&Handbook"), QKeySequence(tr("F1")), this, [this] { showHandbook(); });
  add(menu, tr("A short &tour"), {}, this, [this] { showHandbook(tr("A short tour")); });
  add(menu, tr("&Keys and gestures"), QKeySequence(tr("Shift+F1")), this, &MainWindow::showKeys);
  add(menu, tr("&About Strikeplate"), {}, this, &MainWindow::showAbout);
}

}  // namespace strikeplate
