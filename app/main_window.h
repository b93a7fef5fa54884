#pragma once

#include <vector>

#include <QMainWindow>
#include <QStringList>

#include "app/desk.h"
#include "app/job.h"
#include "core/report/sheet.h"
#include "core/survey/load.h"
#include "widgets/sheet_figure.h"
#include "widgets/view.h"

class QAction;
class QLabel;
class QMenu;
class QProgressBar;
class QSplitter;

namespace strikeplate {

class AnswerLine;
class Handbook;
class LineStrip;
class LineTabs;
class RecordView;
class SectionPanel;
class TravelTimePlot;

/// The workstation's window: line strip, record view, travel-time plot, section panel and answer line over one desk.
class MainWindow : public QMainWindow {
  Q_OBJECT
 public:
  /// Where records that are opened belong.
  enum class Into { NewSurvey, LineAtHand, AnotherLine };

  explicit MainWindow(QWidget* parent = nullptr);
  ~MainWindow() override;

  /// Reads records (files or folders). Runs in the background.
  void openRecords(const QStringList& paths, Into into);
  /// Opens the demo line and picks it.
  void openDemo();
  void openSurvey(const QString& path);
  [[nodiscard]] Desk& desk() { return desk_; }
  /// True while records are being read, picked or interpreted.
  [[nodiscard]] bool busy() const { return job_.running() || desk_.interpreting(); }

 public slots:
  void pickLine();
  void pickShot();
  void showHandbook(const QString& chapter = {});

 protected:
  void dragEnterEvent(QDragEnterEvent* event) override;
  void dropEvent(QDropEvent* event) override;
  void closeEvent(QCloseEvent* event) override;

 private:
  void buildPanes();
  void buildLinesMenu(QMenu* menu);
  void removeLine();
  void buildMenus();
  void buildFileMenu();
  void buildEditMenu();
  void buildPicksMenu();
  void buildSectionMenu();
  void buildViewMenu();
  void buildHelpMenu();
  void buildTravelTimeMenu(QMenu* menu);
  void askReduction();
  void connectView(View* view);
  void chooseRecords(Into into);
  void openTimes(const QString& path, Into into);
  void chooseSurvey();
  void fillRecent(QMenu* menu);
  void rememberSurvey();
  void saveSurveyAs();
  void importPicks();
  void loadGeometry();
  void saveGeometryTable();
  void exportCsv();
  void makeSheet();
  void savePlot(SheetFigure::Kind kind);
  [[nodiscard]] SheetOptions sheetOptions() const;
  void editInfo();
  void editBoreholes();
  void editGeometry();
  void editBlows();
  void showKeys();
  void showAbout();
  void askTriggerCorrections();
  void showScene();
  void showSelection();
  void showHistory();
  void showAnswer();
  void takeLine(const LoadedLine& line, Into into, bool pickAfterwards);
  void startPicking(int shot);
  void setLookKind(LookKind kind);
  void setLayers(int layers);
  void setFeet(bool feet);
  void say(const QString& title, const QString& sentence);
  [[nodiscard]] QString newSurveyPath() const;

  Desk desk_;
  Job job_;
  std::vector<View*> views_;
  LineTabs* lineTabs_ = nullptr;
  LineStrip* lineStrip_ = nullptr;
  RecordView* recordView_ = nullptr;
  TravelTimePlot* travelTimePlot_ = nullptr;
  SectionPanel* sectionPanel_ = nullptr;
  AnswerLine* answerLine_ = nullptr;
  Handbook* handbook_ = nullptr;
  QSplitter* columns_ = nullptr;
  QSplitter* rows_ = nullptr;
  QProgressBar* progress_ = nullptr;
  QWidget* work_ = nullptr;  ///< progress and the button that stops it
  QLabel* hint_ = nullptr;
  QAction* undo_ = nullptr;
  QAction* redo_ = nullptr;
  QAction* feet_ = nullptr;
  QAction* solveTriggers_ = nullptr;
  std::vector<QAction*> severalLinesActions_;  // make sense only with several lines
  std::vector<QAction*> layerActions_;
  double plumbLine_ = Estimate::kNaN;
  double rangeLeft_ = 0.0, rangeRight_ = 0.0;
  bool rangeSet_ = false;
};

}  // namespace strikeplate
