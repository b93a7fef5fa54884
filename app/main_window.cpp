#include "app/main_window.h"

#include <cmath>

#include <QApplication>
#include <QCloseEvent>
#include <QDateTime>
#include <QDir>
#include <QDragEnterEvent>
#include <QDropEvent>
#include <QFileInfo>
#include <QLabel>
#include <QMessageBox>
#include <QMimeData>
#include <QProgressBar>
#include <QSettings>
#include <QSplitter>
#include <QStandardPaths>
#include <QStatusBar>
#include <QToolButton>
#include <QVBoxLayout>

#include "app/answer_line.h"
#include "app/files.h"
#include "core/survey/autopick.h"
#include "core/survey/gathers.h"
#include "core/survey/lines.h"
#include "core/survey/merge.h"
#include "widgets/line_strip.h"
#include "widgets/line_tabs.h"
#include "widgets/record_view.h"
#include "widgets/section_panel.h"
#include "widgets/travel_time_plot.h"

namespace strikeplate {
namespace {

/// Left and right margins of everything that shares the position axis, px.
constexpr int kAxisLeft = 64;
constexpr int kAxisRight = 18;

}  // namespace

MainWindow::MainWindow(QWidget* parent) : QMainWindow(parent) {
  setAcceptDrops(true);
  buildPanes();
  buildMenus();
  connect(&desk_, &Desk::sceneChanged, this, &MainWindow::showScene);
  connect(&desk_, &Desk::lineChanged, this, [this] { rangeSet_ = false; });
  connect(&desk_, &Desk::selectionChanged, this, &MainWindow::showSelection);
  connect(&desk_, &Desk::historyChanged, this, &MainWindow::showHistory);
  connect(&desk_, &Desk::plumbLineChanged, this, [this](double x) {
    for (View* view : views_) {
      view->showPlumbLine(x);
    }
    if (std::isfinite(x)) {
      plumbLine_ = x;
      showAnswer();
    }
  });
  connect(&desk_, &Desk::notSaved, this, [this](const QString& sentence) { say(tr("Not saved"), sentence); });
  connect(&job_, &Job::progressed, this, [this](double f) { progress_->setValue(static_cast<int>(100 * f)); });
  connect(&job_, &Job::finished, this, [this] { work_->hide(); });
  const QSettings settings;
  setLookKind(static_cast<LookKind>(settings.value("look", 0).toInt()));
  resize(1440, 900);
  restoreGeometry(settings.value("window").toByteArray());
  columns_->restoreState(settings.value("columns").toByteArray());
  sectionPanel_->splitter().restoreState(settings.value("section").toByteArray());
  rows_->restoreState(settings.value("rows").toByteArray());
  showScene();
  showHistory();
}

MainWindow::~MainWindow() = default;

void MainWindow::buildPanes() {
  lineTabs_ = new LineTabs(this);
  lineStrip_ = new LineStrip(this);
  recordView_ = new RecordView(this);
  travelTimePlot_ = new TravelTimePlot(this);
  sectionPanel_ = new SectionPanel(this);
  answerLine_ = new AnswerLine(this);
  lineStrip_->setAxisMargins(kAxisLeft, kAxisRight);
  travelTimePlot_->setAxisMargins(kAxisLeft, kAxisRight);
  sectionPanel_->setAxisMargins(kAxisLeft, kAxisRight);

  rows_ = new QSplitter(Qt::Vertical, this);
  rows_->addWidget(travelTimePlot_);
  rows_->addWidget(sectionPanel_);
  rows_->setStretchFactor(0, 4);
  rows_->setStretchFactor(1, 5);
  rows_->setSizes({400, 440});
  rows_->setChildrenCollapsible(false);
  auto* right = new QWidget(this);
  auto* rightLayout = new QVBoxLayout(right);
  rightLayout->setContentsMargins(0, 0, 0, 0);
  rightLayout->setSpacing(0);
  rightLayout->addWidget(lineTabs_);
  rightLayout->addWidget(lineStrip_);
  rightLayout->addWidget(rows_, 1);
  columns_ = new QSplitter(Qt::Horizontal, this);
  columns_->addWidget(recordView_);
  columns_->addWidget(right);
  columns_->setStretchFactor(0, 2);
  columns_->setStretchFactor(1, 3);
  columns_->setSizes({560, 880});
  columns_->setChildrenCollapsible(false);

  work_ = new QWidget(this);
  auto* workLayout = new QHBoxLayout(work_);
  workLayout->setContentsMargins(0, 0, 0, 0);
  progress_ = new QProgressBar(work_);
  progress_->setMaximumWidth(160);
  progress_->setAccessibleName(tr("Progress"));
  auto* stop = new QToolButton(work_);
  stop->setText(tr("Stop"));
  stop->setToolTip(tr("Leaves what was begun; the survey stays as it is (Ctrl+.)"));
  connect(stop, &QToolButton::clicked, this, [this] { job_.cancel(); });
  workLayout->addWidget(progress_);
  workLayout->addWidget(stop);
  work_->hide();
  auto* bottom = new QWidget(this);
  auto* bottomLayout = new QHBoxLayout(bottom);
  bottomLayout->setContentsMargins(0, 0, 8, 0);
  bottomLayout->addWidget(answerLine_, 1);
  bottomLayout->addWidget(work_);
  auto* all = new QWidget(this);
  auto* layout = new QVBoxLayout(all);
  layout->setContentsMargins(0, 0, 0, 0);
  layout->setSpacing(0);
  layout->addWidget(columns_, 1);
  layout->addWidget(bottom);
  setCentralWidget(all);

  views_ = {lineTabs_, lineStrip_, recordView_, travelTimePlot_, sectionPanel_};
  for (View* view : views_) {
    connectView(view);
  }
  connect(recordView_, &RecordView::pickShotWanted, this, &MainWindow::startPicking);
}

void MainWindow::connectView(View* view) {
  connect(view, &View::proposed, &desk_, &Desk::propose);
  connect(view, &View::selectionWanted, &desk_, &Desk::select);
  connect(view, &View::plumbLineWanted, &desk_, &Desk::point);
  connect(view, &View::hint, answerLine_, &AnswerLine::setHint);
  connect(view, &View::positionRangeWanted, this, [this](double left, double right) {
    rangeLeft_ = left;
    rangeRight_ = right;
    for (View* each : views_) {
      each->showPositionRange(left, right);
    }
  });
}

void MainWindow::showScene() {
  const Survey& survey = *desk_.scene().survey;
  if (!rangeSet_ && !survey.geophones.empty()) {
    rangeSet_ = true;
    const PositionRange whole = wholeLine(survey);
    rangeLeft_ = whole.left;
    rangeRight_ = whole.right;
    plumbLine_ = survey.geophones[survey.geophones.size() / 2].x;
    for (View* view : views_) {
      view->showPositionRange(rangeLeft_, rangeRight_);
    }
  }
  for (View* view : views_) {
    view->showScene(desk_.scene());
  }
  showAnswer();
}

void MainWindow::showSelection() {
  for (View* view : views_) {
    view->showSelection(desk_.scene().selection);
  }
}

void MainWindow::showHistory() {
  undo_->setEnabled(desk_.canUndo());
  redo_->setEnabled(desk_.canRedo());
  undo_->setText(desk_.canUndo() ? tr("Undo: %1").arg(desk_.undoText()) : tr("Undo"));
  redo_->setText(desk_.canRedo() ? tr("Redo: %1").arg(desk_.redoText()) : tr("Redo"));
  const SurveySettings& settings = desk_.survey().settings;
  feet_->setChecked(settings.feet);
  solveTriggers_->setChecked(settings.solveTriggerDelays);
  for (QAction* action : severalLinesActions_) {
    action->setEnabled(lineCount(desk_.survey()) > 1);
  }
  for (QAction* action : layerActions_) {
    action->setChecked(action->data().toInt() == settings.layers);
  }
  const QString name = desk_.path().isEmpty() ? QString() : QFileInfo(desk_.path()).completeBaseName() + " - ";
  setWindowTitle(name + "Strikeplate");
  rememberSurvey();
}

void MainWindow::showAnswer() {
  const Scene& scene = desk_.scene();
  if (scene.survey->shots.empty()) {
    answerLine_->setAnswer(tr("Drop shot records on this window, or open them from the File menu."));
  } else if (!scene.interpretation) {
    answerLine_->setAnswer(tr("Interpreting..."));
  } else {
    answerLine_->setAnswer(QString::fromStdString(answerLine(*scene.survey, *scene.interpretation, plumbLine_)));
  }
}

void MainWindow::openRecords(const QStringList& paths, Into into) {
  const std::vector<std::string> files = recordFiles(paths);
  if (files.empty()) {
    say(tr("Nothing to open"), tr("There is no file in what was chosen; choose SEG-2 or SEG-Y records."));
    return;
  }
  if (files.size() == 1 && isTimesTable(files.front())) {
    openTimes(QString::fromStdString(files.front()), into);
    return;
  }
  progress_->setValue(0);
  work_->show();
  job_.start([files](const Progress& progress) { return loadLine(files, {}, progress); },
             [this, into](LoadedLine line) { takeLine(line, into, false); });
}

void MainWindow::openDemo() {
  const QString folder = demoFolder();
  if (folder.isEmpty()) {
    say(tr("No demo line"), tr("The demo line's records were not found beside the program; reinstall Strikeplate."));
    return;
  }
  takeLine(loadLine(recordFiles({folder}), demoGeometry(folder).toStdString()), Into::NewSurvey, true);
}

void MainWindow::takeLine(const LoadedLine& line, Into into, bool pickAfterwards) {
  if (line.filesRead == 0 || line.survey.shots.empty()) {
    QStringList problems;
    for (const std::string& problem : line.problems) {
      problems << QString::fromStdString(problem);
    }
    say(tr("Nothing could be read"), problems.mid(0, 8).join("\n"));
    return;
  }
  rangeSet_ = false;
  if (into == Into::AnotherLine && !desk_.survey().shots.empty()) {
    desk_.commit(edits::addLine(desk_.survey(), line.survey));
  } else if (into == Into::LineAtHand && !desk_.survey().shots.empty()) {
    ContentChange change{desk_.survey(), merged(desk_.survey(), line.survey)};
    desk_.commit({tr("Add %n record(s)", "", line.filesRead).toStdString(), {std::move(change)}});
  } else if (const Outcome begun = desk_.begin(line.survey, newSurveyPath()); !begun) {
    say(tr("No place for the survey"), QString::fromStdString(begun.message()));
    return;
  }
  if (!line.problems.empty()) {
    QStringList problems;
    for (const std::string& problem : line.problems) {
      problems << QString::fromStdString(problem);
    }
    say(tr("Part of it could not be read"), problems.mid(0, 8).join("\n"));
  }
  if (pickAfterwards) {
    pickLine();
  }
}

void MainWindow::openSurvey(const QString& path) {
  rangeSet_ = false;
  if (const Outcome opened = desk_.open(path); !opened) {
    say(tr("Not opened"), QString::fromStdString(opened.message()));
  }
}

void MainWindow::pickLine() {
  startPicking(-1);
}

void MainWindow::pickShot() {
  if (desk_.scene().selection.shot >= 0) {
    startPicking(desk_.scene().selection.shot);
  }
}

void MainWindow::startPicking(int shot) {
  if (desk_.survey().shots.empty()) {
    return;
  }
  progress_->setValue(0);
  work_->show();
  auto survey = std::make_shared<const Survey>(desk_.survey());
  auto gathers = desk_.scene().gathers;
  job_.start(
      [survey, gathers, shot](const Progress& progress) {
        AutoPickOptions options;
        options.shot = shot;
        return pickAutomatically(*survey, *gathers, options, progress);
      },
      [this, survey](const Edit& edit) {
        if (edit.changes.empty()) {
          answerLine_->setHint(tr("No first break could be picked."));
        } else if (desk_.survey().records == survey->records && desk_.survey().shots.size() == survey->shots.size()) {
          // What the user picked meanwhile stays: only picks that are as they were are replaced.
          desk_.commit(stillFitting(desk_.survey(), edit));
        }
      });
}

void MainWindow::say(const QString& title, const QString& sentence) {
  auto* box = new QMessageBox(QMessageBox::Information, title, sentence, QMessageBox::Ok, this);
  box->setAttribute(Qt::WA_DeleteOnClose);
  box->open();
}

QString MainWindow::newSurveyPath() const {
  const QString folder = QStandardPaths::writableLocation(QStandardPaths::AppDataLocation) + "/surveys";
  QDir().mkpath(folder);
  const QString stamp = QDateTime::currentDateTime().toString("yyyy-MM-dd_HH-mm-ss");
  QString path = folder + "/" + stamp + ".splate";
  for (int n = 2; QFileInfo::exists(path); ++n) {
    path = folder + "/" + stamp + "_" + QString::number(n) + ".splate";
  }
  return path;
}

void MainWindow::dragEnterEvent(QDragEnterEvent* event) {
  if (event->mimeData()->hasUrls()) {
    event->acceptProposedAction();
  }
}

void MainWindow::dropEvent(QDropEvent* event) {
  QStringList paths;
  for (const QUrl& url : event->mimeData()->urls()) {
    if (url.isLocalFile()) {
      paths << url.toLocalFile();
    }
  }
  if (paths.size() == 1 && paths.front().endsWith(".splate", Qt::CaseInsensitive)) {
    openSurvey(paths.front());
  } else if (!paths.isEmpty()) {
    openRecords(paths, event->modifiers().testFlag(Qt::ShiftModifier) ? Into::LineAtHand : Into::NewSurvey);
  }
}

void MainWindow::closeEvent(QCloseEvent* event) {
  QSettings settings;
  settings.setValue("window", saveGeometry());
  settings.setValue("columns", columns_->saveState());
  settings.setValue("section", sectionPanel_->splitter().saveState());
  settings.setValue("rows", rows_->saveState());
  QMainWindow::closeEvent(event);
}

}  // namespace strikeplate
