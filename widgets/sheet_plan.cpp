#include "widgets/sheet_plan.h"

#include <algorithm>
#include <cmath>

#include "widgets/sheet_page_parts.h"
#include "widgets/sheet_tables.h"

namespace strikeplate {
namespace {

constexpr int kRecordsOnAPage = 2;
constexpr double kBetweenColumns = 8.0;  // mm
constexpr double kLeastTable = 30.0;     // mm; in less room than that a table is not begun

SheetTableStyle fullStyle() {
  SheetTableStyle style;
  style.mostLines = 1000;
  return style;
}

SheetTable rowsOf(const SheetTable& table, int first, int count) {
  SheetTable part = table;
  part.rows.assign(table.rows.begin() + first, table.rows.begin() + first + count);
  return part;
}

double columnWidth(double width, int columns) {
  return (width - (columns - 1) * kBetweenColumns) / columns;
}

double heightOf(SheetPaper& paper, double width, const SheetTable& table) {
  return measured(paper, [&] { return paintTable(paper, {}, width, table, fullStyle()); });
}

// As many rows from `first` on as fit into the height, at least one if there is any, by halving.
int rowsThatFit(SheetPaper& paper, double width, double height, const SheetTable& table, int first) {
  int low = std::min(1, static_cast<int>(table.rows.size()) - first);
  int high = static_cast<int>(table.rows.size()) - first;
  while (low < high) {
    const int middle = (low + high + 1) / 2;
    const bool fits = heightOf(paper, width, rowsOf(table, first, middle)) <= height;
    (fits ? low : high) = fits ? middle : middle - 1;
  }
  return low;
}

// Rows of one of several columns; there a row is one line high.
int rowsOfAColumn(SheetPaper& paper, double width, double height, const SheetTable& table) {
  const double one = heightOf(paper, width, rowsOf(table, 0, 1));
  const double row = table.rows.size() > 1 ? heightOf(paper, width, rowsOf(table, 0, 2)) - one : one;
  return std::max(1, 1 + static_cast<int>(std::floor((height - one) / row)));
}

// Part of a table in this width and height.
SheetPart partThatFits(SheetPaper& paper, double width, double height, const SheetPart& rest) {
  SheetPart part = rest;
  if (rest.columns > 1 && !rest.table->rows.empty()) {
    const double column = columnWidth(width, rest.columns);
    part.count = std::min(rest.count, rest.columns * rowsOfAColumn(paper, column, height, *rest.table));
  } else {
    part.count = rowsThatFit(paper, width, height, *rest.table, rest.first);
  }
  return part;
}

double paintPart(SheetPaper& paper, const QPointF& corner, double width, const SheetPart& part) {
  const double column = columnWidth(width, part.columns);
  const int rows = std::max(1, (part.count + part.columns - 1) / part.columns);
  double height = 0.0;
  for (int c = 0; c == 0 || c * rows < part.count; ++c) {
    const SheetTable table = rowsOf(*part.table, part.first + c * rows, std::min(rows, part.count - c * rows));
    const QPointF at = corner + QPointF(c * (column + kBetweenColumns), 0.0);
    height = std::max(height, paintTable(paper, at, column, table, fullStyle()));
  }
  return height;
}

QString titleOf(SheetPage::Kind kind) {
  return kind == SheetPage::Kind::Places ? QStringLiteral("Geometry") : QStringLiteral("Tables in full");
}

double titleHeight(SheetPaper& paper, const QRectF& room, const SheetContent& sheet, const QString& kind) {
  return measured(paper, [&] { return paintTitle(paper, room, QString::fromStdString(sheet.title), kind); });
}

// One table behind the other, over as many pages as they need.
void addTables(SheetPaper& paper, const QRectF& room, const SheetContent& sheet, SheetPage::Kind kind,
               const std::vector<SheetPart>& tables, std::vector<SheetPage>& pages) {
  const double full = room.height() - titleHeight(paper, room, sheet, titleOf(kind));
  double left = 0.0;
  for (SheetPart rest : tables) {
    rest.count = static_cast<int>(rest.table->rows.size());
    do {
      if (left < kLeastTable) {
        pages.push_back({kind, 0, 0, {}});
        left = full;
      }
      const SheetPart part = partThatFits(paper, room.width(), left, rest);
      pages.back().parts.push_back(part);
      left -= measured(paper, [&] { return paintPart(paper, {}, room.width(), part); }) + kSheetSpace;
      rest.first += part.count;
      rest.count -= part.count;
    } while (rest.count > 0);
  }
}

}  // namespace

std::vector<SheetPage> sheetPages(SheetPaper& paper, const QRectF& room, const SheetFigures& figures) {
  std::vector<SheetPage> pages = {{SheetPage::Kind::Client, 0, 0, {}}, {SheetPage::Kind::Reviewer, 0, 0, {}}};
  const SheetContent& sheet = figures.sheet;
  const int shots = static_cast<int>(figures.survey.shots.size());
  for (int first = 0; sheet.recordPages && first < shots; first += kRecordsOnAPage) {
    pages.push_back({SheetPage::Kind::Records, first, std::min(kRecordsOnAPage, shots - first), {}});
  }
  const auto whole = [](const SheetTable& table, int columns) { return SheetPart{&table, 0, 0, columns}; };
  if (sheet.tablePages) {
    addTables(paper, room, sheet, SheetPage::Kind::Tables,
              {whole(sheet.boreholes, 1), whole(sheet.opinions, 1), whole(sheet.reciprocals, 2),
               whole(sheet.shots, 1), whole(sheet.allDoubts, 1), whole(sheet.allFiles, 1)},
              pages);
  }
  if (sheet.placePages) {
    addTables(paper, room, sheet, SheetPage::Kind::Places,
              {whole(sheet.shotPlaces, 1), whole(sheet.geophonePlaces, 3)}, pages);
  }
  return pages;
}

void paintRecordsPage(SheetPaper& paper, const QRectF& room, const SheetFigures& figures, const SheetPage& page) {
  const QString title = QString::fromStdString(figures.sheet.title);
  const double y = room.top() + paintTitle(paper, room, title, QStringLiteral("Records with picks")) + 1.0;
  const SheetText style{6.5, false, paper.look().faint};
  const QString words = QStringLiteral(
      "Stack of the blows named, each trace to its own largest swing; no filter. Symbols: first breaks by layer, "
      "bars "
      "95 %; star: the shot; dashes: dead trace.");
  const double foot = measured(paper, [&] { return paper.text({}, room.width(), words, style); });
  const double each = (room.bottom() - foot - kSheetSpace - y) / kRecordsOnAPage;
  for (int i = 0; i < page.shots; ++i) {
    paintRecord(paper, {room.left(), y + i * each, room.width(), each - kSheetSpace}, figures, page.firstShot + i);
  }
  paper.text({room.left(), room.bottom() - foot}, room.width(), words, style);
}

void paintTablesPage(SheetPaper& paper, const QRectF& room, const SheetFigures& figures, const SheetPage& page) {
  const QString title = QString::fromStdString(figures.sheet.title);
  double y = room.top() + paintTitle(paper, room, title, titleOf(page.kind));
  for (const SheetPart& part : page.parts) {
    y += paintPart(paper, {room.left(), y}, room.width(), part) + kSheetSpace;
  }
}

}  // namespace strikeplate
