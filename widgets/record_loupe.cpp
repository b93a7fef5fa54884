#include "widgets/record_loupe.h"

#include <algorithm>
#include <cmath>
#include <optional>

#include <QCoreApplication>
#include <QPainter>

#include "core/base/units.h"
#include "core/picking/trace_picker.h"
#include "widgets/record_gesture.h"

namespace strikeplate {
namespace {

constexpr double kWidth = 190.0, kHeight = 210.0, kEdge = 8.0;  // px
constexpr double kHalfTime = 0.008;                             // s shown on either side, at most
constexpr double kLeastTimesLarger = 4.0;

/// Time and amplitude in the magnifier's box.
struct Lens {
  QRectF box;
  double middle, half;  // recorder time, s
  float largest;
  bool timeUp;

  [[nodiscard]] double y(double time) const {
    const double f = 0.5 * (time - middle) / half;
    return box.center().y() + (timeUp ? -f : f) * box.height();
  }
  [[nodiscard]] double x(float value) const {
    return box.center().x() + 0.44 * box.width() * static_cast<double>(largest > 0.0F ? value / largest : 0.0F);
  }
};

QRectF boxFor(const QRectF& plot, const QPointF& pointer) {
  const bool left = pointer.x() > plot.center().x();
  const double x = left ? plot.left() + kEdge : plot.right() - kEdge - kWidth;
  return {x, plot.bottom() - kEdge - kHeight, kWidth, kHeight};
}

void paintSamples(QPainter& painter, const RecordPicture& picture, const Lens& lens, std::span<const float> samples,
                  std::size_t from, std::size_t to) {
  QPolygonF line;
  for (std::size_t i = from; i < to; ++i) {
    line << QPointF(lens.x(samples[i]), lens.y(picture.gather.timeOf(static_cast<double>(i))));
  }
  painter.setPen(QPen(picture.look.ink, picture.look.lineWidth));
  painter.drawPolyline(line);
  const double apart = std::abs(lens.y(picture.gather.sampleInterval) - lens.y(0.0));
  if (apart >= 4.0) {
    painter.setBrush(picture.look.ink);
    painter.setPen(Qt::NoPen);
    for (const QPointF& point : line) {
      painter.drawEllipse(point, 1.8, 1.8);
    }
  }
}

void paintPickIn(QPainter& painter, const RecordPicture& picture, const Lens& lens, int trace, const Pick& pick) {
  const QColor colour = picture.look.layerColour(picture.layerOf(trace));
  QColor band = colour;
  band.setAlpha(60);
  const double a = lens.y(pick.time - pick.sigma), b = lens.y(pick.time + pick.sigma);
  painter.fillRect(QRectF(lens.box.left(), std::min(a, b), lens.box.width(), std::abs(b - a)), band);
  painter.setPen(QPen(colour, 2.0));
  painter.drawLine(QPointF(lens.box.left(), lens.y(pick.time)), QPointF(lens.box.right(), lens.y(pick.time)));
}

}  // namespace

void paintLoupe(QPainter& painter, const RecordPicture& picture, const ShownTraces& traces, const QPointF& pointer) {
  const QRectF& plot = picture.axes.plot();
  const int trace = picture.axes.traceAt(pointer.x());
  if (trace < 0 || plot.width() < kWidth + 60.0 || plot.height() < kHeight + 60.0) {
    return;
  }
  const auto t = static_cast<std::size_t>(trace);
  const std::span<const float> samples = traces.trace(t);
  const double shown = picture.axes.secondsPerPixel() * kHeight;
  Lens lens{boxFor(plot, pointer), picture.axes.timeAt(trace, pointer.y()),
            std::clamp(0.5 * shown / kLeastTimesLarger, 6.0 * picture.gather.sampleInterval,
                       std::max(kHalfTime, 6.0 * picture.gather.sampleInterval)),
            0.0F, picture.axes.timeUp()};
  const auto index = [&](double time) {
    return static_cast<std::size_t>(
        std::clamp(std::floor((time - picture.gather.start) / picture.gather.sampleInterval), 0.0,
                   static_cast<double>(samples.size())));
  };
  const std::size_t from = index(lens.middle - lens.half),
                    to = std::min(samples.size(), index(lens.middle + lens.half) + 2);
  if (from >= to) {
    return;
  }
  for (std::size_t i = from; i < to; ++i) {
    lens.largest = std::max(lens.largest, std::abs(samples[i]));
  }
  painter.save();
  painter.setPen(QPen(picture.look.faint, 1.0));
  painter.setBrush(picture.look.paper);
  painter.drawRect(lens.box);
  painter.setClipRect(lens.box.adjusted(1, 1, -1, -1));
  painter.setPen(picture.look.grid);
  painter.drawLine(QPointF(lens.x(0.0F), lens.box.top()), QPointF(lens.x(0.0F), lens.box.bottom()));
  if (const auto& pick = picture.shot.traces[t].pick) {
    paintPickIn(painter, picture, lens, trace, *pick);
  }
  if (const auto onset = snapOnset(picture.gather, t, lens.middle, snapHalfWidth(picture.axes, picture.gather))) {
    painter.setPen(QPen(picture.look.accent, 1.5, Qt::DashLine));
    painter.drawLine(QPointF(lens.box.left(), lens.y(onset->time)), QPointF(lens.box.right(), lens.y(onset->time)));
  }
  paintSamples(painter, picture, lens, samples, from, to);
  painter.setFont(picture.font);
  painter.setPen(picture.look.ink);
  painter.drawText(lens.box.adjusted(6, 3, -6, -3), Qt::AlignLeft | Qt::AlignTop,
                   QCoreApplication::translate("RecordView", "Trace %1").arg(trace + 1));
  painter.setPen(picture.look.faint);
  painter.drawText(lens.box.adjusted(6, 3, -6, -3), Qt::AlignRight | Qt::AlignBottom,
                   QCoreApplication::translate("RecordView", "%1 high")
                       .arg(QString::fromStdString(milliseconds(2.0 * lens.half))));
  painter.restore();
}

}  // namespace strikeplate
