#pragma once

#include "widgets/sheet_plots.h"

namespace strikeplate {

/// The page for the client and the page for the reviewer, painted into `room` (mm, inside the margins).
void paintClientPage(SheetPaper& paper, const QRectF& room, const SheetFigures& figures);
void paintReviewerPage(SheetPaper& paper, const QRectF& room, const SheetFigures& figures);

/// The line at the foot of a page; `page` counts from 1.
void paintFooter(SheetPaper& paper, const QRectF& room, const SheetContent& sheet, int page, int pages);

}  // namespace strikeplate
