// strikeplate: the workstation.
#include <iostream>

#include <QApplication>
#include <QCommandLineParser>
#include <QFileInfo>
#include <QIcon>
#include <QSettings>
#include <QTimer>

#include "app/main_window.h"
#include "app/versions.h"

int main(int argc, char** argv) {
  for (int i = 1; i < argc; ++i) {
    if (QString::fromUtf8(argv[i]) == "--version") {
      std::cout << strikeplate::versionText("strikeplate");
      return 0;
    }
  }
  QApplication application(argc, argv);
  QApplication::setApplicationName("strikeplate");
  QApplication::setOrganizationName("strikeplate");
  QApplication::setApplicationDisplayName("Strikeplate");
  QApplication::setApplicationVersion(STRIKEPLATE_VERSION);
  QApplication::setWindowIcon(QIcon(":/strikeplate.svg"));
  QCommandLineParser parser;
  parser.setApplicationDescription("Workstation for near-surface seismic refraction.");
  parser.addHelpOption();
  parser.addOption({"version", "Shows the version and what it is built on."});
  parser.addPositionalArgument("FILE", "Shot records, a folder of them, or a survey file; none opens the demo line.",
                               "[FILE...]");
  parser.process(application);

  strikeplate::MainWindow window;
  window.show();
  const QStringList files = parser.positionalArguments();
  QTimer::singleShot(0, &window, [&window, files] {
    if (files.isEmpty()) {
      window.openDemo();
      QSettings settings;
      if (!settings.value("toured").toBool()) {
        settings.setValue("toured", true);
        window.showHandbook(strikeplate::MainWindow::tr("A short tour"));
      }
    } else if (files.size() == 1 && files.front().endsWith(".splate", Qt::CaseInsensitive)) {
      window.openSurvey(files.front());
    } else {
      window.openRecords(files, strikeplate::MainWindow::Into::NewSurvey);
    }
  });
  return QApplication::exec();
}
