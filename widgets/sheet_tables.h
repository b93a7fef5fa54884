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
  bool restFollows = false;  ///< what is left out stands in full on a further page
};

/// Title, header, rows, note, summary; returns the height, mm.
double paintTable(SheetPaper& paper, const QPointF& corner, double width, const SheetTable& table,
                  const SheetTableStyle& style);

/// Title and paragraphs, each behind a dash; returns the height, mm.
double paintList(SheetPaper& paper, const QPointF& corner, double width, const QString& title,
                 const std::vector<std::string>& lines, double points);

/// How wide a column wants to be, with every cell on one line, and what its longest word needs, mm.
struct ColumnNeed {
  double wanted = 0.0;
  double word = 0.0;
};

/// Widths of columns that add up to `width`: each as wide as it wants, the widest ones narrowed as far as needed, but
/// as long as there is room for that not below their longest word.
std::vector<double> columnWidths(const std::vector<ColumnNeed>& needs, double width);

}  // namespace strikeplate
