#include "widgets/record_trace_paint.h"

#include <algorithm>
#include <cmath>

namespace strikeplate {
namespace {

QRgb mixed(QRgb under, QRgb over, float f) {
  const int w = static_cast<int>(256.0F * f + 0.5F);
  const auto channel = [w](int a, int b) { return a + ((b - a) * w) / 256; };
  return qRgb(channel(qRed(under), qRed(over)), channel(qGreen(under), qGreen(over)),
              channel(qBlue(under), qBlue(over)));
}

}  // namespace

TracePainter::TracePainter(QImage& image, const QRect& area, const TraceInk& ink, bool timeUp)
    : image_(image),
      area_(area),
      ink_(ink),
      timeUp_(timeUp),
      coverage_(static_cast<std::size_t>(area.width()), 0.0F) {}

void TracePainter::paint(RowExtremes& extremes, const TraceColumn& column) {
  if (ink_.style == TraceStyle::Density) {
    paintDensity(extremes, column);
    return;
  }
  if (ink_.style != TraceStyle::Area) {
    widen(extremes, static_cast<std::size_t>(std::max(0.0, std::round((ink_.width * kRowsPerPixel - 1.0) / 2.0))));
  }
  paintLines(extremes, column);
}

QRgb* TracePainter::line(int pixelRow) {
  const int y = timeUp_ ? area_.bottom() - pixelRow : area_.top() + pixelRow;
  return reinterpret_cast<QRgb*>(image_.scanLine(y)) + area_.left();
}

void TracePainter::paintLines(const RowExtremes& extremes, const TraceColumn& column) {
  const double zero = column.zero - area_.left();
  const double pen = ink_.style == TraceStyle::Area ? 0.0 : 0.5 * ink_.width;
  const auto swing = [&](float value) {
    const double px = column.perUnit * static_cast<double>(value);
    return column.clip > 0.0 ? std::clamp(px, -column.clip, column.clip) : px;
  };
  for (int y = 0; y < area_.height(); ++y) {
    for (int sub = 0; sub < kRowsPerPixel; ++sub) {
      const auto row = static_cast<std::size_t>(y * kRowsPerPixel + sub);
      if (!extremes.has(row)) {
        continue;
      }
      const double low = swing(extremes.low[row]), high = swing(extremes.high[row]);
      if (ink_.style == TraceStyle::Wiggle || (ink_.style == TraceStyle::WiggleAndArea && high <= 0.0)) {
        cover(zero + low - pen, zero + high + pen);
      } else if (ink_.style == TraceStyle::WiggleAndArea) {
        cover(zero + std::min(low - pen, 0.0), zero + high + pen);
      } else if (high > 0.0) {
        cover(zero, zero + high);
      }
    }
    blendRow(y);
  }
}

void TracePainter::cover(double from, double to) {
  const double width = area_.width();
  from = std::clamp(from, 0.0, width);
  to = std::clamp(to, 0.0, width);
  if (!(to > from)) {
    return;
  }
  constexpr float kShare = 1.0F / kRowsPerPixel;
  const int a = static_cast<int>(from), b = std::min(static_cast<int>(to), area_.width() - 1);
  first_ = last_ < first_ ? a : std::min(first_, a);
  last_ = std::max(last_, b);
  float* at = coverage_.data();
  if (a == b) {
    at[a] += kShare * static_cast<float>(to - from);
    return;
  }
  at[a] += kShare * static_cast<float>(a + 1 - from);
  for (int i = a + 1; i < b; ++i) {
    at[i] += kShare;
  }
  at[b] += kShare * static_cast<float>(to - b);
}

void TracePainter::blendRow(int y) {
  if (last_ < first_) {
    return;
  }
  QRgb* pixels = line(y);
  for (int i = first_; i <= last_; ++i) {
    float& share = coverage_[static_cast<std::size_t>(i)];
    pixels[i] = share >= 0.998F ? ink_.ink : mixed(pixels[i], ink_.ink, share);
    share = 0.0F;
  }
  first_ = 0;
  last_ = -1;
}

void TracePainter::paintDensity(const RowExtremes& extremes, const TraceColumn& column) {
  const int left = std::clamp(static_cast<int>(std::lround(column.left)) - area_.left(), 0, area_.width());
  const int right = std::clamp(static_cast<int>(std::lround(column.right)) - area_.left(), left, area_.width());
  const double full = column.clip > 0.0 ? column.clip : std::max(1.0, column.right - column.left);
  for (int y = 0; y < area_.height(); ++y) {
    float strongest = 0.0F;
    bool any = false;
    for (int sub = 0; sub < kRowsPerPixel; ++sub) {
      const auto row = static_cast<std::size_t>(y * kRowsPerPixel + sub);
      if (extremes.has(row)) {
        any = true;
        for (const float value : {extremes.low[row], extremes.high[row]}) {
          strongest = std::abs(value) > std::abs(strongest) ? value : strongest;
        }
      }
    }
    if (any) {
      const double grey = 0.5 + 0.5 * std::clamp(column.perUnit * static_cast<double>(strongest) / full, -1.0, 1.0);
      std::fill(line(y) + left, line(y) + right, mixed(ink_.paper, ink_.ink, static_cast<float>(grey)));
    }
  }
}

}  // namespace strikeplate
