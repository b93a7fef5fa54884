#include "widgets/sheet_page_parts.h"

#include <algorithm>

#include "widgets/sheet_pages.h"

namespace strikeplate {
namespace {

QString words(const std::string& text) {
  return QString::fromStdString(text);
}

}  // namespace

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
                                      {7.5, false, given ? paper.look().ink : paper.look().faint, Qt::AlignLeft, 3}));
    }
    y += height + 0.5;
  }
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
    SheetText style{8.0, false, look.ink};
    while (style.points > style.leastPoints && paper.width(name, style) > each) {
      style.points -= 0.25;
    }
    paper.label(corner + QPointF(x, y - 1.0), name, style);
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
