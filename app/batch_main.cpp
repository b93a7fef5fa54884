// strikeplate-batch: the headless program.
#include <iostream>
#include <string>
#include <vector>

#include <QApplication>

#include "app/batch.h"
#include "app/versions.h"

int main(int argc, char** argv) {
  using namespace strikeplate;
  const auto options = parseBatchOptions(std::vector<std::string>(argv + 1, argv + argc));
  if (!options) {
    std::cerr << "strikeplate-batch: " << options.message() << "\n";
    return static_cast<int>(BatchStatus::WrongUsage);
  }
  if (options->help || options->version) {
    std::cout << (options->help ? batchHelp() : versionText("strikeplate-batch"));
    return static_cast<int>(BatchStatus::Done);
  }
  // Painting the sheet needs Qt's fonts but no display.
  qputenv("QT_QPA_PLATFORM", "offscreen");
  int noArguments = 1;
  const QApplication application(noArguments, argv);
  return static_cast<int>(runBatch(*options, std::cout, std::cerr));
}
