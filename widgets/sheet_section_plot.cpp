#include <algorithm>
#include <array>
#include <cmath>
#include <limits>
#include <numeric>

#include <QPolygonF>

#include "core/base/units.h"
#include "widgets/sheet_plots.h"

namespace strikeplate {
namespace {

constexpr double kLegendHeight = 8.6;  // mm, for two rows
constexpr double kNameRow = 3.2;       // mm for one row of borehole names
constexpr int kNameRows = 3;
const SheetText kNameText{6.5, false, Qt::black, Qt::AlignHCenter};

QString words(const std::string& text) {
  return QString::fromStdString(text);
}

struct Depths {
  double highest = -std::numeric_limits<double>::infinity();  // elevation, m
  double lowest = std::numeric_limits<double>::infinity();
};

// From the ground down to the deepest interface, with its band as far as that is not wider than all the rest.
Depths depthsOf(const SheetFigures& figures) {
  const Section& section = figures.interpretation.section;
  Depths depths;
  for (const Geophone& point : figures.interpretation.times.ground.points()) {
    depths.highest = std::max(depths.highest, point.elevation);
    depths.lowest = std::min(depths.lowest, point.elevation);
  }
  double band = std::numeric_limits<double>::infinity();
  for (const SectionInterface& interface : section.interfaces) {
    for (std::size_t i = 0; i < section.x.size() && i < interface.depth.size(); ++i) {
      if (interface.depth[i].determined) {
        depths.lowest = std::min(depths.lowest, section.ground[i] - interface.depth[i].value);
        band = std::min(band, section.ground[i] - interface.depth[i].high95);
      }
    }
  }
  for (const Borehole& hole : figures.survey.boreholes) {
    depths.lowest = std::min(depths.lowest, figures.interpretation.times.ground.at(hole.x) - hole.depth);
  }
  if (!std::isfinite(depths.highest)) {
    return {0.0, -10.0};
  }
  const double span = std::max(depths.highest - depths.lowest, 1.0);
  if (std::isfinite(band)) {
    depths.lowest = std::max(std::min(depths.lowest, band), depths.lowest - 0.5 * span);
  }
  return {depths.highest + 0.04 * span, std::min(depths.lowest, depths.highest - 1.0) - 0.08 * span};
}

SheetFrame frameOf(const QRectF& area, const SheetFigures& figures, double exaggeration) {
  SheetFrame frame;
  frame.area = area;
  const SheetSpan span = sheetSpan(figures);
  frame.left = span.left;
  frame.right = span.right;
  frame.top = depthsOf(figures).highest;
  frame.bottom = frame.top - area.height() * (span.right - span.left) / (area.width() * exaggeration);
  return frame;
}

// A run of neighbouring positions where the interface has a depth.
struct Run {
  QPolygonF middle, upper, lower;
};

std::vector<Run> runsOf(const SheetFrame& frame, const Section& section, const SectionInterface& interface) {
  std::vector<Run> runs(1);
  for (std::size_t i = 0; i < section.x.size() && i < interface.depth.size(); ++i) {
    const Estimate& depth = interface.depth[i];
    if (!depth.determined) {
      runs.emplace_back();
      continue;
    }
    const double ground = section.ground[i];
    const double low = std::isfinite(depth.high95) ? ground - depth.high95 : frame.bottom - 1.0;
    runs.back().middle << frame.at(section.x[i], ground - depth.value);
    runs.back().upper << frame.at(section.x[i], ground - depth.low95);
    runs.back().lower << frame.at(section.x[i], low);
  }
  return runs;
}

void paintBand(SheetPaper& paper, const QRectF& area, const Run& run, const QColor& colour) {
  QPolygonF outline = run.upper;
  for (auto point = run.lower.crbegin(); point != run.lower.crend(); ++point) {
    outline << *point;
  }
  QPainter& painter = paper.painter();
  QColor light = colour;
  light.setAlphaF(0.22);
  painter.setPen(Qt::NoPen);
  painter.setBrush(light);
  painter.drawPolygon(outline.intersected(QPolygonF(area)));
  painter.setBrush(Qt::NoBrush);
  painter.setPen(QPen(colour.darker(120), 0.18, Qt::DashLine));
  for (const QPolygonF& edge : {run.upper, run.lower}) {
    for (const QPolygonF& part : lineWithin(edge, area)) {
      painter.drawPolyline(part);
    }
  }
}

void paintInterfaceLine(SheetPaper& paper, const QRectF& area, const Run& run, int layer) {
  QPainter& painter = paper.painter();
  const QColor colour = paper.layerColour(layer).darker(115);
  painter.setPen(paper.layerPen(layer, colour, 0.55));
  for (const QPolygonF& part : lineWithin(run.middle, area)) {
    painter.drawPolyline(part);
  }
  painter.setPen(QPen(colour.darker(130), 0.2));
  painter.setBrush(Qt::white);
  double next = run.middle.isEmpty() ? 0.0 : run.middle.front().x() + 8.0;
  for (const QPointF& point : run.middle) {
    if (point.x() >= next && area.contains(point)) {
      paintLayerSymbol(painter, layer, point, 1.8);
      next = point.x() + 24.0;
    }
  }
  painter.setBrush(Qt::NoBrush);
}

void paintInterfaces(SheetPaper& paper, const SheetFrame& frame, const Section& section) {
  for (const SectionInterface& interface : section.interfaces) {
    for (const Run& run : runsOf(frame, section, interface)) {
      paintBand(paper, frame.area, run, paper.layerColour(interface.layer));
    }
  }
  for (const SectionInterface& interface : section.interfaces) {
    for (const Run& run : runsOf(frame, section, interface)) {
      paintInterfaceLine(paper, frame.area, run, interface.layer);
    }
  }
}

void paintGround(SheetPaper& paper, const SheetFrame& frame, const SheetFigures& figures) {
  const Ground& ground = figures.interpretation.times.ground;
  QPolygonF line;
  line << frame.at(frame.left, ground.at(frame.left));
  for (const Geophone& point : ground.points()) {
    line << frame.at(point.x, point.elevation);
  }
  line << frame.at(frame.right, ground.at(frame.right));
  QPainter& painter = paper.painter();
  painter.setPen(QPen(paper.look().ground, 0.6));
  painter.drawPolyline(line);
  painter.setPen(QPen(paper.look().ink, 0.15));
  painter.setBrush(paper.look().ink);
  const double size = figures.survey.geophones.size() > 60 ? 1.0 : 1.5;
  for (const Geophone& geophone : figures.survey.geophones) {
    paintLayerSymbol(painter, 5, frame.at(geophone.x, geophone.elevation) - QPointF(0, size * 0.55), size);
  }
  painter.setBrush(Qt::NoBrush);
  for (const Shot& shot : figures.survey.shots) {
    paintShotMark(paper, frame.at(shot.point.x, shot.point.elevation - shot.point.depth) - QPointF(0, 2.6), 2.0);
  }
}

// A borehole in the section: a full stroke when it was used, an open one when it was only compared.
void paintBoreholeStroke(SheetPaper& paper, const QPointF& top, const QPointF& met, bool used) {
  const QColor ink = paper.look().ink;
  if (used) {
    paper.line(top, met, ink, 0.9);
    return;
  }
  constexpr double kHalf = 0.4;
  paper.line({top.x() - kHalf, top.y()}, {met.x() - kHalf, met.y()}, ink, 0.15);
  paper.line({top.x() + kHalf, top.y()}, {met.x() + kHalf, met.y()}, ink, 0.15);
}

// The drilled depth as a bar with its 95 % interval.
void paintBorehole(SheetPaper& paper, const SheetFrame& frame, const Borehole& hole, double ground) {
  const QColor ink = paper.look().ink;
  const QPointF top = frame.at(hole.x, ground);
  const QPointF met = frame.at(hole.x, ground - hole.depth);
  paper.line({top.x(), frame.area.top()}, top, paper.look().faint, 0.12);
  paintBoreholeStroke(paper, top, met, hole.used);
  for (const double sign : {-1.0, 0.0, 1.0}) {
    const double y = frame.y(ground - hole.depth + sign * kNormal95 * hole.sigma);
    const double half = sign == 0.0 ? 1.8 : 1.0;
    paper.line({met.x() - half, y}, {met.x() + half, y}, ink, sign == 0.0 ? 0.4 : 0.2);
  }
}

struct BoreholeName {
  QString name;
  double x = 0.0;  // mm, middle
  int row = 0;     // 0 next to the plot
};

// Names above the plot, each in the first row that has room; what has none anywhere is left to the table.
std::vector<BoreholeName> boreholeNames(const SheetPaper& paper, const SheetFrame& frame,
                                        const SheetFigures& figures) {
  const std::vector<Borehole>& holes = figures.survey.boreholes;
  std::vector<std::size_t> order(holes.size());
  std::iota(order.begin(), order.end(), 0U);
  std::stable_sort(order.begin(), order.end(), [&](std::size_t a, std::size_t b) { return holes[a].x < holes[b].x; });
  std::array<double, kNameRows> taken{};
  taken.fill(frame.area.left() - 10.0);
  std::vector<BoreholeName> names;
  for (const std::size_t i : order) {
    const QString name = words(figures.sheet.boreholeMarks[i]);
    const double half = paper.width(name, kNameText) / 2.0;
    const double x = std::clamp(frame.x(holes[i].x), frame.area.left() + half, frame.area.right() - half);
    const auto row = std::find_if(taken.begin(), taken.end(), [&](double end) { return x - half > end; });
    if (row != taken.end()) {
      names.push_back({name, x, static_cast<int>(row - taken.begin())});
      *row = x + half + 1.5;
    }
  }
  return names;
}

double roomForNames(const std::vector<BoreholeName>& names) {
  int rows = 0;
  for (const BoreholeName& name : names) {
    rows = std::max(rows, name.row + 1);
  }
  return 1.0 + kNameRow * rows;
}

// Room for words in a layer under a position: between the bands of its two interfaces, mm from the plot's top.
struct Gap {
  double top = 0.0, bottom = 0.0;
};

Gap gapOf(const SheetFrame& frame, const Section& section, int layer, std::size_t i) {
  const double ground = section.ground[i];
  const double above = layer == 1 ? 0.0 : section.depthAt(layer, section.x[i]).high95;
  const double floor = ground - frame.bottom;
  const double below = layer == section.layers ? floor : section.depthAt(layer + 1, section.x[i]).low95;
  return {frame.y(ground - above), frame.y(ground - std::min(below, floor))};
}

// In the middle of a layer where it is thickest and no borehole stands, as far as the words fit there at all.
void paintLayerName(SheetPaper& paper, const SheetFrame& frame, const SheetFigures& figures, int layer) {
  const Section& section = figures.interpretation.section;
  const SheetText style{7.0, true, paper.look().ink, Qt::AlignHCenter};
  const std::vector<std::string>& row = figures.sheet.layers.rows[static_cast<std::size_t>(layer) - 1];
  const QString name = QStringLiteral("layer %1:  ").arg(layer) + words(row[1]);
  const double half = paper.width(name, style) / 2.0 + 2.0;
  const auto clear = [&](double x) {
    const auto& holes = figures.survey.boreholes;
    return x - half > frame.area.left() && x + half < frame.area.right() &&
           std::none_of(holes.begin(), holes.end(),
                        [&](const Borehole& hole) { return std::abs(frame.x(hole.x) - x) < half; });
  };
  double best = 3.6;
  QPointF place;
  for (std::size_t i = 0; i < section.x.size(); ++i) {
    const double x = frame.x(section.x[i]);
    const Gap gap = gapOf(frame, section, layer, i);
    if (gap.bottom - gap.top > best + 0.3 && clear(x)) {
      best = gap.bottom - gap.top;
      place = {x, (gap.top + gap.bottom) / 2.0 + 1.0};
    }
  }
  if (!place.isNull()) {
    paper.label(place, name, style);
  }
}

// A reader takes slopes for what they look like, so it is said in words which way they are drawn wrong.
QString scaleWords(double exaggeration) {
  const QString bands = QStringLiteral("bands: 95 %    vertical exaggeration %1 : 1").arg(exaggeration);
  if (exaggeration > 1.0) {
    return bands + QStringLiteral(" (slopes look steeper than they are)");
  }
  return bands + (exaggeration < 1.0 ? QStringLiteral(" (slopes look flatter than they are)") : QString());
}

// What has no room in the first row goes on in the second, whose right end says the scale.
void paintLegend(SheetPaper& paper, const QPointF& corner, double width, const SheetFigures& figures) {
  QPainter& painter = paper.painter();
  const Look& look = paper.look();
  const SheetText style{6.5, false, look.ink};
  constexpr double kSecondRow = 3.8;  // mm below the first
  double y = corner.y() + 2.0;
  double x = corner.x();
  const auto makeRoomFor = [&](const QString& text) {
    if (x + 2.4 + paper.width(text, style) > corner.x() + width) {
      x = corner.x();
      y = corner.y() + 2.0 + kSecondRow;
    }
  };
  const auto entry = [&](const QString& text) {
    paper.label({x + 2.4, y}, text, style);
    x += 6.0 + paper.width(text, style);
  };
  painter.setPen(QPen(look.ink, 0.15));
  painter.setBrush(look.ink);
  paintLayerSymbol(painter, 5, {x + 0.8, y - 0.8}, 1.5);
  painter.setBrush(Qt::NoBrush);
  entry(QStringLiteral("geophone"));
  paintShotMark(paper, {x + 0.8, y - 0.8}, 1.9);
  entry(QStringLiteral("shot"));
  const auto& holes = figures.survey.boreholes;
  for (const bool used : {true, false}) {
    if (std::any_of(holes.begin(), holes.end(), [used](const Borehole& hole) { return hole.used == used; })) {
      const QString text = used ? QStringLiteral("borehole, used") : QStringLiteral("borehole, compared only");
      makeRoomFor(text);
      paintBoreholeStroke(paper, {x + 0.8, y - 2.0}, {x + 0.8, y + 0.4}, used);
      entry(text);
    }
  }
  for (const SectionInterface& interface : figures.interpretation.section.interfaces) {
    const QString text = QStringLiteral("top of layer %1").arg(interface.layer);
    makeRoomFor(text);
    painter.setPen(QPen(paper.layerColour(interface.layer).darker(130), 0.2));
    painter.setBrush(Qt::white);
    paintLayerSymbol(painter, interface.layer, {x + 0.8, y - 0.8}, 1.8);
    painter.setBrush(Qt::NoBrush);
    entry(text);
  }
}

}  // namespace

SheetSpan sheetSpan(const SheetFigures& figures) {
  double left = std::numeric_limits<double>::infinity();
  double right = -left;
  const auto take = [&](double x) {
    left = std::min(left, x);
    right = std::max(right, x);
  };
  for (const Geophone& geophone : figures.survey.geophones) {
    take(geophone.x);
  }
  for (const Shot& shot : figures.survey.shots) {
    take(shot.point.x);
  }
  for (const Borehole& hole : figures.survey.boreholes) {
    take(hole.x);
  }
  if (!(right > left)) {
    return {std::isfinite(left) ? left - 1.0 : 0.0, std::isfinite(left) ? left + 1.0 : 1.0};
  }
  const double margin = 0.015 * (right - left);
  return {left - margin, right + margin};
}

double verticalExaggeration(double depth, double height, double scale) {
  constexpr double kMost = 20.0;
  constexpr double kLeast = 0.1;
  double best = kLeast;
  for (double power = kLeast; power <= kMost; power *= 10.0) {
    for (const double factor : {1.0, 1.25, 1.5, 1.75, 2.0, 2.5, 3.0, 3.5, 4.0, 5.0, 6.0, 7.0, 8.0, 9.0}) {
      const bool fits = factor * power <= kMost && factor * power * depth * scale <= height;
      best = fits ? factor * power : best;
    }
  }
  return best;
}

void paintSection(SheetPaper& paper, const QRectF& area, const SheetFigures& figures) {
  if (paper.dry()) {
    return;
  }
  if (figures.survey.geophones.empty()) {
    paper.text(area.topLeft(), area.width(), QStringLiteral("No section can be drawn: there is no geophone yet."),
               {8.0, false, paper.look().faint});
    return;
  }
  QRectF plot = area.adjusted(kAxisLeft, 0.0, -2.0, -kAxisBottom - kLegendHeight);
  const std::vector<BoreholeName> names = boreholeNames(paper, frameOf(plot, figures, 1.0), figures);
  plot.setTop(plot.top() + roomForNames(names));
  const SheetSpan span = sheetSpan(figures);
  const Depths depths = depthsOf(figures);
  const double exaggeration = verticalExaggeration(depths.highest - depths.lowest, plot.height() - 4.0,
                                                   plot.width() / (span.right - span.left));
  SheetFrame frame = frameOf(plot.adjusted(0, 4.0, 0, 0), figures, exaggeration);
  const Units units{figures.sheet.feet};
  const QString unit = words(units.lengthUnit());
  // The marks of geophones and shots stand above the ground, so the frame opens a little above it.
  frame.top += 4.0 / frame.area.height() * (frame.top - frame.bottom);
  frame.area = plot;
  paintAxes(paper, frame,
            {QStringLiteral("distance along the line (%1)").arg(unit), QStringLiteral("elevation (%1)").arg(unit),
             units.fromMetres(1.0), units.fromMetres(1.0)});
  QPainter& painter = paper.painter();
  painter.save();
  painter.setClipRect(frame.area);
  const Section& section = figures.interpretation.section;
  if (section.determined) {
    paintInterfaces(paper, frame, section);
  }
  paintGround(paper, frame, figures);
  for (const Borehole& hole : figures.survey.boreholes) {
    paintBorehole(paper, frame, hole, figures.interpretation.times.ground.at(hole.x));
  }
  for (int layer = 1; section.determined && layer <= section.layers; ++layer) {
    paintLayerName(paper, frame, figures, layer);
  }
  painter.restore();
  painter.setPen(QPen(paper.look().ink, 0.2));
  painter.drawRect(frame.area);
  for (const BoreholeName& name : names) {
    paper.label({name.x, frame.area.top() - 1.0 - kNameRow * name.row}, name.name, kNameText);
  }
  paper.label({frame.area.right(), area.bottom() - kLegendHeight + 7.2}, scaleWords(exaggeration),
              {6.5, false, paper.look().ink, Qt::AlignRight});
  paintLegend(paper, {frame.area.left(), area.bottom() - kLegendHeight + 1.4}, frame.area.width(), figures);
}

}  // namespace strikeplate
