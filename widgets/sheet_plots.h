#pragma once

#include "core/report/sheet.h"
#include "core/survey/interpretation.h"
#include "widgets/sheet_axis.h"

namespace strikeplate {

/// What both figures of the sheet are drawn from.
struct SheetFigures {
  const Survey& survey;
  const Interpretation& interpretation;
  const SheetContent& sheet;
};

/// The span of positions that both figures show, m: every geophone, shot, borehole and the whole section.
struct SheetSpan {
  double left = 0.0, right = 1.0;
};
SheetSpan sheetSpan(const SheetFigures& figures);

/// Largest round vertical exaggeration with which `depth` m fit into `height` mm at `scale` mm for each m along the
/// line.
double verticalExaggeration(double depth, double height, double scale);

/// The section in elevation: ground, interfaces with their 95 % bands, geophones, shots, boreholes, legend, the
/// vertical exaggeration. `area` is all the room there is, mm.
void paintSection(SheetPaper& paper, const QRectF& area, const SheetFigures& figures);

/// Travel times over position: picks with 95 % bars, symbols by layer, the branches' fitted lines, shots.
void paintTravelTimes(SheetPaper& paper, const QRectF& area, const SheetFigures& figures);

/// A shot's stacked traces at their geophones' places with its picks, time down the page.
void paintRecord(SheetPaper& paper, const QRectF& area, const SheetFigures& figures, int shotIndex);

/// Residuals, picked minus predicted time, over the geophone's position, symbols by layer, as tall as nearly all of
/// them need; what lies beyond is drawn at the edge and counted. Nothing is painted without predicted times.
void paintResiduals(SheetPaper& paper, const QRectF& area, const SheetFigures& figures);

/// Whether there is any residual to paint.
bool hasResiduals(const Interpretation& interpretation);

/// The mark of a shot: a star of three strokes.
void paintShotMark(SheetPaper& paper, const QPointF& centre, double size);

}  // namespace strikeplate
