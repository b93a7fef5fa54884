#pragma once

#include <QPagedPaintDevice>
#include <QString>

#include "core/base/result.h"
#include "core/report/sheet.h"
#include "widgets/sheet_paper.h"

namespace strikeplate {

/// Pages of the sheet on this paper: one for the client, one for the reviewer, and those that were asked for.
int sheetPageCount(QPainter& painter, double perMillimetre, const QSizeF& paper, const Survey& survey,
                   const Interpretation& interpretation, const SheetContent& sheet);

/// Paints one page (from 1, at most sheetPageCount()) of the sheet; the painter's origin is the paper's corner,
/// `perMillimetre` its units, and `paper` the paper's size in mm. Where the texts came to stand is added to `marks`
/// when there is one.
void paintSheetPage(QPainter& painter, double perMillimetre, const QSizeF& paper, int page, const Survey& survey,
                    const Interpretation& interpretation, const SheetContent& sheet,
                    std::vector<SheetMark>* marks = nullptr);

/// What the first two pages have no room for on a paper of this size (mm), such as "6 of boreholes"; the further
/// pages with the tables hold it. Empty when everything is there.
QStringList sheetLeftOut(const QSizeF& paper, const Survey& survey, const Interpretation& interpretation,
                         const SheetContent& sheet);

/// Paints every page on a printer, a preview's device or a PDF writer; the paper's size and margins are the device's
/// own. Fails when the device cannot be painted on.
Outcome paintSheet(QPagedPaintDevice& device, const Survey& survey, const Interpretation& interpretation,
                   const SheetOptions& options);

/// Writes the sheet as a vector PDF with embedded fonts, in one step: a file of that name is replaced when the new
/// one is complete. `size` is QPageSize::A4 or QPageSize::Letter. Needs a QGuiApplication. Fails with one sentence.
Outcome writeSheetPdf(const QString& path, const Survey& survey, const Interpretation& interpretation,
                      const SheetOptions& options, QPageSize::PageSizeId size = QPageSize::A4);

}  // namespace strikeplate
