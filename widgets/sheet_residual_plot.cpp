#include <algorithm>
#include <cmath>

#include "core/base/numbers.h"
#include "core/base/units.h"
#include "widgets/sheet_plots.h"

namespace strikeplate {
namespace {

constexpr double kShare = 0.98;      // of the residuals that the plot is made tall enough for
constexpr double kLeastSpan = 5e-4;  // s

struct Residual {
  double x = 0.0;      // m
  double value = 0.0;  // s
  int layer = 0;
};

std::vector<Residual> residualsOf(const Interpretation& interpretation) {
  std::vector<Residual> residuals;
  const std::vector<double>& predicted = interpretation.section.predicted;
  const TravelTimes& times = interpretation.times;
  for (std::size_t i = 0; i < std::min(predicted.size(), times.arrivals.size()); ++i) {
    const Arrival& a = times.arrivals[i];
    if (std::isfinite(predicted[i])) {
      residuals.push_back({times.geophones[static_cast<std::size_t>(a.geophone)].x, a.time - predicted[i], a.layer});
    }
  }
  return residuals;
}

double spanOf(const std::vector<Residual>& residuals) {
  std::vector<double> sizes;
  for (const Residual& r : residuals) {
    sizes.push_back(std::abs(r.value));
  }
  const auto last = sizes.begin() + static_cast<std::ptrdiff_t>(kShare * static_cast<double>(sizes.size() - 1));
  std::nth_element(sizes.begin(), last, sizes.end());
  return 1.1 * std::max(*last, kLeastSpan);
}

}  // namespace

bool hasResiduals(const Interpretation& interpretation) {
  return !residualsOf(interpretation).empty();
}

void paintResiduals(SheetPaper& paper, const QRectF& area, const SheetFigures& figures) {
  const std::vector<Residual> residuals = residualsOf(figures.interpretation);
  if (paper.dry() || residuals.empty()) {
    return;
  }
  const double span = spanOf(residuals);
  const SheetSpan along = sheetSpan(figures);
  SheetFrame frame;
  constexpr double kTitle = 4.4;   // mm
  constexpr double kLabels = 4.4;  // mm, for the places' numbers alone: the travel times above say what they are
  frame.area = area.adjusted(kAxisLeft - 3.0, kTitle, -2.0, -kLabels);
  frame.left = along.left;
  frame.right = along.right;
  frame.bottom = -span;
  frame.top = span;
  const Units units{figures.sheet.feet};
  constexpr double kTicks = 5.0;  // fewer may leave the zero alone with a number, and the plot without a scale
  const double tickHeight = std::min(3.6, frame.area.height() / kTicks);
  paintAxes(paper, frame, {QString(), QString(), units.fromMetres(1.0), 1e3, tickHeight});
  paper.line(frame.at(frame.left, 0.0), frame.at(frame.right, 0.0), paper.look().ink, 0.2);
  QPainter& painter = paper.painter();
  const double size = residuals.size() < 400 ? 1.3 : 0.8;
  int beyond = 0;
  for (const Residual& r : residuals) {
    beyond += std::abs(r.value) > span ? 1 : 0;
    painter.setPen(QPen(paper.layerColour(r.layer).darker(150), 0.12));
    painter.setBrush(paper.layerColour(r.layer));
    paintLayerSymbol(painter, r.layer, frame.at(r.x, std::clamp(r.value, -span, span)), size);
  }
  painter.setBrush(Qt::NoBrush);
  painter.setPen(QPen(paper.look().ink, 0.2));
  painter.drawRect(frame.area);
  QString title = QStringLiteral("Residuals, picked minus predicted (ms), along the line (%1)")
                      .arg(QString::fromStdString(units.lengthUnit()));
  if (beyond > 0) {
    title += QStringLiteral("; %1 off the scale").arg(beyond);
  }
  paper.text(area.topLeft(), area.width(), title, {7.0, true, paper.look().ink, Qt::AlignLeft, 1});
}

}  // namespace strikeplate
