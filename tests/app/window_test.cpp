// The real window on the demo line, driven by pointer and key events.
#include <cmath>
#include <memory>

#include <QDir>
#include <QElapsedTimer>
#include <QProgressBar>
#include <QSettings>
#include <QTabBar>
#include <QTemporaryDir>
#include <QTest>
#include <QToolButton>
#include <gtest/gtest.h>
#include <qcustomplot.h>

#include "app/files.h"
#include "app/main_window.h"
#include "widgets/record_view.h"
#include "widgets/sheet_painter.h"
#include "widgets/sheet_preview.h"
#include "widgets/travel_time_plot.h"

namespace strikeplate {
namespace {

/// The window with the demo line loaded, picked and interpreted.
class Window : public ::testing::Test {
 protected:
  // Every process has a home of its own, so that tests can run side by side.
  static void SetUpTestSuite() {
    home = std::make_unique<QTemporaryDir>();
    qputenv("HOME", home->path().toUtf8());
    qputenv("XDG_DATA_HOME", home->filePath("data").toUtf8());
    qputenv("XDG_CONFIG_HOME", home->filePath("config").toUtf8());
  }
  static void TearDownTestSuite() { home.reset(); }

  void SetUp() override {
    window = std::make_unique<MainWindow>();
    window->resize(1440, 900);
    window->show();
    if (demo.isEmpty()) {
      window->openDemo();
      settle();
      demo = home->filePath("demo.splate");
      QFile::remove(demo);
      ASSERT_TRUE(QFile::copy(window->desk().path(), demo));
    } else {
      QFile::remove(copy());
      ASSERT_TRUE(QFile::copy(demo, copy()));
      window->openSurvey(copy());
      settle();
    }
    ASSERT_TRUE(scene().interpretation);
    ASSERT_TRUE(scene().interpretation->section.determined) << scene().interpretation->section.reason;
  }

  /// Until everything asked for is done; the test's own time limit ends a hang.
  void settle() {
    do {
      QTest::qWait(20);
    } while (window->busy());
    QTest::qWait(20);
  }

  const Scene& scene() const { return window->desk().scene(); }
  TravelTimePlot* times() const { return window->findChild<TravelTimePlot*>(); }
  QWidget* timesCanvas() const { return times()->findChild<QCustomPlot*>(); }
  double depthAt(double x) const { return scene().interpretation->section.depthAt(2, x).value; }
  QPoint endPlace(int shot, int side, int layer) const {
    for (const BranchEnd& end : branchEnds(scene().interpretation->branches, shot)) {
      if (end.side == side && end.layer == layer && end.far) {
        return times()->placeOf(end.arrival).value_or(QPointF()).toPoint();
      }
    }
    ADD_FAILURE() << "no such branch end";
    return {};
  }

  static QString copy() { return home->filePath("copy.splate"); }

