#include "widgets/typed_numbers.h"

#include <algorithm>

#include "core/base/numbers.h"

namespace strikeplate {

std::optional<double> typedNumber(const QString& text) {
  QString plain = text.trimmed();
  plain.replace(QChar(0x2212), '-').replace(',', '.');
  return parseNumber(plain.toStdString());
}

QString shortNumber(double value, int decimals) {
  QString text = QString::fromStdString(fixed(value, decimals));
  if (text.contains('.')) {
    while (text.endsWith('0')) {
      text.chop(1);
    }
    if (text.endsWith('.')) {
      text.chop(1);
    }
  }
  return text == "-0" ? QString("0") : text;
}

std::vector<QStringList> pastedCells(const QString& text) {
  QString lines = text;
  lines.replace("\r\n", "\n").replace('\r', '\n');
  const QChar separator = lines.contains('\t')                         ? QChar('\t')
                          : lines.contains(';')                        ? QChar(';')
                          : lines.contains(',') && lines.contains('.') ? QChar(',')
                                                                       : QChar('\t');
  std::vector<QStringList> rows;
  for (const QString& line : lines.split('\n')) {
    if (!line.trimmed().isEmpty()) {
      QStringList cells = line.split(separator);
      std::for_each(cells.begin(), cells.end(), [](QString& cell) { cell = cell.trimmed(); });
      rows.push_back(cells);
    }
  }
  const auto isNumber = [](const QString& cell) { return typedNumber(cell).has_value(); };
  if (!rows.empty() && std::none_of(rows.front().begin(), rows.front().end(), isNumber)) {
    rows.erase(rows.begin());
  }
  return rows;
}

}  // namespace strikeplate
