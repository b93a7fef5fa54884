#include "widgets/place_table.h"

#include <algorithm>
#include <cmath>

#include <QApplication>
#include <QClipboard>
#include <QHeaderView>
#include <QKeyEvent>

#include "core/base/estimate.h"
#include "widgets/typed_numbers.h"

namespace strikeplate {

PlaceTable::PlaceTable(const QStringList& columns, const QString& notes, QWidget* parent)
    : QTableWidget(0, static_cast<int>(columns.size()) + (notes.isEmpty() ? 0 : 1), parent),
      columns_(columns),
      notes_(notes) {
  horizontalHeader()->setSectionResizeMode(QHeaderView::Stretch);
  for (int column = 0; column < lengthColumns() && !notes.isEmpty(); ++column) {
    horizontalHeader()->setSectionResizeMode(column, QHeaderView::ResizeToContents);
  }
  verticalHeader()->setDefaultSectionSize(fontMetrics().height() + 8);
  setUnits(units_);
  connect(this, &QTableWidget::itemChanged, this, &PlaceTable::take);
}

void PlaceTable::setUnits(const Units& units) {
  units_ = units;
  QStringList headers;
  for (const QString& column : columns_) {
    headers << tr("%1 (%2)").arg(column, QString::fromStdString(units.lengthUnit()));
  }
  if (!notes_.isEmpty()) {
    headers << notes_;
  }
  setHorizontalHeaderLabels(headers);
  for (int row = 0; row < rowCount(); ++row) {
    for (int column = 0; column < lengthColumns(); ++column) {
      // A cell that holds no number keeps what was typed.
      if (std::isfinite(value(row, column))) {
        showCell(row, column);
      }
    }
  }
}

void PlaceTable::setValues(const std::vector<std::vector<double>>& rows) {
  values_ = rows;
  setRowCount(static_cast<int>(rows.size()));
  for (int row = 0; row < rowCount(); ++row) {
    for (int column = 0; column < lengthColumns(); ++column) {
      showCell(row, column);
    }
  }
  emit valuesChanged();
}

void PlaceTable::setNotes(const QStringList& notes) {
  const QSignalBlocker quiet(this);
  for (int row = 0; row < rowCount() && row < notes.size(); ++row) {
    auto* cell = new QTableWidgetItem(notes[row]);
    cell->setFlags(Qt::ItemIsEnabled | Qt::ItemIsSelectable);
    cell->setToolTip(notes[row]);
    setItem(row, lengthColumns(), cell);
  }
}

double PlaceTable::value(int row, int column) const {
  return values_[static_cast<std::size_t>(row)][static_cast<std::size_t>(column)];
}

void PlaceTable::showCell(int row, int column) {
  const QSignalBlocker quiet(this);
  QTableWidgetItem* cell = item(row, column);
  if (cell == nullptr) {
    cell = new QTableWidgetItem;
    cell->setTextAlignment(Qt::AlignRight | Qt::AlignVCenter);
    setItem(row, column, cell);
  }
  cell->setText(shortNumber(units_.fromMetres(value(row, column))));
}

void PlaceTable::take(const QTableWidgetItem* item) {
  if (item->column() < lengthColumns()) {
    const std::optional<double> typed = typedNumber(item->text());
    values_[static_cast<std::size_t>(item->row())][static_cast<std::size_t>(item->column())] =
        typed ? units_.toMetres(*typed) : Estimate::kNaN;
    emit valuesChanged();
  }
}

void PlaceTable::paste(const QString& text) {
  const std::vector<QStringList> rows = pastedCells(text);
  const int firstRow = std::max(currentRow(), 0);
  const int firstColumn = std::clamp(currentColumn(), 0, lengthColumns() - 1);
  int tooFar = 0;
  {
    const QSignalBlocker quiet(this);
    for (std::size_t r = 0; r < rows.size(); ++r) {
      const int row = firstRow + static_cast<int>(r);
      if (row >= rowCount()) {
        ++tooFar;
        continue;
      }
      for (int c = 0; c < rows[r].size() && firstColumn + c < lengthColumns(); ++c) {
        const std::optional<double> typed = typedNumber(rows[r][c]);
        values_[static_cast<std::size_t>(row)][static_cast<std::size_t>(firstColumn + c)] =
            typed ? units_.toMetres(*typed) : Estimate::kNaN;
        item(row, firstColumn + c)->setText(rows[r][c]);
      }
    }
  }
  viewport()->update();
  emit notice(rows.empty() ? tr("There are no numbers on the clipboard; copy cells of a spreadsheet first.")
              : tooFar > 0 ? tr("%n pasted row(s) found no place in the table and were left out.", "", tooFar)
                           : tr("%n row(s) pasted.", "", static_cast<int>(rows.size())));
  emit valuesChanged();
}

void PlaceTable::fill(int column, int fromRow, int count, double first, double spacing) {
  for (int n = 0; n < count && fromRow + n < rowCount(); ++n) {
    values_[static_cast<std::size_t>(fromRow + n)][static_cast<std::size_t>(column)] = first + n * spacing;
    showCell(fromRow + n, column);
  }
  viewport()->update();
  emit valuesChanged();
}

void PlaceTable::copy() const {
  const QList<QTableWidgetSelectionRange> ranges = selectedRanges();
  if (ranges.isEmpty()) {
    return;
  }
  const QTableWidgetSelectionRange& range = ranges.front();
  QStringList lines;
  for (int row = range.topRow(); row <= range.bottomRow(); ++row) {
    QStringList cells;
    for (int column = range.leftColumn(); column <= range.rightColumn(); ++column) {
      cells << (item(row, column) != nullptr ? item(row, column)->text() : QString());
    }
    lines << cells.join('\t');
  }
  QApplication::clipboard()->setText(lines.join('\n'));
}

void PlaceTable::keyPressEvent(QKeyEvent* event) {
  if (event->matches(QKeySequence::Paste)) {
    paste(QApplication::clipboard()->text());
  } else if (event->matches(QKeySequence::Copy)) {
    copy();
  } else {
    QTableWidget::keyPressEvent(event);
  }
}

}  // namespace strikeplate
