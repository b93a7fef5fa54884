#pragma once

#include <vector>

#include "widgets/sheet_plots.h"

namespace strikeplate {

/// Some rows of one table, side by side in columns when there are several.
struct SheetPart {
  const SheetTable* table = nullptr;  ///< of the content that the plan was made from
  int first = 0;
  int count = 0;
  int columns = 1;
};

/// One page of the sheet: what it is for, and what stands on it.
struct SheetPage {
  enum class Kind { Client, Reviewer, Records, Places, Tables };
  Kind kind = Kind::Client;
  int firstShot = 0;  ///< of a page of records
  int shots = 0;
  std::vector<SheetPart> parts;  ///< of a page of places or tables
};

/// The pages of a sheet in `room` (mm, inside the margins): one for the client, one for the reviewer, and as many of
/// those that were asked for as they need. The plan points into figures.sheet.
std::vector<SheetPage> sheetPages(SheetPaper& paper, const QRectF& room, const SheetFigures& figures);

/// The optional pages.
void paintRecordsPage(SheetPaper& paper, const QRectF& room, const SheetFigures& figures, const SheetPage& page);
void paintTablesPage(SheetPaper& paper, const QRectF& room, const SheetFigures& figures, const SheetPage& page);

}  // namespace strikeplate
