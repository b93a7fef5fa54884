#pragma once

#include <vector>

#include "core/report/sheet.h"
#include "widgets/sheet_paper.h"

namespace strikeplate {

struct SheetTableStyle {
  double points = 7.0;
  int mostRows = 1000;        ///< further rows are counted in one line
  int mostLines = 2;          ///< in one cell
  bool layerSymbols = false;  ///< the first column is a layer's number and gets its symbol
  bool note = true;
};

/// Title, header, rows, note, summary; returns the height, mm.
double paintTable(SheetPaper& paper, const QPointF& corner, double width, const SheetTable& table,
                  const SheetTableStyle& style);

/// Title and paragraphs, each behind a dash; returns the height, mm.
double paintList(SheetPaper& paper, const QPointF& corner, double width, const QString& title,
                 const std::vector<std::string>& lines, double points);

/// Widths of columns that add up to `width`: each as wide as it wants, the widest ones narrowed as far as needed.
std::vector<double> columnWidths(const std::vector<double>& wanted, double width);

}  // namespace strikeplate
