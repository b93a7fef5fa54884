#pragma once

#include <map>
#include <string>
#include <vector>

#include <QString>
#include <QTemporaryDir>

namespace strikeplate::testing {

/// One run of the real strikeplate-batch program.
struct BatchRun {
  int status = -1;  ///< -1 when it crashed or did not end
  QString out;
  QString errors;
};
BatchRun runBatchProgram(const QStringList& arguments);

/// A CSV file by column name. Asserts nothing: an unreadable file has no rows.
struct CsvTable {
  QStringList header;
  std::vector<std::map<QString, QString>> rows;
};
CsvTable readCsvTable(const QString& path);

/// The records of the demo line, in order of their names.
QStringList demoRecords();
/// The smallest record: eight geophones over two flat layers.
QString tinyRecord();

void writeFile(const QString& path, const QByteArray& bytes);
QByteArray readFile(const QString& path);

}  // namespace strikeplate::testing
