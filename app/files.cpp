#include "app/files.h"

#include <algorithm>

#include <QCollator>
#include <QDir>
#include <QFileInfo>

namespace strikeplate {

std::vector<std::string> recordFiles(const QStringList& paths) {
  static const QStringList kPatterns = {"*.sg2", "*.seg2", "*.dat", "*.sgy", "*.segy"};
  QCollator order;
  order.setNumericMode(true);
  std::vector<std::string> files;
  for (const QString& path : paths) {
    if (!QFileInfo(path).isDir()) {
      files.push_back(path.toStdString());
      continue;
    }
    QStringList names = QDir(path).entryList(kPatterns, QDir::Files);
    std::sort(names.begin(), names.end(), order);
    for (const QString& name : names) {
      files.push_back((path + "/" + name).toStdString());
    }
  }
  return files;
}

QString demoFolder() {
  for (const char* folder : {STRIKEPLATE_INSTALLED_DEMO, STRIKEPLATE_SOURCE_DEMO}) {
    if (QFileInfo(QString::fromUtf8(folder)).isDir()) {
      return QString::fromUtf8(folder);
    }
  }
  return {};
}

QString demoGeometry(const QString& folder) {
  const QString path = folder + "/geometry.csv";
  return QFileInfo::exists(path) ? path : QString();
}

}  // namespace strikeplate
