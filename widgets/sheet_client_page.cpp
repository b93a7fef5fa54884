#include <algorithm>

#include "core/report/sheet.h"
#include "widgets/sheet_page_parts.h"
#include "widgets/sheet_pages.h"
#include "widgets/sheet_tables.h"

namespace strikeplate {
namespace {

QString words(const std::string& text) {
  return QString::fromStdString(text);
}

// How much page 1 shows around its figure, and how large.
struct ClientLimits {
  double answerPoints = 10.0;
  double points = 7.0;
  int boreholes = 10;
};

// What must not be missed, in a frame.
double paintWarnings(SheetPaper& paper, const QPointF& corner, double width, const SheetContent& sheet,
                     double points) {
  if (sheet.warnings.empty()) {
    return 0.0;
  }
  constexpr double kPad = 1.4;
  const Look& look = paper.look();
  double y = kPad;
  for (const std::string& warning : sheet.warnings) {
    y += paper.text(corner + QPointF(kPad + 1.0, y), width - 2.0 * kPad - 1.0, words(warning),
                    {points, true, look.ink});
  }
  y += kPad;
  if (!paper.dry()) {
    paper.painter().setPen(QPen(look.warning, 0.5));
    paper.painter().drawRect(QRectF(corner, QSizeF(width, y)));
  }
  return y + 1.5;
}

double paintAnswer(SheetPaper& paper, const QPointF& corner, double width, const SheetContent& sheet, double points) {
  const Look& look = paper.look();
  constexpr double kIndent = 3.0;
  const double top = paintWarnings(paper, corner, width, sheet, points - 1.5);
  double y = top;
  const auto paragraph = [&](const QString& text, const SheetText& style) {
    y += paper.text(corner + QPointF(kIndent, y), width - kIndent, text, style) + 0.8;
  };
  paragraph(words(sheet.question), {points - 1.5, false, look.faint});
  paragraph(words(sheet.answer), {points, false, look.ink, Qt::AlignLeft, 14, 6.5});
  if (!sheet.strongestDoubt.empty()) {
    paragraph(QStringLiteral("Strongest reason for doubt: ") + words(sheet.strongestDoubt),
              {points - 1.0, true, look.ink});
    paragraph(words(sheet.strongestDoubtMore), {points - 2.0, false, look.ink});
  }
  paper.fill({corner.x(), corner.y() + top + 0.3, 0.9, y - top - 1.1}, look.accent);
  return y - 0.8;
}

// Everything of page 1 below the figure.
double paintClientEnd(SheetPaper& paper, const QPointF& corner, double width, const SheetContent& sheet,
                      const ClientLimits& limits) {
  SheetTableStyle style;
  style.points = limits.points;
  style.layerSymbols = true;
  style.restFollows = sheet.tablePages;
  double y = paintTable(paper, corner, width, sheet.layers, style) + kSheetSpace;
  if (!sheet.materials.empty()) {
    y += paper.text(corner + QPointF(0, y), width, words(sheet.materials),
                    {limits.points - 0.4, false, paper.look().ink}) +
         kSheetSpace;
  }
  style.layerSymbols = false;
  style.mostRows = limits.boreholes;
  if (!sheet.boreholes.rows.empty()) {
    y += paintTable(paper, corner + QPointF(0, y), width, sheet.boreholes, style) + kSheetSpace;
  }
  y += paper.text(corner + QPointF(0, y), width, words(sheet.cautionShort), {7.5, true, paper.look().ink}) +
       kSheetSpace;
  return y + paintSignature(paper, corner + QPointF(0, y), width, sheet);
}

// Shortens the tables of page 1, then the letters, until the figure has its room.
ClientLimits clientLimitsFor(SheetPaper& paper, double width, double height, const SheetContent& sheet) {
  ClientLimits limits;
  const auto all = [&] {
    return paintAnswer(paper, {}, width, sheet, limits.answerPoints) + kSheetSpace +
           paintClientEnd(paper, {}, width, sheet, limits);
  };
  while (measured(paper, all) > height && limits.points > 5.0) {
    if (limits.answerPoints > 7.6) {
      limits.answerPoints -= 0.4;
    } else if (limits.points > 6.0) {
      limits.points -= 0.2;
    } else if (limits.boreholes > 4) {
      --limits.boreholes;
    } else {
      limits.points -= 0.2;
    }
  }
  return limits;
}

}  // namespace

void paintClientPage(SheetPaper& paper, const QRectF& room, const SheetFigures& figures) {
  const SheetContent& sheet = figures.sheet;
  const double width = room.width();
  double y = room.top() + paintTitle(paper, room, words(sheet.title), QStringLiteral("Field interpretation sheet"));
  y += paintHead(paper, {room.left(), y}, width, sheet.head) + kSheetSpace;
  constexpr double kLeastFigure = 64.0;
  constexpr double kMostFigure = 135.0;
  const ClientLimits limits = clientLimitsFor(paper, width, room.bottom() - y - kSheetSpace - kLeastFigure, sheet);
  y += paintAnswer(paper, {room.left(), y}, width, sheet, limits.answerPoints) + kSheetSpace;
  const double end = measured(paper, [&] { return paintClientEnd(paper, {}, width, sheet, limits); });
  const double figure = std::min(room.bottom() - y - end - kSheetSpace, kMostFigure);
  paintSection(paper, {room.left(), y, width, figure}, figures);
  paintClientEnd(paper, {room.left(), room.bottom() - end}, width, sheet, limits);
}

}  // namespace strikeplate
