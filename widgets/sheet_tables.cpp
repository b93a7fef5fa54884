#include "widgets/sheet_tables.h"

#include <algorithm>
#include <numeric>

namespace strikeplate {
namespace {

constexpr double kGap = 1.8;        // mm between columns
constexpr double kSymbol = 1.9;     // mm
constexpr double kRowSpace = 0.55;  // mm above and below a row's text

QString words(const std::string& text) {
  return QString::fromStdString(text);
}

struct Columns {
  std::vector<double> left, width;
};

SheetText headerText(const SheetPaper& paper, const SheetTableStyle& style) {
  return {style.points - 0.5, true, paper.look().faint, Qt::AlignLeft, 2};
}

double longestWord(const SheetPaper& paper, const QString& text, const SheetText& style) {
  double most = 0.0;
  for (const QString& word : text.split(QLatin1Char(' '))) {
    most = std::max(most, paper.width(word, style));
  }
  return most;
}

Columns columnsOf(const SheetPaper& paper, double width, const SheetTable& table, const SheetTableStyle& style) {
  std::vector<ColumnNeed> needs;
  const std::size_t shown = std::min(table.rows.size(), static_cast<std::size_t>(style.mostRows));
  for (std::size_t c = 0; c < table.columns.size(); ++c) {
    const double word = longestWord(paper, words(table.columns[c]), headerText(paper, style));
    ColumnNeed need{word, word};
    for (std::size_t r = 0; r < shown; ++r) {
      const QString cell = words(table.rows[r][c]);
      need.wanted = std::max(need.wanted, paper.width(cell, {style.points}));
      need.word = std::max(need.word, longestWord(paper, cell, {style.points}));
    }
    const double around = kGap + (c == 0 && style.layerSymbols ? kSymbol + 1.2 : 0.0);
    needs.push_back({need.wanted + around, need.word + around});
  }
  Columns columns;
  columns.width = columnWidths(needs, width);
  double left = 0.0;
  for (const double w : columns.width) {
    columns.left.push_back(left);
    left += w;
  }
  return columns;
}

double paintRow(SheetPaper& paper, const QPointF& corner, const Columns& columns,
                const std::vector<std::string>& cells, const SheetText& text, double indent) {
  double height = 0.0;
  for (std::size_t c = 0; c < cells.size(); ++c) {
    const double in = c == 0 ? indent : 0.0;
    const QPointF at = corner + QPointF(columns.left[c] + in, kRowSpace);
    height = std::max(height, paper.text(at, columns.width[c] - kGap - in + 0.3, words(cells[c]), text));
  }
  return height + 2.0 * kRowSpace;
}

void paintRowSymbol(SheetPaper& paper, const QPointF& corner, const std::string& layer, double points) {
  if (paper.dry()) {
    return;
  }
  const int number = std::stoi(layer);
  QPainter& painter = paper.painter();
  painter.setPen(QPen(paper.look().ink, 0.2));
  painter.setBrush(paper.layerColour(number));
  paintLayerSymbol(painter, number, corner + QPointF(kSymbol / 2 + 0.2, kRowSpace + points * 0.21), kSymbol);
  painter.setBrush(Qt::NoBrush);
}

double paintRows(SheetPaper& paper, const QPointF& corner, double width, const SheetTable& table,
                 const SheetTableStyle& style) {
  const Look& look = paper.look();
  const Columns columns = columnsOf(paper, width, table, style);
  const double indent = style.layerSymbols ? kSymbol + 1.2 : 0.0;
  double y = paintRow(paper, corner, columns, table.columns, headerText(paper, style), indent);
  paper.line(corner + QPointF(0, y), corner + QPointF(width, y), look.ink, 0.2);
  const SheetText text{style.points, false, look.ink, Qt::AlignLeft, style.mostLines};
  const std::size_t shown = std::min(table.rows.size(), static_cast<std::size_t>(style.mostRows));
  for (std::size_t r = 0; r < shown; ++r) {
    if (style.layerSymbols) {
      paintRowSymbol(paper, corner + QPointF(0, y), table.rows[r][0], style.points);
    }
    y += paintRow(paper, corner + QPointF(0, y), columns, table.rows[r], text, indent);
    paper.line(corner + QPointF(0, y), corner + QPointF(width, y), look.grid, 0.12);
  }
  if (shown < table.rows.size()) {
    const QString where =
        style.restFollows ? QStringLiteral("in the tables behind") : QStringLiteral("in the program");
    paper.leaveOut(QStringLiteral("%1 of %2").arg(table.rows.size() - shown).arg(words(table.title).toLower()));
    const QString more = QStringLiteral("%1 more %2").arg(table.rows.size() - shown).arg(where);
    y += kRowSpace + paper.text(corner + QPointF(0, y + kRowSpace), width, more, {style.points, false, look.faint});
  }
  return y;
}

}  // namespace

std::vector<double> columnWidths(const std::vector<ColumnNeed>& needs, double width) {
  const auto sumOf = [&needs](const auto& widthOf) {
    return std::accumulate(needs.begin(), needs.end(), 0.0,
                           [&](double total, const ColumnNeed& need) { return total + widthOf(need); });
  };
  const double all = sumOf([](const ColumnNeed& need) { return need.wanted; });
  const bool wordsFit = sumOf([](const ColumnNeed& need) { return need.word; }) <= width;
  const auto capped = [wordsFit](const ColumnNeed& need, double cap) {
    return std::max(std::min(need.wanted, cap), wordsFit ? need.word : 0.0);
  };
  // The cap at which the columns just fill the width, by halving.
  double low = 0.0;
  double high = width;
  for (int i = 0; i < 60; ++i) {
    const double cap = (low + high) / 2.0;
    (sumOf([&](const ColumnNeed& need) { return capped(need, cap); }) > width ? high : low) = cap;
  }
  const double spare = std::max(0.0, width - all) / static_cast<double>(std::max<std::size_t>(1, needs.size()));
  std::vector<double> widths;
  for (const ColumnNeed& need : needs) {
    widths.push_back(capped(need, low) + spare);
  }
  return widths;
}

double paintTable(SheetPaper& paper, const QPointF& corner, double width, const SheetTable& table,
                  const SheetTableStyle& style) {
  const Look& look = paper.look();
  double y = paper.text(corner, width, words(table.title), {style.points + 1.0, true, look.ink}) + 0.3;
  if (!table.rows.empty() && style.mostRows > 0) {
    y += paintRows(paper, corner + QPointF(0, y), width, table, style);
  }
  if (!table.summary.empty()) {
    y += 0.5 + paper.text(corner + QPointF(0, y + 0.5), width, words(table.summary), {style.points, false, look.ink});
  }
  if (style.note && !table.note.empty() && !table.rows.empty()) {
    y += 0.5 +
         paper.text(corner + QPointF(0, y + 0.5), width, words(table.note), {style.points - 0.8, false, look.faint});
  }
  return y;
}

double paintList(SheetPaper& paper, const QPointF& corner, double width, const QString& title,
                 const std::vector<std::string>& lines, double points) {
  const Look& look = paper.look();
  double y = paper.text(corner, width, title, {points + 1.0, true, look.ink}) + 0.3;
  constexpr double kIndent = 2.2;
  for (const std::string& line : lines) {
    paper.text(corner + QPointF(0, y), kIndent, QStringLiteral("–"), {points, false, look.faint});
    y += paper.text(corner + QPointF(kIndent, y), width - kIndent, words(line), {points, false, look.ink}) + 0.35;
  }
  return y;
}

}  // namespace strikeplate
