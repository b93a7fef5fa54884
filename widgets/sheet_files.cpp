#include "widgets/sheet_files.h"

#include <QFileInfo>
#include <QSaveFile>

namespace strikeplate {
namespace {

Failure notWritten(const QString& path, const QString& reason) {
  return Failure{path.toStdString() + " could not be written (" + reason.toStdString() +
                 "); check its folder, your right to write there, and the room left."};
}

}  // namespace

Outcome writeWhole(const QString& path, const QByteArray& bytes) {
  const auto written = [&](QFileDevice& file, bool opened) {
    return opened && file.write(bytes) == bytes.size() && file.flush();
  };
  if (const QFileInfo info(path); info.exists() && !info.isFile()) {
    QFile file(path);
    return written(file, file.open(QIODevice::WriteOnly)) ? Outcome(Done{}) : notWritten(path, file.errorString());
  }
  QSaveFile file(path);
  const bool good = written(file, file.open(QIODevice::WriteOnly)) && file.commit();
  return good ? Outcome(Done{}) : notWritten(path, file.errorString());
}

}  // namespace strikeplate
