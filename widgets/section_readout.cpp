#include "widgets/section_readout.h"

#include <algorithm>
#include <cmath>

namespace strikeplate {
namespace {

struct Line {
  QString words;
  QColor colour;
  double y = 0.0;  // px, where it belongs
};

}  // namespace

PlumbReadout::PlumbReadout(QCustomPlot* plot, const SectionDrawing& drawing)
    : QCPAbstractItem(plot), drawing_(drawing) {}

void PlumbReadout::show(const Scene& scene, const Look& look, double x) {
  scene_ = scene;
  look_ = look;
  x_ = x;
}

void PlumbReadout::draw(QCPPainter* painter) {
  if (!std::isfinite(x_) || !scene_.interpretation || !scene_.interpretation->section.determined) {
    return;
  }
  const Section& section = scene_.interpretation->section;
  const Units units{scene_.survey->settings.feet};
  const SectionFrame frame{parentPlot()->xAxis, parentPlot()->yAxis, units};
  const QRectF area = frame.area();
  const double x = frame.x(x_);
  if (x < area.left() || x > area.right()) {
    return;
  }
  std::vector<Line> lines = {{QString::fromStdString(units.length(x_)), look_.accent, area.top()}};
  const double surface = groundOf(*scene_.survey).at(x_);
  double before = surface;
  for (const SectionInterface& interface : section.interfaces) {
    const Estimate depth = section.depthAt(interface.layer, x_);
    before = depth.determined ? surface - depth.value : before;
    lines.push_back({depthWords(units, depth), look_.layerColour(interface.layer), frame.y(before)});
  }
  painter->setAntialiasing(true);
  const QFontMetricsF metrics(painter->fontMetrics());
  const double height = metrics.height() + 2.0;
  std::vector<double> tops;
  double widest = 0.0;
  for (const Line& line : lines) {
    tops.push_back(line.y - 0.5 * height);
    widest = std::max(widest, metrics.horizontalAdvance(line.words));
  }
  spreadApart(tops, height + 1.0, area);
  const bool leftwards = x + widest + 20.0 > std::min(drawing_.namesBegin(), area.right());
  for (std::size_t i = 0; i < lines.size(); ++i) {
    const double width = metrics.horizontalAdvance(lines[i].words) + 1.0;
    const QRectF place(leftwards ? x - 10.0 - width : x + 10.0, tops[i], width, height);
    painter->setPen(QPen(lines[i].colour, look_.lineWidth));
    painter->setBrush(look_.paper);
    painter->drawRect(place.adjusted(-4, 0, 4, 0));
    painter->setPen(look_.ink);
    painter->drawText(place, Qt::AlignLeft | Qt::AlignVCenter, lines[i].words);
    if (i > 0) {
      painter->setPen(QPen(lines[i].colour, look_.lineWidth));
      painter->drawEllipse(QPointF(x, lines[i].y), 3.0, 3.0);
    }
  }
}

}  // namespace strikeplate
