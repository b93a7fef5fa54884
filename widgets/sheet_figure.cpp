#include "widgets/sheet_figure.h"

#include <QBuffer>
#include <QImage>
#include <QPainter>
#include <QSvgGenerator>

#include "widgets/sheet_files.h"
#include "widgets/sheet_plots.h"

namespace strikeplate {
namespace {

constexpr double kInch = 25.4;     // mm
constexpr double kPngDots = 300;   // per inch
constexpr double kSvgDots = 1200;  // per inch: whole units are fine enough for thin lines
constexpr double kEdge = 3.0;      // mm around the plot

void paintFigure(QPainter& painter, double perMillimetre, const SheetFigure& figure, const SheetFigures& figures) {
  SheetPaper paper(painter, perMillimetre);
  if (figures.sheet.blackAndWhite) {
    paper.setBlackAndWhite();
  }
  const QRectF page(QPointF(), figure.size);
  paper.fill(page, Qt::white);
  const QRectF room = page.adjusted(kEdge, kEdge, -kEdge, -kEdge);
  switch (figure.kind) {
    case SheetFigure::Kind::Section:
      paintSection(paper, room, figures);
      break;
    case SheetFigure::Kind::TravelTimes:
      paintTravelTimes(paper, room, figures);
      break;
    case SheetFigure::Kind::Residuals:
      paintResiduals(paper, room, figures);
      break;
    case SheetFigure::Kind::Record:
      paintRecord(paper, room, figures, figure.shot);
      break;
  }
}

QByteArray svgOf(const SheetFigure& figure, const SheetFigures& figures) {
  QByteArray bytes;
  QBuffer buffer(&bytes);
  buffer.open(QIODevice::WriteOnly);
  QSvgGenerator svg;
  svg.setOutputDevice(&buffer);
  svg.setResolution(static_cast<int>(kSvgDots));
  const double perMillimetre = kSvgDots / kInch;
  const QSizeF size = figure.size * perMillimetre;
  svg.setSize(size.toSize());
  svg.setViewBox(QRectF(QPointF(), size));
  svg.setTitle(QString::fromStdString(figures.sheet.title));
  svg.setDescription(QString::fromStdString(figures.sheet.program));
  QPainter painter(&svg);
  paintFigure(painter, perMillimetre, figure, figures);
  painter.end();
  return bytes;
}

QByteArray pngOf(const SheetFigure& figure, const SheetFigures& figures) {
  const double perMillimetre = kPngDots / kInch;
  QImage image((figure.size * perMillimetre).toSize(), QImage::Format_RGB32);
  image.fill(Qt::white);
  image.setDotsPerMeterX(qRound(1000.0 * perMillimetre));
  image.setDotsPerMeterY(qRound(1000.0 * perMillimetre));
  QPainter painter(&image);
  paintFigure(painter, perMillimetre, figure, figures);
  painter.end();
  QByteArray bytes;
  QBuffer buffer(&bytes);
  buffer.open(QIODevice::WriteOnly);
  image.save(&buffer, "PNG");
  return bytes;
}

}  // namespace

Outcome writeSheetFigure(const QString& path, const SheetFigure& figure, const Survey& survey,
                         const Interpretation& interpretation, const SheetOptions& options) {
  if (figure.kind == SheetFigure::Kind::Record &&
      (figure.shot < 0 || figure.shot >= static_cast<int>(survey.shots.size()))) {
    return Failure{"There is no shot " + std::to_string(figure.shot + 1) + "; choose one of the line's " +
                   std::to_string(survey.shots.size()) + "."};
  }
  const SheetContent sheet = sheetContent(survey, interpretation, options);
  const SheetFigures figures{survey, interpretation, sheet};
  if (path.endsWith(QLatin1String(".svg"), Qt::CaseInsensitive)) {
    return writeWhole(path, svgOf(figure, figures));
  }
  if (path.endsWith(QLatin1String(".png"), Qt::CaseInsensitive)) {
    return writeWhole(path, pngOf(figure, figures));
  }
  return Failure{path.toStdString() + " names no kind of picture; let its name end in .svg or .png."};
}

}  // namespace strikeplate
