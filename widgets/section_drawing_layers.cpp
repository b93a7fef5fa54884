// The layers of the section drawing: bands, interfaces, hidden-layer allowance, names.
#include <algorithm>
#include <cmath>

#include "widgets/section_drawing.h"

namespace strikeplate {
namespace {

// A run of neighbouring positions where two edges are known.
struct Run {
  QPolygonF upper, lower;
};

// Where `edges` gives no pair of depths (m) the section stays empty.
template <class Edges>
std::vector<Run> runsOf(const SectionFrame& frame, const Section& section, Edges edges) {
  std::vector<Run> runs(1);
  const double floor = frame.area().bottom() + 10.0;
  for (std::size_t i = 0; i < section.x.size(); ++i) {
    const auto [shallow, deep] = edges(i);
    if (std::isnan(shallow) || std::isnan(deep)) {
      runs.emplace_back();
      continue;
    }
    const double x = frame.x(section.x[i]);
    runs.back().upper << QPointF(x, frame.y(section.ground[i] - shallow));
    runs.back().lower << QPointF(x, std::isfinite(deep) ? frame.y(section.ground[i] - deep) : floor);
  }
  return runs;
}

void fill(QPainter& painter, const std::vector<Run>& runs, const QBrush& brush) {
  painter.setPen(Qt::NoPen);
  painter.setBrush(brush);
  for (const Run& run : runs) {
    QPolygonF outline = run.upper;
    std::for_each(run.lower.crbegin(), run.lower.crend(), [&](const QPointF& point) { outline << point; });
    painter.drawPolygon(outline);
  }
  painter.setBrush(Qt::NoBrush);
}

using Edges = std::pair<double, double>;

}  // namespace

void SectionDrawing::drawAllowance(QPainter& painter, const Section& section, std::size_t index) const {
  const SectionInterface& interface = section.interfaces[index];
  const std::vector<double>& deepest = allowances_[index].depth;
  const auto runs = runsOf(frame(), section, [&](std::size_t i) {
    return Edges{interface.depth[i].value, deepest[i]};
  });
  QColor colour = look_.layerColour(interface.layer);
  colour.setAlpha(look_.kind == LookKind::Sun ? 150 : 90);
  // The pattern is much dearer to fill with smooth edges, and they cannot be seen on it.
  painter.setRenderHint(QPainter::Antialiasing, false);
  fill(painter, runs, QBrush(colour, Qt::BDiagPattern));
  painter.setRenderHint(QPainter::Antialiasing, true);
  painter.setPen(QPen(colour, look_.lineWidth, Qt::DotLine));
  for (const Run& run : runs) {
    painter.drawPolyline(run.lower);
  }
}

void SectionDrawing::drawBand(QPainter& painter, const Section& section, std::size_t index) const {
  const SectionInterface& interface = section.interfaces[index];
  QColor colour = look_.layerColour(interface.layer);
  const auto outer = runsOf(frame(), section, [&](std::size_t i) {
    return Edges{interface.depth[i].low95, interface.depth[i].high95};
  });
  const auto inner = runsOf(frame(), section, [&](std::size_t i) {
    return Edges{interface.depth[i].low68, interface.depth[i].high68};
  });
  colour.setAlpha(70);
  fill(painter, outer, colour);
  colour.setAlpha(80);
  fill(painter, inner, colour);
}

void SectionDrawing::drawInterface(QPainter& painter, const Section& section, std::size_t index) const {
  const SectionInterface& interface = section.interfaces[index];
  const bool chosen = scene_.selection.layer == interface.layer;
  const QColor colour = look_.layerColour(interface.layer);
  const auto runs = runsOf(frame(), section, [&](std::size_t i) {
    return Edges{interface.depth[i].value, interface.depth[i].value};
  });
  // The layer's symbol along the line, so that layers are told apart without colour.
  constexpr double kApart = 110.0;
  double next = frame().area().left() + 40.0 + 25.0 * static_cast<double>(index);
  for (const Run& run : runs) {
    painter.setPen(QPen(colour, (chosen ? 2.3 : 1.6) * look_.lineWidth));
    painter.drawPolyline(run.upper);
    painter.setPen(QPen(colour, look_.lineWidth));
    painter.setBrush(look_.paper);
    for (const QPointF& point : run.upper) {
      if (point.x() >= next) {
        paintLayerSymbol(painter, interface.layer, point, 7.0);
        next = point.x() + kApart;
      }
    }
    painter.setBrush(Qt::NoBrush);
  }
}

// At the right edge, each under the top of its layer.
void SectionDrawing::drawLayerNames(QPainter& painter, const Section& section) const {
  const SectionFrame f = frame();
  const QRectF area = f.area();
  if (section.x.empty()) {
    return;
  }
  // The last position that is shown, and to its left the first one where the depth is known.
  const auto beyond = std::upper_bound(section.x.begin(), section.x.end(), f.units.toMetres(f.xAxis->range().upper));
  const auto shown = std::max<std::ptrdiff_t>(beyond - section.x.begin(), 1);
  const double height = painter.fontMetrics().height() + 2.0;
  std::vector<double> tops;
  for (int layer = 1; layer <= section.layers; ++layer) {
    double elevation = section.ground[static_cast<std::size_t>(shown - 1)];
    for (std::ptrdiff_t i = shown - 1; layer > 1 && i >= 0; --i) {
      const auto at = static_cast<std::size_t>(i);
      const Estimate& depth = section.interfaces[static_cast<std::size_t>(layer) - 2].depth[at];
      if (depth.determined) {
        elevation = section.ground[at] - depth.value;
        break;
      }
    }
    tops.push_back(f.y(elevation) + 5.0);
  }
  spreadApart(tops, height, area);
  namesBegin_ = area.right();
  for (int layer = 1; layer <= section.layers; ++layer) {
    const auto n = static_cast<std::size_t>(layer - 1);
    QFont font = painter.font();
    font.setBold(scene_.selection.layer == layer);
    painter.setFont(font);
    const QString words = QString::number(layer) + "   " + velocityShort(f.units, section.velocities[n]);
    const double width = painter.fontMetrics().horizontalAdvance(words) + 1.0;
    const QRectF place(area.right() - width - 8.0, tops[n], width, height);
    namesBegin_ = std::min(namesBegin_, place.left() - 18.0);
    drawWordsOnPaper(painter, look_, place.adjusted(-15, 0, 0, 0), QString(), look_.ink);
    painter.setPen(QPen(look_.layerColour(layer), look_.lineWidth));
    painter.setBrush(Qt::NoBrush);
    paintLayerSymbol(painter, layer, {place.left() - 9.0, place.center().y()}, 8.0);
    painter.setPen(look_.ink);
    painter.drawText(place.adjusted(0, 0, 4, 0), Qt::AlignLeft | Qt::AlignVCenter, words);
  }
}

}  // namespace strikeplate
