#include "tests/app/batch_run.h"

#include <QDir>
#include <QFile>
#include <QProcess>

namespace strikeplate::testing {

BatchRun runBatchProgram(const QStringList& arguments) {
  QProcess program;
  program.start(STRIKEPLATE_BATCH, arguments);
  BatchRun run;
  if (program.waitForFinished(-1) && program.exitStatus() == QProcess::NormalExit) {
    run.status = program.exitCode();
  }
  run.out = QString::fromUtf8(program.readAllStandardOutput());
  run.errors = QString::fromUtf8(program.readAllStandardError());
  return run;
}

CsvTable readCsvTable(const QString& path) {
  CsvTable table;
  const QStringList lines = QString::fromUtf8(readFile(path)).split("\r\n", Qt::SkipEmptyParts);
  if (lines.isEmpty()) {
    return table;
  }
  table.header = lines.front().split(',');
  for (const QString& line : lines.mid(1)) {
    // The texts of doubts hold commas and quotes; the tables of numbers hold neither.
    const QStringList cells = line.split(',');
    std::map<QString, QString> row;
    for (qsizetype i = 0; i < std::min(cells.size(), table.header.size()); ++i) {
      row[table.header[i]] = cells[i];
    }
    table.rows.push_back(std::move(row));
  }
  return table;
}

QStringList demoRecords() {
  const QDir folder(STRIKEPLATE_SAMPLE_DATA "/demo_line");
  QStringList paths;
  for (const QString& name : folder.entryList({"*.sg2"}, QDir::Files, QDir::Name)) {
    paths << folder.filePath(name);
  }
  return paths;
}

QString tinyRecord() {
  return STRIKEPLATE_SAMPLE_DATA "/tiny/1001.sg2";
}

void writeFile(const QString& path, const QByteArray& bytes) {
  QFile file(path);
  if (file.open(QIODevice::WriteOnly)) {
    file.write(bytes);
  }
}

QByteArray readFile(const QString& path) {
  QFile file(path);
  return file.open(QIODevice::ReadOnly) ? file.readAll() : QByteArray();
}

}  // namespace strikeplate::testing