  std::unique_ptr<MainWindow> window;
  inline static QString demo;  // picked once for all tests of the process
  inline static std::unique_ptr<QTemporaryDir> home;
};

TEST_F(Window, ABranchEndDraggedMovesEveryPaneBeforeTheButtonIsLetGo) {
  window->desk().select({3, -1, 0});
  QCoreApplication::processEvents();
  const double before = depthAt(47.0);
  const QPoint from = endPlace(3, 1, 1);
  QTest::mousePress(timesCanvas(), Qt::LeftButton, {}, from);
  // Six geophones outwards, as the axis is drawn now.
  const auto a = times()->placeOf(scene().interpretation->arrivalOf(3, 26));
  const auto b = times()->placeOf(scene().interpretation->arrivalOf(3, 32));
  ASSERT_TRUE(a && b);
  const QPoint to = from + QPoint(static_cast<int>(b->x() - a->x()), 0);
  for (int step = 1; step <= 6; ++step) {
    QTest::mouseMove(timesCanvas(), from + (to - from) * step / 6);
    QTest::qWait(30);
  }
  QTest::qWait(200);
  EXPECT_GT(std::abs(depthAt(47.0) - before), 1e-4);
  EXPECT_FALSE(window->desk().canUndo() && window->desk().undoText().contains("branch"));
  QTest::mouseRelease(timesCanvas(), Qt::LeftButton, {}, to);
  settle();
  EXPECT_TRUE(window->desk().undoText().contains("branch")) << window->desk().undoText().toStdString();
  const double dragged = depthAt(47.0);
  EXPECT_GT(std::abs(dragged - before), 1e-4);

  window->desk().undo();
  settle();
  EXPECT_NEAR(depthAt(47.0), before, 1e-9);
  window->desk().redo();
  settle();
  EXPECT_NEAR(depthAt(47.0), dragged, 1e-9);
}

TEST_F(Window, EscapeLeavesNoTraceOfADrag) {
  window->desk().select({3, -1, 0});
  QCoreApplication::processEvents();
  const Survey before = window->desk().survey();
  const int edits = window->desk().editCount();
  const QPoint from = endPlace(3, 1, 1);
  QTest::mousePress(timesCanvas(), Qt::LeftButton, {}, from);
  QTest::mouseMove(timesCanvas(), from + QPoint(60, 0));
  QTest::qWait(60);
  QTest::keyClick(times(), Qt::Key_Escape);
  QTest::mouseRelease(timesCanvas(), Qt::LeftButton, {}, from + QPoint(60, 0));
  settle();
  EXPECT_TRUE(window->desk().survey() == before);
  EXPECT_EQ(window->desk().editCount(), edits);
}

TEST_F(Window, APickDeletedAndBroughtBackByUndo) {
  auto* record = window->findChild<RecordView*>();
  ASSERT_NE(record, nullptr);
  window->desk().select({2, 20, 0});
  QCoreApplication::processEvents();
  ASSERT_TRUE(window->desk().survey().shots[2].traces[20].pick);
  record->setFocus();
  QTest::keyClick(record, Qt::Key_Delete);
  settle();
  EXPECT_FALSE(window->desk().survey().shots[2].traces[20].pick);
  window->desk().undo();
  settle();
  EXPECT_TRUE(window->desk().survey().shots[2].traces[20].pick);
}

TEST_F(Window, AnotherLineOfTheJobHasATabAndKeepsItsOwnPicks) {
  auto* tabs = window->findChild<QTabBar*>();
  ASSERT_NE(tabs, nullptr);
  EXPECT_FALSE(tabs->isVisible());
  const std::vector<Shot> first = window->desk().survey().shots;
  const double depth = depthAt(47.0);
  window->openRecords({demoFolder() + "/1001.sg2"}, MainWindow::Into::AnotherLine);
  settle();
  ASSERT_EQ(tabs->count(), 2);
  EXPECT_TRUE(tabs->isVisible());
  EXPECT_EQ(tabs->currentIndex(), 1);
  ASSERT_EQ(window->desk().survey().shots.size(), 1U);

  QTest::mouseClick(tabs, Qt::LeftButton, {}, tabs->tabRect(0).center());
  settle();
  EXPECT_EQ(window->desk().survey().shots, first);
  EXPECT_NEAR(depthAt(47.0), depth, 1e-9) << "the same survey, the same answer";
  EXPECT_TRUE(window->desk().undoText().startsWith("Show ")) << window->desk().undoText().toStdString();
  window->desk().undo();
  settle();
  EXPECT_EQ(tabs->currentIndex(), 1);
  window->desk().undo();
  settle();
  EXPECT_FALSE(tabs->isVisible());
  EXPECT_EQ(window->desk().survey().shots, first);
}

TEST_F(Window, ReadingIsStoppedByItsButtonAndTheSurveyStaysAsItIs) {
  const Survey before = window->desk().survey();
  auto* stop = window->findChild<QProgressBar*>()->parentWidget()->findChild<QToolButton*>();
  ASSERT_TRUE(stop);
  EXPECT_FALSE(stop->isVisible());
  QStringList many;
  for (int round = 0; round < 20; ++round) {
    many << demoFolder();
  }
  window->openRecords(many, MainWindow::Into::NewSurvey);
  EXPECT_TRUE(stop->isVisible());
  QTest::mouseClick(stop, Qt::LeftButton);
  settle();
  EXPECT_FALSE(stop->isVisible());
  EXPECT_EQ(window->desk().survey(), before);
}

TEST_F(Window, TheSurveyIsOnDiskAfterEveryEditAndOpensWithItsHistory) {
  const QString path = window->desk().path();
  ASSERT_TRUE(QFile::exists(path));
  const int edits = window->desk().editCount();
  const Survey before = window->desk().survey();
  window.reset();
  window = std::make_unique<MainWindow>();
  window->openSurvey(path);
  settle();
  EXPECT_EQ(window->desk().editCount(), edits);
  EXPECT_EQ(window->desk().survey().shots, before.shots);
  EXPECT_TRUE(window->desk().canUndo());
}

TEST_F(Window, TheSheetIsPreviewedWithTheAnswerOfTheLine) {
  QString answer;
  QTimer::singleShot(0, window.get(), [&answer] {
    auto* preview = qobject_cast<SheetPreview*>(QApplication::activeModalWidget());
    ASSERT_NE(preview, nullptr);
    answer = QString::fromStdString(preview->content().answer);
    preview->reject();
  });
  for (QAction* action : window->findChildren<QAction*>()) {
    if (action->text().contains("sheet")) {
      action->trigger();
      break;
    }
  }
  EXPECT_TRUE(answer.contains("the top of layer 2 lies")) << answer.toStdString();
}

TEST_F(Window, TheSheetOfWhatIsShownIsPrinted) {
  const QString path = home->filePath("sheet.pdf");
  SheetOptions options;
  options.edits = window->desk().editCount();
  ASSERT_TRUE(writeSheetPdf(path, window->desk().survey(), *scene().interpretation, options));
  QFile file(path);
  ASSERT_TRUE(file.open(QIODevice::ReadOnly));
  EXPECT_TRUE(file.read(5) == "%PDF-");
  file.remove();
}

}  // namespace
}  // namespace strikeplate
