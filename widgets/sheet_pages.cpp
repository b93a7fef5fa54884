#include "widgets/sheet_pages.h"

#include <algorithm>

#include "widgets/sheet_tables.h"

namespace strikeplate {
namespace {

constexpr double kSpace = 2.6;           // mm between parts
constexpr double kBetweenColumns = 6.0;  // mm
constexpr int kDoubtsOnFirstPage = 3;

QString words(const std::string& text) {
  return QString::fromStdString(text);
}

double paintTitle(SheetPaper& paper, const QRectF& room, const QString& title, const QString& kind) {
  const Look& look = paper.look();
  const SheetText small{7.5, false, look.faint, Qt::AlignRight};
  const double kindWidth = paper.width(kind, small) + 2.0;
  const double height =
      paper.text(room.topLeft(), room.width() - kindWidth, title, {14.0, true, look.ink, Qt::AlignLeft, 2});
  paper.text({room.right() - kindWidth, room.top() + 2.0}, kindWidth, kind, small);
  paper.line({room.left(), room.top() + height + 0.8}, {room.right(), room.top() + height + 0.8}, look.ink, 0.5);
  return height + 1.8;
}

// The fields of the head in three columns, read downwards.
double paintHead(SheetPaper& paper, const QPointF& corner, double width, const std::vector<SheetField>& head) {
  constexpr std::size_t kColumns = 3;
  const std::size_t rows = (head.size() + kColumns - 1) / kColumns;
  const double column = width / kColumns;
  constexpr double kLabel = 22.0;
  double y = 0.0;
  for (std::size_t r = 0; r < rows; ++r) {
    double height = 0.0;
    for (std::size_t c = 0; c < kColumns && c * rows + r < head.size(); ++c) {
      const SheetField& field = head[c * rows + r];
      const QPointF at = corner + QPointF(static_cast<double>(c) * column, y);
      const bool given = field.value != kNotGiven;
      paper.text(at, kLabel, words(field.label), {6.5, false, paper.look().faint, Qt::AlignLeft, 1});
      height =
          std::max(height, paper.text(at + QPointF(kLabel, -0.2), column - kLabel - 2.5, words(field.value),
                                      {7.5, false, given ? paper.look().ink : paper.look().faint, Qt::AlignLeft, 2}));
    }
    y += height + 0.5;
  }
  return y;
}

double paintAnswer(SheetPaper& paper, const QPointF& corner, double width, const SheetContent& sheet, double points) {
  const Look& look = paper.look();
  constexpr double kIndent = 3.0;
  double y = paper.text(corner + QPointF(kIndent, 0), width - kIndent, words(sheet.answer),
                        {points, false, look.ink, Qt::AlignLeft, 12});
  if (!sheet.strongestDoubt.empty()) {
    y += 0.8;
    y += paper.text(corner + QPointF(kIndent, y), width - kIndent,
                    QStringLiteral("Strongest reason for doubt: ") + words(sheet.strongestDoubt),
                    {points - 1.0, true, look.ink, Qt::AlignLeft, 4});
  }
  paper.fill({corner.x(), corner.y() + 0.3, 0.9, y - 0.3}, look.accent);
  return y;
}

double paintSignature(SheetPaper& paper, const QPointF& corner, double width, const SheetContent& sheet) {
  constexpr double kHeight = 23.0;
  constexpr double kSeal = 34.0;
  const Look& look = paper.look();
  const SheetText small{6.5, false, look.faint};
  const double each = (width - kSeal - 12.0) / 2.0;
  const auto signLine = [&](double x, double y, const QString& caption, const QString& name) {
    paper.line(corner + QPointF(x, y), corner + QPointF(x + each, y), look.ink, 0.2);
    paper.label(corner + QPointF(x, y - 1.0), name, {8.0, false, look.ink});
    paper.label(corner + QPointF(x, y + 2.8), caption, small);
  };
  signLine(0.0, 8.5, QStringLiteral("Licensed professional, name"), words(sheet.signatory));
  signLine(each + 6.0, 8.5, QStringLiteral("Licence number"), {});
  signLine(0.0, 19.0, QStringLiteral("Signature"), {});
  signLine(each + 6.0, 19.0, QStringLiteral("Date"), {});
  if (!paper.dry()) {
    const QRectF seal(corner.x() + width - kSeal, corner.y() + 0.5, kSeal, kHeight - 1.0);
    paper.painter().setPen(QPen(look.faint, 0.2, Qt::DashLine));
    paper.painter().drawRect(seal);
    paper.label(seal.center(), QStringLiteral("Seal"), {6.5, false, look.faint, Qt::AlignHCenter});
  }
  return kHeight;
}

// How much page 1 shows around its figure, and how large.
struct ClientLimits {
  double answerPoints = 10.0;
  double points = 7.0;
  int boreholes = 10;
  int doubts = kDoubtsOnFirstPage;
};

// Everything of page 1 below the figure.
double paintClientEnd(SheetPaper& paper, const QPointF& corner, double width, const SheetContent& sheet,
                      const ClientLimits& limits) {
  SheetTableStyle style;
  style.points = limits.points;
  style.layerSymbols = true;
  double y = paintTable(paper, corner, width, sheet.layers, style) + kSpace;
  style.layerSymbols = false;
  style.mostRows = limits.boreholes;
  if (!sheet.boreholes.rows.empty()) {
    y += paintTable(paper, corner + QPointF(0, y), width, sheet.boreholes, style) + kSpace;
  }
  style.mostRows = limits.doubts;
  style.mostLines = 3;
  y += paintTable(paper, corner + QPointF(0, y), width, sheet.doubts, style) + kSpace;
  y += paper.text(corner + QPointF(0, y), width, words(sheet.cautionShort), {7.5, true, paper.look().ink}) + kSpace;
  return y + paintSignature(paper, corner + QPointF(0, y), width, sheet);
}

template <class Paint>
double measured(SheetPaper& paper, const Paint& paint) {
  const bool before = paper.dry();
  paper.setDry(true);
  const double height = paint();
  paper.setDry(before);
  return height;
}

// How much of the long lists page 2 shows.
struct ReviewerLimits {
  int opinions = 16;
  int reciprocals = 10;
  int shots = 31;
  int doubts = 10;
  int files = 24;
  double points = 6.6;
};

double paintReviewerTables(SheetPaper& paper, const QPointF& corner, double width, const SheetContent& sheet,
                           const ReviewerLimits& limits) {
  SheetTableStyle style;
  style.points = limits.points;
  style.mostLines = 3;
  style.mostRows = limits.opinions;
  double y = paintTable(paper, corner, width, sheet.opinions, style) + kSpace;
  style.mostRows = limits.reciprocals;
  y += paintTable(paper, corner + QPointF(0, y), width, sheet.reciprocals, style) + kSpace;
  style.mostRows = limits.shots;
  y += paintTable(paper, corner + QPointF(0, y), width, sheet.shots, style);
  if (static_cast<int>(sheet.doubts.rows.size()) > kDoubtsOnFirstPage) {
    style.mostRows = limits.doubts;
    y += kSpace + paintTable(paper, corner + QPointF(0, y + kSpace), width, sheet.doubts, style);
  }
  return y;
}

std::vector<std::string> filesShown(const SheetContent& sheet, int most) {
  std::string line;
  const int count = static_cast<int>(sheet.files.size());
  for (int i = 0; i < std::min(count, most); ++i) {
    line += (i > 0 ? ", " : "") + sheet.files[static_cast<std::size_t>(i)];
  }
  if (count > most) {
    line += " and " + std::to_string(count - most) + " more";
  }
  return {sheet.program, line.empty() ? "no record file" : line};
}

double paintReviewerWords(SheetPaper& paper, const QPointF& corner, double width, const SheetContent& sheet,
                          const ReviewerLimits& limits) {
  std::vector<std::string> picks = sheet.picks;
  picks.insert(picks.end(), sheet.fit.begin(), sheet.fit.end());
  double y = 0.0;
  const auto list = [&](const char* title, const std::vector<std::string>& lines) {
    y += (y > 0.0 ? kSpace : 0.0) + paintList(paper, corner + QPointF(0, y + (y > 0.0 ? kSpace : 0.0)), width,
                                              QString::fromUtf8(title), lines, limits.points);
  };
  list("Picks and fit", picks);
  list("What the line cannot see", sheet.limitations);
  list("Methods and sources", sheet.methods);
  list("Cautions", sheet.cautions);
  list("Program and input files", filesShown(sheet, limits.files));
  return y;
}

double paintReviewerEnd(SheetPaper& paper, const QPointF& corner, double width, const SheetContent& sheet,
                        const ReviewerLimits& limits) {
  const double column = (width - kBetweenColumns) / 2.0;
  const double left = paintReviewerTables(paper, corner, column, sheet, limits);
  const double right =
      paintReviewerWords(paper, corner + QPointF(column + kBetweenColumns, 0), column, sheet, limits);
  return std::max(left, right);
}

// Shortens the long lists, then the letters, until both columns fit.
ReviewerLimits limitsFor(SheetPaper& paper, double width, double height, const SheetContent& sheet) {
  constexpr double kLeastPoints = 4.6;
  ReviewerLimits limits;
  const double column = (width - kBetweenColumns) / 2.0;
  const auto tables = [&] { return paintReviewerTables(paper, {}, column, sheet, limits); };
  const auto lists = [&] { return paintReviewerWords(paper, {}, column, sheet, limits); };
  while (measured(paper, lists) > height && limits.points > kLeastPoints) {
    limits.files > 4 ? limits.files -= 4 : limits.points -= 0.2;
  }
  while (measured(paper, tables) > height && limits.points > kLeastPoints) {
    if (limits.shots > 8 && limits.shots >= limits.reciprocals) {
      limits.shots -= 2;
    } else if (limits.reciprocals > 4) {
      limits.reciprocals -= 2;
    } else if (limits.doubts > 4) {
      --limits.doubts;
    } else if (limits.opinions > 8) {
      limits.opinions -= 2;
    } else {
      limits.points -= 0.2;
    }
  }
  return limits;
}

// Shortens the tables of page 1, then the letters, until the figure has its room.
ClientLimits clientLimitsFor(SheetPaper& paper, double width, double height, const SheetContent& sheet) {
  ClientLimits limits;
  const auto all = [&] {
    return paintAnswer(paper, {}, width, sheet, limits.answerPoints) + kSpace +
           paintClientEnd(paper, {}, width, sheet, limits);
  };
  while (measured(paper, all) > height && limits.points > 5.0) {
    if (limits.boreholes > 4) {
      --limits.boreholes;
    } else if (limits.doubts > 1) {
      --limits.doubts;
    } else {
      limits.points -= 0.2;
      limits.answerPoints -= 0.4;
    }
  }
  return limits;
}

}  // namespace

void paintClientPage(SheetPaper& paper, const QRectF& room, const SheetFigures& figures) {
  const SheetContent& sheet = figures.sheet;
  const double width = room.width();
  double y = room.top() + paintTitle(paper, room, words(sheet.title), QStringLiteral("Field interpretation sheet"));
  y += paintHead(paper, {room.left(), y}, width, sheet.head) + kSpace;
  constexpr double kLeastFigure = 72.0;
  constexpr double kMostFigure = 125.0;
  const ClientLimits limits = clientLimitsFor(paper, width, room.bottom() - y - kSpace - kLeastFigure, sheet);
  y += paintAnswer(paper, {room.left(), y}, width, sheet, limits.answerPoints) + kSpace;
  const double end = measured(paper, [&] { return paintClientEnd(paper, {}, width, sheet, limits); });
  const double figure = std::min(room.bottom() - y - end - kSpace, kMostFigure);
  paintSection(paper, {room.left(), y, width, figure}, figures);
  paintClientEnd(paper, {room.left(), room.bottom() - end}, width, sheet, limits);
}

void paintReviewerPage(SheetPaper& paper, const QRectF& room, const SheetFigures& figures) {
  constexpr double kLeastFigure = 68.0;
  constexpr double kMostFigure = 110.0;
  const SheetContent& sheet = figures.sheet;
  const double y = room.top() + paintTitle(paper, room, words(sheet.title), QStringLiteral("For the reviewer"));
  const double height = room.bottom() - y - kSpace;
  const ReviewerLimits limits = limitsFor(paper, room.width(), height - kLeastFigure, sheet);
  const double end = measured(paper, [&] { return paintReviewerEnd(paper, {}, room.width(), sheet, limits); });
  const double figure = std::clamp(height - end, kLeastFigure, kMostFigure);
  paintTravelTimes(paper, {room.left(), y, room.width(), figure}, figures);
  paintReviewerEnd(paper, {room.left(), y + figure + kSpace}, room.width(), sheet, limits);
}

void paintFooter(SheetPaper& paper, const QRectF& room, const SheetContent& sheet, int page, int pages) {
  const Look& look = paper.look();
  const SheetText style{6.5, false, look.faint};
  const double y = room.bottom() + 4.5;
  paper.line({room.left(), room.bottom() + 1.5}, {room.right(), room.bottom() + 1.5}, look.grid, 0.2);
  paper.label({room.left(), y}, words(sheet.program), style);
  SheetText right = style;
  right.align = Qt::AlignRight;
  paper.label({room.right(), y}, QStringLiteral("page %1 of %2").arg(page).arg(pages), right);
}

}  // namespace strikeplate
