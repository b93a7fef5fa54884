#pragma once

#include "core/report/sheet.h"
#include "widgets/sheet_paper.h"

namespace strikeplate {

inline constexpr double kSheetSpace = 2.6;  ///< mm between the parts of a page

/// Height that `paint` takes, mm, without painting.
template <class Paint>
double measured(SheetPaper& paper, const Paint& paint) {
  const bool before = paper.dry();
  paper.setDry(true);
  const double height = paint();
  paper.setDry(before);
  return height;
}

/// The page's title with its kind at the right and the rule below; returns the height, mm.
double paintTitle(SheetPaper& paper, const QRectF& room, const QString& title, const QString& kind);

/// The fields of the head in three columns, read downwards; returns the height, mm.
double paintHead(SheetPaper& paper, const QPointF& corner, double width, const std::vector<SheetField>& head);

/// Room for a licensed professional's name, number, signature, date and seal; returns the height, mm.
double paintSignature(SheetPaper& paper, const QPointF& corner, double width, const SheetContent& sheet);

}  // namespace strikeplate
