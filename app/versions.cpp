#include "app/versions.h"

#include <Eigen/Core>
#include <QtGlobal>
#include <boost/version.hpp>
#include <qcustomplot.h>
#include <sqlite3.h>

namespace strikeplate {

std::vector<std::string> libraryVersions() {
  const auto triple = [](int a, int b, int c) {
    return std::to_string(a) + "." + std::to_string(b) + "." + std::to_string(c);
  };
  return {std::string("Qt ") + qVersion(), std::string("QCustomPlot ") + QCUSTOMPLOT_VERSION_STR,
          "Eigen " + triple(EIGEN_WORLD_VERSION, EIGEN_MAJOR_VERSION, EIGEN_MINOR_VERSION),
          "Boost " + triple(BOOST_VERSION / 100000, BOOST_VERSION / 100 % 1000, BOOST_VERSION % 100),
          std::string("SQLite ") + sqlite3_libversion()};
}

std::string versionText(const std::string& program) {
  std::string text = program + " " + STRIKEPLATE_VERSION + "\n";
  for (const std::string& library : libraryVersions()) {
    text += library + "\n";
  }
  return text;
}

}  // namespace strikeplate
