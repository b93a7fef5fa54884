#include "widgets/sheet_painter.h"

#include <QBuffer>
#include <QImage>
#include <QMarginsF>
#include <QPainter>
#include <QPdfWriter>

#include "widgets/sheet_files.h"
#include "widgets/sheet_pages.h"
#include "widgets/sheet_plan.h"

namespace strikeplate {
namespace {

constexpr double kMargin = 13.0;     // mm
constexpr double kFooterRoom = 5.0;  // mm
constexpr double kInch = 25.4;       // mm
constexpr int kResolution = 1200;    // dots per inch of the PDF's own units

QRectF roomOf(const QSizeF& size) {
  return {kMargin, kMargin - 2.0, size.width() - 2.0 * kMargin, size.height() - 2.0 * kMargin - kFooterRoom + 4.0};
}

void paintPlanned(SheetPaper& paper, const QRectF& room, const SheetFigures& figures,
                  const std::vector<SheetPage>& pages, int page) {
  const SheetPage& shown = pages[static_cast<std::size_t>(page) - 1];
  switch (shown.kind) {
    case SheetPage::Kind::Client:
      paintClientPage(paper, room, figures);
      break;
    case SheetPage::Kind::Reviewer:
      paintReviewerPage(paper, room, figures);
      break;
    case SheetPage::Kind::Records:
      paintRecordsPage(paper, room, figures, shown);
      break;
    case SheetPage::Kind::Places:
    case SheetPage::Kind::Tables:
      paintTablesPage(paper, room, figures, shown);
      break;
  }
  paintFooter(paper, room, figures.sheet, page, static_cast<int>(pages.size()));
}

Outcome paintContent(QPagedPaintDevice& device, const Survey& survey, const Interpretation& interpretation,
                     const SheetContent& sheet) {
  QPainter painter;
  if (!painter.begin(&device)) {
    return Failure{"The printer cannot be painted on; choose another one."};
  }
  const QPageLayout layout = device.pageLayout();
  const double perMillimetre = device.logicalDpiX() / kInch;
  if (layout.mode() == QPageLayout::StandardMode) {
    painter.translate(-layout.paintRect(QPageLayout::Millimeter).topLeft() * perMillimetre);
  }
  const QSizeF size = layout.fullRect(QPageLayout::Millimeter).size();
  const SheetFigures figures{survey, interpretation, sheet};
  {
    SheetPaper paper(painter, perMillimetre);
    if (sheet.blackAndWhite) {
      paper.setBlackAndWhite();
    }
    const std::vector<SheetPage> pages = sheetPages(paper, roomOf(size), figures);
    for (int page = 1; page <= static_cast<int>(pages.size()); ++page) {
      if (page > 1 && !device.newPage()) {
        return Failure{"The printer did not take page " + std::to_string(page) + " of the sheet; print it again."};
      }
      paintPlanned(paper, roomOf(size), figures, pages, page);
    }
  }
  if (!painter.end()) {
    return Failure{"The printer did not finish the sheet; print it again."};
  }
  return Done{};
}

}  // namespace

int sheetPageCount(QPainter& painter, double perMillimetre, const QSizeF& size, const Survey& survey,
                   const Interpretation& interpretation, const SheetContent& sheet) {
  SheetPaper paper(painter, perMillimetre);
  return static_cast<int>(sheetPages(paper, roomOf(size), {survey, interpretation, sheet}).size());
}

void paintSheetPage(QPainter& painter, double perMillimetre, const QSizeF& size, int page, const Survey& survey,
                    const Interpretation& interpretation, const SheetContent& sheet, std::vector<SheetMark>* marks) {
  SheetPaper paper(painter, perMillimetre);
  paper.note(marks);
  if (sheet.blackAndWhite) {
    paper.setBlackAndWhite();
  }
  const QRectF room = roomOf(size);
  const SheetFigures figures{survey, interpretation, sheet};
  paintPlanned(paper, room, figures, sheetPages(paper, room, figures), page);
}

QStringList sheetLeftOut(const QSizeF& size, const Survey& survey, const Interpretation& interpretation,
                         const SheetContent& sheet) {
  constexpr double kPerMillimetre = kResolution / kInch;
  QImage nowhere(1, 1, QImage::Format_RGB32);
  QPainter painter(&nowhere);
  SheetPaper paper(painter, kPerMillimetre);
  QStringList leftOut;
  paper.noteLeftOut(&leftOut);
  const SheetFigures figures{survey, interpretation, sheet};
  paintClientPage(paper, roomOf(size), figures);
  paintReviewerPage(paper, roomOf(size), figures);
  return leftOut;
}

Outcome paintSheet(QPagedPaintDevice& device, const Survey& survey, const Interpretation& interpretation,
                   const SheetOptions& options) {
  return paintContent(device, survey, interpretation, sheetContent(survey, interpretation, options));
}

Outcome writeSheetPdf(const QString& path, const Survey& survey, const Interpretation& interpretation,
                      const SheetOptions& options, QPageSize::PageSizeId size) {
  QByteArray bytes;
  QBuffer buffer(&bytes);
  buffer.open(QIODevice::WriteOnly);
  QPdfWriter writer(&buffer);
  writer.setPageSize(QPageSize(size));
  writer.setPageMargins(QMarginsF(0, 0, 0, 0));
  writer.setResolution(kResolution);
  const SheetContent sheet = sheetContent(survey, interpretation, options);
  writer.setTitle(QString::fromStdString(sheet.title));
  writer.setCreator(QStringLiteral("Strikeplate"));
  if (Outcome painted = paintContent(writer, survey, interpretation, sheet); !painted) {
    return painted;
  }
  return writeWhole(path, bytes);
}

}  // namespace strikeplate
