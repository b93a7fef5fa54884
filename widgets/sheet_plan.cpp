#include "widgets/sheet_plan.h"

#include <algorithm>
#include <cmath>

#include "widgets/sheet_page_parts.h"
#include "widgets/sheet_tables.h"

namespace strikeplate {
namespace {

constexpr int kRecordsOnAPage = 2;
constexpr int kColumns = 3;              // of geophones
constexpr double kBetweenColumns = 8.0;  // mm
constexpr double kLeastTable = 30.0;     // mm; less room than that is not begun on

SheetTableStyle placesStyle() {
  SheetTableStyle style;
  style.mostLines = 1000;
  return style;
}

SheetTable partOf(const SheetTable& table, int first, int count) {
  SheetTable part = table;
  part.rows.assign(table.rows.begin() + first, table.rows.begin() + first + count);
  return part;
}

double heightOf(SheetPaper& paper, double width, const SheetTable& table) {
  return measured(paper, [&] { return paintTable(paper, {}, width, table, placesStyle()); });
}

// As many rows from `first` on as fit into the height, at least one.
int rowsThatFit(SheetPaper& paper, double width, double height, const SheetTable& table, int first) {
  const int all = static_cast<int>(table.rows.size()) - first;
  int count = std::min(1, all);
  while (count < all && heightOf(paper, width, partOf(table, first, count + 1)) <= height) {
    ++count;
  }
  return count;
}

double columnWidth(const QRectF& room) {
  return (room.width() - (kColumns - 1) * kBetweenColumns) / kColumns;
}

// Rows of one column of geophones in this height; all rows are one line high.
int geophoneRows(SheetPaper& paper, const QRectF& room, double height, const SheetTable& table) {
  const double one = heightOf(paper, columnWidth(room), partOf(table, 0, 1));
  const double row = table.rows.size() > 1 ? heightOf(paper, columnWidth(room), partOf(table, 0, 2)) - one : one;
  return std::max(1, 1 + static_cast<int>(std::floor((height - one) / row)));
}

double titleHeight(SheetPaper& paper, const QRectF& room, const SheetContent& sheet, const QString& kind) {
  return measured(paper, [&] { return paintTitle(paper, room, QString::fromStdString(sheet.title), kind); });
}

QString placesKind() {
  return QStringLiteral("Geometry");
}

void addPlaces(SheetPaper& paper, const QRectF& room, const SheetContent& sheet, std::vector<SheetPage>& pages) {
  const double full = room.height() - titleHeight(paper, room, sheet, placesKind());
  const int shots = static_cast<int>(sheet.shotPlaces.rows.size());
  const int geophones = static_cast<int>(sheet.geophonePlaces.rows.size());
  int shot = 0, geophone = 0;
  do {
    SheetPage page{SheetPage::Kind::Places, shot, 0, geophone, 0};
    double left = full;
    if (shot < shots) {
      page.shots = rowsThatFit(paper, room.width(), full, sheet.shotPlaces, shot);
      left -= heightOf(paper, room.width(), partOf(sheet.shotPlaces, shot, page.shots)) + kSheetSpace;
      shot += page.shots;
    }
    if (shot == shots && geophone < geophones && left >= kLeastTable) {
      page.geophones =
          std::min(geophones - geophone, kColumns * geophoneRows(paper, room, left, sheet.geophonePlaces));
      geophone += page.geophones;
    }
    pages.push_back(page);
  } while (shot < shots || geophone < geophones);
}

}  // namespace

std::vector<SheetPage> sheetPages(SheetPaper& paper, const QRectF& room, const SheetFigures& figures) {
  std::vector<SheetPage> pages = {{SheetPage::Kind::Client, 0, 0, 0, 0}, {SheetPage::Kind::Reviewer, 0, 0, 0, 0}};
  const int shots = static_cast<int>(figures.survey.shots.size());
  for (int first = 0; figures.sheet.recordPages && first < shots; first += kRecordsOnAPage) {
    pages.push_back({SheetPage::Kind::Records, first, std::min(kRecordsOnAPage, shots - first), 0, 0});
  }
  if (figures.sheet.placePages) {
    addPlaces(paper, room, figures.sheet, pages);
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

void paintPlacesPage(SheetPaper& paper, const QRectF& room, const SheetFigures& figures, const SheetPage& page) {
  const SheetContent& sheet = figures.sheet;
  double y = room.top() + paintTitle(paper, room, QString::fromStdString(sheet.title), placesKind());
  if (page.shots > 0) {
    const SheetTable shots = partOf(sheet.shotPlaces, page.firstShot, page.shots);
    y += paintTable(paper, {room.left(), y}, room.width(), shots, placesStyle()) + kSheetSpace;
  }
  if (page.geophones == 0) {
    return;
  }
  const int rows = std::min(geophoneRows(paper, room, room.bottom() - y, sheet.geophonePlaces),
                            (page.geophones + kColumns - 1) / kColumns);
  for (int c = 0; c * rows < page.geophones; ++c) {
    const SheetTable part =
        partOf(sheet.geophonePlaces, page.firstGeophone + c * rows, std::min(rows, page.geophones - c * rows));
    paintTable(paper, {room.left() + c * (columnWidth(room) + kBetweenColumns), y}, columnWidth(room), part,
               placesStyle());
  }
}

}  // namespace strikeplate
