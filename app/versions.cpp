#include "app/versions.h"

#include <Eigen/Core>
#include <QtGlobal>
#include <boost/version.hpp>
#include <qcustomplot.h>
#include <sqlite3.h>

namespace strikeplate {

std::string versionText(const std::string& program) {
  const auto triple = [](int a, int b, int c) {
    return std::to_string(a) + "." + std::to_string(b) + "." + std::to_string(c);
  };
  return program + " " + STRIKEPLATE_VERSION + "\n" + "Qt " + qVersion() + "\n" + "QCustomPlot " +
         QCUSTOMPLOT_VERSION_STR + "\n" + "Eigen " +
         triple(EIGEN_WORLD_VERSION, EIGEN_MAJOR_VERSION, EIGEN_MINOR_VERSION) + "\n" + "Boost " +
         triple(BOOST_VERSION / 100000, BOOST_VERSION / 100 % 1000, BOOST_VERSION % 100) + "\n" + "SQLite " +
         sqlite3_libversion() + "\n";
}

}  // namespace strikeplate
