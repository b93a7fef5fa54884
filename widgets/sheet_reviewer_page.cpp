#include <algorithm>

#include "widgets/sheet_page_parts.h"
#include "widgets/sheet_pages.h"
#include "widgets/sheet_tables.h"

namespace strikeplate {
namespace {

constexpr double kBetweenColumns = 6.0;  // mm

// How much of the long lists page 2 shows.
struct ReviewerLimits {
  int opinions = 40;
  int reciprocals = 10;
  int shots = 31;
  int doubtsOfAKind = 3;
  double residuals = 26.0;  ///< mm for their plot, 0 for none
  bool doubtReasons = true;
  int files = 64;
  double points = 6.6;
};

// Besides the tables, which note their own rows.
void noteLeftOut(SheetPaper& paper, const SheetContent& sheet, const ReviewerLimits& limits) {
  std::size_t doubts = 0;
  for (const SheetDoubtKind& kind : sheet.doubts) {
    const auto most = static_cast<std::size_t>(limits.doubtsOfAKind);
    doubts += kind.doubts.size() > most ? kind.doubts.size() - most : 0;
  }
  if (doubts > 0) {
    paper.leaveOut(QStringLiteral("%1 of doubts").arg(doubts));
  }
  if (!limits.doubtReasons) {
    paper.leaveOut(QStringLiteral("what the doubts rest on"));
  }
  if (static_cast<std::size_t>(limits.files) < sheet.files.size()) {
    paper.leaveOut(
        QStringLiteral("%1 of input files").arg(sheet.files.size() - static_cast<std::size_t>(limits.files)));
  }
}

double paintReviewerTables(SheetPaper& paper, const QPointF& corner, double width, const SheetFigures& figures,
                           const ReviewerLimits& limits) {
  const SheetContent& sheet = figures.sheet;
  SheetTableStyle style;
  style.points = limits.points;
  style.mostLines = 3;
  style.restFollows = sheet.tablePages;
  style.mostRows = limits.opinions;
  double y = paintTable(paper, corner, width, sheet.opinions, style) + kSheetSpace;
  style.mostRows = limits.reciprocals;
  y += paintTable(paper, corner + QPointF(0, y), width, sheet.reciprocals, style) + kSheetSpace;
  style.mostRows = limits.shots;
  y += paintTable(paper, corner + QPointF(0, y), width, sheet.shots, style) + kSheetSpace;
  if (limits.residuals > 0.0) {
    paintResiduals(paper, {corner.x(), corner.y() + y, width, limits.residuals}, figures);
    y += limits.residuals + kSheetSpace;
  }
  noteLeftOut(paper, sheet, limits);
  return y + paintList(paper, corner + QPointF(0, y), width,
                       QStringLiteral("Doubts, the gravest and strongest first"),
                       doubtLines(sheet, limits.doubtsOfAKind, limits.doubtReasons), limits.points);
}

std::vector<std::string> programAndFiles(const SheetContent& sheet, int most) {
  std::string program = sheet.program;
  for (std::size_t i = 0; i < sheet.builtOn.size(); ++i) {
    program += (i == 0 ? ", built on " : ", ") + sheet.builtOn[i];
  }
  std::vector<std::string> lines = {program + ".", filesLine(sheet.files, most)};
  if (!sheet.files.empty()) {
    lines.emplace_back(
        "Behind a file: the CRC-32 (IEEE 802.3) of its bytes when it was read; none when that is not known.");
  }
  return lines;
}

double paintReviewerWords(SheetPaper& paper, const QPointF& corner, double width, const SheetContent& sheet,
                          const ReviewerLimits& limits) {
  std::vector<std::string> picks = sheet.picks;
  picks.insert(picks.end(), sheet.fit.begin(), sheet.fit.end());
  double y = 0.0;
  const auto list = [&](const char* title, const std::vector<std::string>& lines) {
    y += y > 0.0 ? kSheetSpace : 0.0;
    y += paintList(paper, corner + QPointF(0, y), width, QString::fromUtf8(title), lines, limits.points);
  };
  list("Picks and fit", picks);
  list("Trigger corrections", sheet.triggers);
  list("What the line cannot see", sheet.limitations);
  list("Methods and sources", sheet.methods);
  list("Cautions", sheet.cautions);
  list("Program and input files", programAndFiles(sheet, limits.files));
  return y;
}

double paintReviewerEnd(SheetPaper& paper, const QPointF& corner, double width, const SheetFigures& figures,
                        const ReviewerLimits& limits) {
  const double column = (width - kBetweenColumns) / 2.0;
  const double left = paintReviewerTables(paper, corner, column, figures, limits);
  const double right =
      paintReviewerWords(paper, corner + QPointF(column + kBetweenColumns, 0), column, figures.sheet, limits);
  return std::max(left, right);
}

// The next thing to leave out of the tables or to write smaller; false when there is nothing.
bool shortenTables(ReviewerLimits& limits) {
  constexpr double kSmall = 5.4;
  constexpr double kSmallest = 4.6;
  constexpr double kLeastResiduals = 20.0;
  if (limits.shots > 12) {
    limits.shots = std::max(12, limits.shots - 2);
  } else if (limits.reciprocals > 6) {
    limits.reciprocals -= 2;
  } else if (limits.doubtsOfAKind > 2) {
    --limits.doubtsOfAKind;
  } else if (limits.residuals > kLeastResiduals) {
    limits.residuals -= 3.0;
  } else if (limits.reciprocals > 4) {
    limits.reciprocals -= 2;
  } else if (limits.doubtsOfAKind > 1) {
    --limits.doubtsOfAKind;
  } else if (limits.doubtReasons) {
    limits.doubtReasons = false;
  } else if (limits.points > kSmall) {
    limits.points -= 0.2;
  } else if (limits.shots > 4) {
    limits.shots -= 2;
  } else if (limits.opinions > 8) {
    limits.opinions -= 2;
  } else if (limits.points > kSmallest) {
    limits.points -= 0.2;
  } else {
    return false;
  }
  return true;
}

// Shortens the long lists, then the letters, until both columns fit.
ReviewerLimits limitsFor(SheetPaper& paper, double width, double height, const SheetFigures& figures) {
  const SheetContent& sheet = figures.sheet;
  constexpr double kLeastPoints = 4.6;
  constexpr double kSmall = 5.2;  // in which a list is still read rather than cut
  constexpr int kLeastFiles = 12;
  ReviewerLimits limits;
  limits.residuals = hasResiduals(figures.interpretation) ? limits.residuals : 0.0;
  limits.files = std::min(limits.files, static_cast<int>(sheet.files.size()));
  limits.shots = std::min(limits.shots, static_cast<int>(sheet.shots.rows.size()));
  const double column = (width - kBetweenColumns) / 2.0;
  const auto tables = [&] { return paintReviewerTables(paper, {}, column, figures, limits); };
  const auto lists = [&] { return paintReviewerWords(paper, {}, column, sheet, limits); };
  while (measured(paper, lists) > height && limits.points > kLeastPoints) {
    limits.points > kSmall || limits.files <= kLeastFiles ? limits.points -= 0.2 : limits.files -= 2;
  }
  while (measured(paper, tables) > height && shortenTables(limits)) {
  }
  return limits;
}

}  // namespace

void paintReviewerPage(SheetPaper& paper, const QRectF& room, const SheetFigures& figures) {
  constexpr double kLeastFigure = 62.0;
  constexpr double kMostFigure = 130.0;
  constexpr double kWordsOnly = 6.0;
  const SheetContent& sheet = figures.sheet;
  const double y =
      room.top() + paintTitle(paper, room, QString::fromStdString(sheet.title), QStringLiteral("For the reviewer"));
  const double height = room.bottom() - y - kSheetSpace;
  const ReviewerLimits limits = limitsFor(paper, room.width(), height - kLeastFigure, figures);
  const double end = measured(paper, [&] { return paintReviewerEnd(paper, {}, room.width(), figures, limits); });
  const bool drawn = !figures.interpretation.times.arrivals.empty();
  const double figure = drawn ? std::clamp(height - end, kLeastFigure, kMostFigure) : kWordsOnly;
  paintTravelTimes(paper, {room.left(), y, room.width(), figure}, figures);
  paintReviewerEnd(paper, {room.left(), y + figure + kSheetSpace}, room.width(), figures, limits);
}

}  // namespace strikeplate
