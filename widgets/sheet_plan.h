#pragma once

#include <vector>

#include "widgets/sheet_plots.h"

namespace strikeplate {

/// One page of the sheet: what it is for, and which shots and geophones it shows (indices into the survey).
struct SheetPage {
  enum class Kind { Client, Reviewer, Records, Places };
  Kind kind = Kind::Client;
  int firstShot = 0;
  int shots = 0;
  int firstGeophone = 0;
  int geophones = 0;
};

/// The pages of a sheet in `room` (mm, inside the margins): one for the client, one for the reviewer, and as many of
/// those that were asked for as they need.
std::vector<SheetPage> sheetPages(SheetPaper& paper, const QRectF& room, const SheetFigures& figures);

/// The optional pages.
void paintRecordsPage(SheetPaper& paper, const QRectF& room, const SheetFigures& figures, const SheetPage& page);
void paintPlacesPage(SheetPaper& paper, const QRectF& room, const SheetFigures& figures, const SheetPage& page);

}  // namespace strikeplate
