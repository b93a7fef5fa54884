#pragma once

#include <vector>

#include <QTableWidget>

#include "core/base/units.h"

namespace strikeplate {

/// A table of lengths that can be typed, pasted from a spreadsheet and filled by a rule. The values are kept in
/// metres as they came; a cell changes its value only when it is changed itself, so showing feet rounds nothing.
class PlaceTable : public QTableWidget {
  Q_OBJECT
 public:
  /// Columns of lengths by name, and one of words behind them when `notes` has a name.
  explicit PlaceTable(const QStringList& columns, const QString& notes, QWidget* parent = nullptr);

  /// Rows of as many lengths as there are columns, m.
  void setValues(const std::vector<std::vector<double>>& rows);
  void setNotes(const QStringList& notes);
  void setUnits(const Units& units);
  /// m; NaN where a cell holds no number.
  [[nodiscard]] double value(int row, int column) const;
  [[nodiscard]] int lengthColumns() const { return static_cast<int>(columns_.size()); }

  /// Puts rows of cells from the current cell on. What finds no row or column is left out, and said.
  void paste(const QString& text);
  /// first, first + spacing, first + 2 spacing, ... (m) in `count` rows from `fromRow` on, as far as there are rows.
  void fill(int column, int fromRow, int count, double first, double spacing);

 signals:
  void valuesChanged();
  /// A sentence about what was just done.
  void notice(const QString& sentence);

 protected:
  void keyPressEvent(QKeyEvent* event) override;

 private:
  void take(const QTableWidgetItem* item);
  void showCell(int row, int column);
  void copy() const;

  QStringList columns_;
  QString notes_;
  Units units_;
  std::vector<std::vector<double>> values_;
};

}  // namespace strikeplate
