// What stands beside the picks: crossover and critical distances, the user's marks, reciprocal times.
#include <cmath>

#include <qcustomplot.h>

#include "core/base/units.h"
#include "widgets/branch_marks.h"
#include "widgets/travel_time_picture.h"

namespace strikeplate {
namespace {

QCPScatterStyle styleOf(BranchMark::Kind kind, const Look& look) {
  const QPen pen(kind == BranchMark::Kind::Crossover ? look.ink : look.accent, 1.4 * look.lineWidth);
  switch (kind) {
    case BranchMark::Kind::Crossover:
      return {QCPScatterStyle::ssCross, pen, Qt::NoBrush, 10.0};
    case BranchMark::Kind::Critical:
      return {QCPScatterStyle::ssTriangle, pen, Qt::NoBrush, 10.0};
    case BranchMark::Kind::CriticalByHand:
      return {QCPScatterStyle::ssTriangle, pen, look.accent, 11.0};
    case BranchMark::Kind::ReflectionByHand:
      break;
  }
  return {QCPScatterStyle::ssDiamond, pen, look.accent, 11.0};
}

}  // namespace

void TravelTimePicture::drawBranchMarks() {
  if (!display_.marks || display_.residuals) {
    return;
  }
  const Units units{scene_.survey->settings.feet};
  for (const BranchMark& mark : branchMarks(*scene_.survey, *scene_.interpretation, scene_.selection.shot)) {
    if (strength(mark.side, 255) < 255) {
      continue;
    }
    const double shot = scene_.interpretation->times.shots[static_cast<std::size_t>(mark.shot)].x;
    const double time = 1e3 * mark.time - display_.reductionAt(mark.offset);
    const bool ofTime = mark.kind == BranchMark::Kind::ReflectionByHand;
    auto* graph = plot_.addGraph();
    graph->setData({units.fromMetres(shot + mark.side * mark.offset)}, {time});
    graph->setLineStyle(QCPGraph::lsNone);
    graph->setScatterStyle(styleOf(mark.kind, look_));
    auto* bar = new QCPErrorBars(plot_.xAxis, plot_.yAxis);
    bar->setErrorType(ofTime ? QCPErrorBars::etValueError : QCPErrorBars::etKeyError);
    bar->setDataPlottable(graph);
    bar->setData({kNormal95 * (ofTime ? 1e3 * mark.sigma : units.fromMetres(mark.sigma))});
    bar->setWhiskerWidth(5.0);
    bar->setSymbolGap(8.0);
    bar->setPen(QPen(mark.kind == BranchMark::Kind::Crossover ? look_.ink : look_.accent, 0.8 * look_.lineWidth));
  }
}

// Two times that ought to be one, joined by a line that ought to lie level.
void TravelTimePicture::drawReciprocals() {
  if (!display_.reciprocals || display_.residuals) {
    return;
  }
  const Units units{scene_.survey->settings.feet};
  const auto& shots = scene_.interpretation->times.shots;
  for (const ReciprocalPair& pair : scene_.interpretation->reciprocals) {
    if (pair.shotA != scene_.selection.shot && pair.shotB != scene_.selection.shot) {
      continue;
    }
    const double xA = shots[static_cast<std::size_t>(pair.shotA)].x;
    const double xB = shots[static_cast<std::size_t>(pair.shotB)].x;
    const double lowered = display_.reductionAt(std::abs(xB - xA));
    auto* line = new QCPCurve(plot_.xAxis, plot_.yAxis);
    line->addData(units.fromMetres(xA), 1e3 * pair.timeBA - lowered);
    line->addData(units.fromMetres(xB), 1e3 * pair.timeAB - lowered);
    const bool level = std::abs(pair.difference()) <= pair.tolerance;
    line->setPen(QPen(level ? look_.faint : look_.warning, (level ? 1.0 : 1.8) * look_.lineWidth, Qt::DotLine));
    line->setScatterStyle(QCPScatterStyle(QCPScatterStyle::ssPlusCircle, line->pen().color(), 9.0));
  }
}

}  // namespace strikeplate
