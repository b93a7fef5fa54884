#include "widgets/record_frame.h"

#include <algorithm>
#include <array>
#include <cmath>

#include <QCoreApplication>
#include <QPainter>

#include "core/base/numbers.h"
#include "core/base/units.h"
#include "widgets/record_traces.h"
#include "widgets/sheet_axis.h"

namespace strikeplate {
namespace {

constexpr double kGap = 8.0;         // px between neighbouring labels
constexpr double kShotMarker = 5.0;  // px
constexpr double kTickEvery = 52.0;  // px, about, between labels of time
constexpr int kMinorTicks = 5;       // to a labelled one

QString tr(const char* text) {
  return QCoreApplication::translate("RecordView", text);
}

QString number(double value, int decimals) {
  return QString::fromStdString(fixed(value, decimals));
}

/// The fewest decimals, up to 2, that say all positions.
int decimalsFor(const std::vector<Geophone>& geophones, const Units& units) {
  for (const int decimals : {0, 1}) {
    const double scale = std::pow(10.0, decimals);
    if (std::all_of(geophones.begin(), geophones.end(), [&](const Geophone& g) {
          const double value = scale * units.fromMetres(g.x);
          return std::abs(value - std::round(value)) < 0.05;
        })) {
      return decimals;
    }
  }
  return units.feet ? 1 : 2;
}

void paintTitle(QPainter& painter, const RecordPicture& picture, const QFontMetricsF& metrics) {
  const Units units{picture.scene.survey->settings.feet};
  const QRectF row(6.0, 3.0, picture.axes.plot().right() - 6.0, metrics.height() + 2.0);
  const QString title = tr("Shot %1 at %2")
                            .arg(picture.shotIndex() + 1)
                            .arg(QString::fromStdString(units.length(
                                picture.shot.point.x, decimalsFor({{picture.shot.point.x, 0.0}}, units))));
  painter.setPen(picture.look.ink);
  painter.drawText(row, Qt::AlignLeft | Qt::AlignVCenter, title);
  QStringList words;
  if (picture.display.reducingVelocity > 0.0) {
    words << tr("reduced at %1").arg(QString::fromStdString(units.velocity(picture.display.reducingVelocity)));
  }
  for (const std::string& word : conditioningWords(picture.display)) {
    words << QString::fromStdString(word);
  }
  const double left = row.left() + metrics.horizontalAdvance(title) + 2.0 * kGap;
  const QRectF rest(left, row.top(), row.right() - left, row.height());
  painter.setPen(picture.look.faint);
  painter.drawText(rest, Qt::AlignRight | Qt::AlignVCenter,
                   metrics.elidedText(words.join(", "), Qt::ElideRight, std::max(0.0, rest.width())));
}

void paintTimeAxis(QPainter& painter, const RecordPicture& picture, const QFontMetricsF& metrics) {
  const RecordAxes& axes = picture.axes;
  const QRectF& plot = axes.plot();
  const int most = std::max(2, static_cast<int>(plot.height() / kTickEvery));
  const SheetTicks ticks = sheetTicks(1e3 * axes.range().first, 1e3 * axes.range().last, most);
  for (const double ms : ticks.at) {
    const double y = std::round(axes.yOfShown(1e-3 * ms)) + 0.5;
    painter.setPen(QPen(std::abs(ms) < 1e-9 ? picture.look.faint : picture.look.grid, 1.0));
    painter.drawLine(QPointF(plot.left(), y), QPointF(plot.right(), y));
    painter.setPen(picture.look.ink);
    painter.drawText(QRectF(0.0, y - metrics.height(), plot.left() - 7.0, 2.0 * metrics.height()),
                     Qt::AlignRight | Qt::AlignVCenter, number(ms, ticks.decimals));
  }
  painter.setPen(picture.look.faint);
  if (ticks.at.size() > 1) {
    const double step = (ticks.at[1] - ticks.at[0]) / kMinorTicks;
    const int count = static_cast<int>(ticks.at.size() + 1) * kMinorTicks;
    for (int k = -kMinorTicks; k < count; ++k) {
      const double ms = ticks.at.front() + k * step;
      const double y = std::round(axes.yOfShown(1e-3 * ms)) + 0.5;
      if (y > plot.top() && y < plot.bottom()) {
        painter.drawLine(QPointF(plot.left() - 4.0, y), QPointF(plot.left(), y));
      }
    }
  }
  painter.drawText(QRectF(0.0, plot.top() - metrics.height() - 3.0, plot.left() - 7.0, metrics.height()),
                   Qt::AlignRight | Qt::AlignVCenter, tr("ms"));
}

struct Row {
  double y;
  const QFontMetricsF& metrics;
  QPainter& painter;
  double right = -1e9;  ///< px, end of the last label

