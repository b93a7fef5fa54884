// How long a drag keeps the pointer waiting, on the real window: 500 moves of a branch end on the demo line.
//   strikeplate-drag-bench
// Prints the time that each move holds the event loop (median, 99th percentile) and the time until every pane shows
// the section that goes with it.
#include <algorithm>
#include <cstdio>
#include <vector>

#include <QApplication>
#include <QElapsedTimer>
#include <QTemporaryDir>
#include <QTest>
#include <qcustomplot.h>

#include "app/main_window.h"
#include "widgets/travel_time_plot.h"

namespace strikeplate {
namespace {

double quantile(std::vector<double> values, double share) {
  std::sort(values.begin(), values.end());
  return values.empty() ? 0.0 : values[static_cast<std::size_t>(share * static_cast<double>(values.size() - 1))];
}

void settle(MainWindow& window) {
  do {
    QTest::qWait(20);
  } while (window.busy());
}

int run() {
  MainWindow window;
  window.resize(1440, 900);
  window.show();
  window.openDemo();
  settle(window);
  window.desk().select({3, -1, 0});
  QCoreApplication::processEvents();
  auto* times = window.findChild<TravelTimePlot*>();
  QWidget* canvas = times->findChild<QCustomPlot*>();
  const Interpretation& interpretation = *window.desk().scene().interpretation;
  const auto from = times->placeOf(interpretation.arrivalOf(3, 32)).value_or(QPointF()).toPoint();
  const auto to = times->placeOf(interpretation.arrivalOf(3, 40)).value_or(QPointF()).toPoint();
  std::vector<double> held, shown;
  QTest::mousePress(canvas, Qt::LeftButton, {}, from);
  for (int move = 0; move < 500; ++move) {
    const double part = 0.5 - 0.5 * std::cos(move * 0.05);
    const InterpretationPtr before = window.desk().scene().interpretation;
    const SurveyPtr survey = window.desk().scene().survey;
    QElapsedTimer timer;
    timer.start();
    QTest::mouseMove(canvas, {from.x() + static_cast<int>(part * (to.x() - from.x())), from.y()});
    QCoreApplication::processEvents();
    held.push_back(1e-6 * static_cast<double>(timer.nsecsElapsed()));
    if (window.desk().scene().survey == survey) {
      continue;  // the end is at the same geophone still
    }
    while (window.desk().scene().interpretation == before && timer.elapsed() < 2000) {
      QCoreApplication::processEvents(QEventLoop::AllEvents, 1);
    }
    QCoreApplication::processEvents();
    shown.push_back(1e-6 * static_cast<double>(timer.nsecsElapsed()));
  }
  QTest::mouseRelease(canvas, Qt::LeftButton, {}, from);
  std::printf("moves %zu: event loop held, median %.1f ms, 99 %% %.1f ms\n", held.size(), quantile(held, 0.5),
              quantile(held, 0.99));
  std::printf("steps that changed a label %zu: all panes with the new section after, median %.1f ms, 99 %% %.1f ms\n",
              shown.size(), quantile(shown, 0.5), quantile(shown, 0.99));
  return 0;
}

}  // namespace
}  // namespace strikeplate

int main(int argc, char** argv) {
  if (qEnvironmentVariableIsEmpty("DISPLAY")) {
    qputenv("QT_QPA_PLATFORM", "offscreen");
  }
  const QTemporaryDir home;
  qputenv("HOME", home.path().toUtf8());
  qputenv("XDG_DATA_HOME", home.path().toUtf8());
  qputenv("XDG_CONFIG_HOME", home.path().toUtf8());
  const QApplication application(argc, argv);
  return strikeplate::run();
}