  /// Writes centred at x unless the label would come too near the last one or leave the room between the limits.
  void write(double x, const QString& text, double leftLimit, double limit) {
    const double half = 0.5 * metrics.horizontalAdvance(text);
    if (x - half < std::max(right + kGap, leftLimit) || x + half > limit) {
      return;
    }
    painter.drawText(QRectF(x - half - 2.0, y, 2.0 * half + 4.0, metrics.height()), Qt::AlignCenter, text);
    right = x + half;
  }
};

void paintTraceAxis(QPainter& painter, const RecordPicture& picture, const QFontMetricsF& metrics) {
  const RecordAxes& axes = picture.axes;
  const QRectF& plot = axes.plot();
  const Units units{picture.scene.survey->settings.feet};
  const int decimals = decimalsFor(picture.gather.geophones, units);
  double widest = metrics.horizontalAdvance(QString::number(axes.count()));
  for (const Geophone& g : picture.gather.geophones) {
    widest = std::max(widest, metrics.horizontalAdvance(number(units.fromMetres(g.x), decimals)));
  }
  const double from = plot.left() - 4.0, limit = plot.right() + 12.0;
  Row numbers{plot.bottom() + 6.0, metrics, painter},
      places{plot.bottom() + 7.0 + metrics.height(), metrics, painter};
  painter.setPen(picture.look.faint);
  for (int t = 0; t < axes.count(); ++t) {
    if (plot.left() <= axes.xOf(t) && axes.xOf(t) <= plot.right()) {
      painter.drawLine(QPointF(axes.xOf(t), plot.bottom()), QPointF(axes.xOf(t), plot.bottom() + 4.0));
    }
  }
  for (const int t : labelledTraces(axes, widest)) {
    painter.setPen(picture.look.ink);
    numbers.write(axes.xOf(t), QString::number(t + 1), from, limit);
    if (!picture.display.truePosition) {
      painter.setPen(picture.look.faint);
      places.write(axes.xOf(t),
                   number(units.fromMetres(picture.gather.geophones[static_cast<std::size_t>(t)].x), decimals), from,
                   limit);
    }
  }
  painter.setPen(picture.look.faint);
  if (picture.display.truePosition) {
    const SheetTicks ticks = sheetTicks(units.fromMetres(axes.range().left), units.fromMetres(axes.range().right),
                                        std::max(2, static_cast<int>(plot.width() / (widest + 5.0 * kGap))));
    for (const double value : ticks.at) {
      places.write(axes.xAt(units.toMetres(value)), number(value, ticks.decimals), from, limit);
    }
  }
  painter.setPen(picture.look.ink);
  painter.drawText(QRectF(0.0, numbers.y, plot.left() - 7.0, metrics.height()), Qt::AlignRight | Qt::AlignVCenter,
                   tr("trace"));
  painter.setPen(picture.look.faint);
  painter.drawText(QRectF(0.0, places.y, plot.left() - 7.0, metrics.height()), Qt::AlignRight | Qt::AlignVCenter,
                   QString::fromStdString(units.lengthUnit()));
}

void paintShotPlaces(QPainter& painter, const RecordPicture& picture) {
  const QRectF& plot = picture.axes.plot();
  const auto& shots = picture.scene.survey->shots;
  for (std::size_t s = 0; s < shots.size(); ++s) {
    const double x = picture.axes.xOfMetres(shots[s].point.x);
    if (!(plot.left() <= x && x <= plot.right())) {
      continue;
    }
    const bool own = static_cast<int>(s) == picture.shotIndex();
    painter.setPen(QPen(own ? picture.look.ink : picture.look.faint, 1.0));
    painter.setBrush(own ? QBrush(picture.look.ink) : QBrush(Qt::NoBrush));
    const double tip = plot.top() - 1.0;
    painter.drawPolygon(QPolygonF({QPointF(x, tip), QPointF(x - kShotMarker, tip - 1.5 * kShotMarker),
                                   QPointF(x + kShotMarker, tip - 1.5 * kShotMarker)}));
  }
}

}  // namespace

QMarginsF recordMargins(const QFontMetricsF& metrics) {
  const double left = std::max({metrics.horizontalAdvance(tr("trace")), metrics.horizontalAdvance("-0000"), 24.0});
  return {left + 13.0, 2.0 * metrics.height() + 10.0, 14.0, 2.0 * metrics.height() + 12.0};
}

std::vector<int> labelledTraces(const RecordAxes& axes, double widest) {
  std::vector<int> inside;
  for (int t = 0; t < axes.count(); ++t) {
    if (axes.plot().left() - 0.5 <= axes.xOf(t) && axes.xOf(t) <= axes.plot().right() + 0.5) {
      inside.push_back(t);
    }
  }
  constexpr std::array kSteps = {1, 2, 3, 4, 6, 12, 24, 48, 96, 192};
  const auto step =
      std::find_if(kSteps.begin(), kSteps.end(), [&](int each) { return each * axes.spacing() >= widest + kGap; });
  const int every = step == kSteps.end() ? kSteps.back() : *step;
  std::vector<int> labelled;
  std::copy_if(inside.begin(), inside.end(), std::back_inserter(labelled), [every](int t) { return t % every == 0; });
  return labelled;
}

void paintRecordFrame(QPainter& painter, const RecordPicture& picture) {
  const QFontMetricsF metrics(picture.font);
  painter.setFont(picture.font);
  paintTitle(painter, picture, metrics);
  painter.setRenderHint(QPainter::Antialiasing, false);
  paintTimeAxis(painter, picture, metrics);
  paintTraceAxis(painter, picture, metrics);
  painter.setPen(picture.look.faint);
  painter.setBrush(Qt::NoBrush);
  painter.drawRect(picture.axes.plot().adjusted(-0.5, -0.5, 0.5, 0.5));
  painter.setRenderHint(QPainter::Antialiasing);
  paintShotPlaces(painter, picture);
}

void paintTraceStates(QPainter& painter, const RecordPicture& picture) {
  const QRectF& plot = picture.axes.plot();
  const QFontMetricsF metrics(picture.font);
  painter.setFont(picture.font);
  painter.setRenderHint(QPainter::Antialiasing);
  for (int t = 0; t < picture.axes.count(); ++t) {
    const TraceState state = picture.shot.traces[static_cast<std::size_t>(t)].state;
    const double x = picture.axes.xOf(t), half = 0.5 * picture.axes.spacing();
    if (state == TraceState::Live || x + half < plot.left() || x - half > plot.right()) {
      continue;
    }
    const QRectF strip = QRectF(x - half, plot.top(), 2.0 * half, plot.height()).intersected(plot);
    if (state == TraceState::Dead) {
      painter.fillRect(strip, QBrush(picture.look.faint, Qt::BDiagPattern));
    }
    const QString word = state == TraceState::Dead       ? tr("dead")
                         : state == TraceState::Reversed ? tr("reversed")
                                                         : tr("noisy");
    painter.save();
    painter.translate(x, plot.bottom() - 6.0);
    painter.rotate(-90.0);
    const QRectF box(0.0, -0.5 * metrics.height(), metrics.horizontalAdvance(word) + 6.0, metrics.height());
    painter.fillRect(box, picture.look.paper);
    painter.setPen(picture.look.warning);
    painter.drawText(box, Qt::AlignCenter, word);
    painter.restore();
  }
}

}  // namespace strikeplate
