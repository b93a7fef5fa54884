#include "widgets/record_trace_paint.h"

#include <algorithm>
#include <cmath>

namespace strikeplate {
namespace {

constexpr int kFull = 256;       // coverage of a pixel, and steps within one
constexpr float kFarOut = 1e8F;  // of those steps: no screen is as wide

/// `under` moved towards `over` by w of kFull; two channels at a time, each with room for 8 bits more.
inline QRgb mixed(QRgb under, QRgb over, int share) {
  const auto w = static_cast<quint32>(share);
  const quint32 rest = kFull - w;
  const quint32 kOdd = 0x00ff00ffU;
  const quint32 redBlue = ((under & kOdd) * rest + (over & kOdd) * w) >> 8U;
  const quint32 green = (((under >> 8U) & 0xffU) * rest + ((over >> 8U) & 0xffU) * w) >> 8U;
  return 0xff000000U | (redBlue & kOdd) | (green << 8U);
}

}  // namespace

TracePainter::TracePainter(QImage& image, const QRect& area, const TraceInk& ink, bool timeUp)
    : bits_(image.bits()),
      stride_(image.bytesPerLine()),
      area_(area),
      ink_(ink),
      timeUp_(timeUp),
      coverage_(static_cast<std::size_t>(area.width()), 0) {}

void TracePainter::paint(RowExtremes& extremes, const TraceColumn& column) {
  if (ink_.style == TraceStyle::Density) {
    paintDensity(extremes, column);
    return;
  }
  if (ink_.style != TraceStyle::Area) {
    widen(extremes, static_cast<std::size_t>(std::max(1.0, std::round(ink_.width * kRowsPerPixel))));
  }
  paintLines(extremes, column);
}

QRgb* TracePainter::line(int pixelRow) {
  const int y = timeUp_ ? area_.bottom() - pixelRow : area_.top() + pixelRow;
  return reinterpret_cast<QRgb*>(bits_ + y * stride_) + area_.left();
}

void TracePainter::paintLines(const RowExtremes& extremes, const TraceColumn& column) {
  const auto zero = static_cast<float>(kFull * (column.zero - area_.left()));
  const auto perUnit = static_cast<float>(kFull * column.perUnit);
  const float pen = ink_.style == TraceStyle::Area ? 0.0F : static_cast<float>(0.5 * kFull * ink_.width);
  const float clip = column.clip > 0.0 ? static_cast<float>(kFull * column.clip) : kFarOut;
  for (int y = 0; y < area_.height(); ++y) {
    for (int sub = 0; sub < kRowsPerPixel; ++sub) {
      const auto row = static_cast<std::size_t>(y) * kRowsPerPixel + static_cast<std::size_t>(sub);
      if (!extremes.has(row)) {
        continue;
      }
      const float low = std::clamp(perUnit * extremes.low[row], -clip, clip);
      const float high = std::clamp(perUnit * extremes.high[row], -clip, clip);
      if (ink_.style == TraceStyle::Wiggle || (ink_.style == TraceStyle::WiggleAndArea && high <= 0.0F)) {
        cover(zero + low - pen, zero + high + pen);
      } else if (ink_.style == TraceStyle::WiggleAndArea) {
        cover(zero + std::min(low - pen, 0.0F), zero + high + pen);
      } else if (high > 0.0F) {
        cover(zero, zero + high);
      }
    }
    blendRow(y);
  }
}

inline void TracePainter::cover(float from, float to) {
  const int begin = static_cast<int>(std::max(from, 0.0F));
  const int end = std::min(static_cast<int>(to), kFull * area_.width() - 1);
  if (end <= begin) {
    return;
  }
  const int a = begin / kFull, b = end / kFull;
  first_ = last_ < first_ ? a : std::min(first_, a);
  last_ = std::max(last_, b);
  int* at = coverage_.data();
  if (a == b) {
    at[a] += end - begin;
    return;
  }
  at[a] += kFull * (a + 1) - begin;
  for (int i = a + 1; i < b; ++i) {
    at[i] += kFull;
  }
  at[b] += end - kFull * b;
}

void TracePainter::blendRow(int y) {
  if (last_ < first_) {
    return;
  }
  QRgb* pixels = line(y);
  for (int i = first_; i <= last_; ++i) {
    int& sum = coverage_[static_cast<std::size_t>(i)];
    pixels[i] = mixed(pixels[i], ink_.ink, sum / kRowsPerPixel);
    sum = 0;
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
      const auto row = static_cast<std::size_t>(y) * kRowsPerPixel + static_cast<std::size_t>(sub);
      if (extremes.has(row)) {
        any = true;
        for (const float value : {extremes.low[row], extremes.high[row]}) {
          strongest = std::abs(value) > std::abs(strongest) ? value : strongest;
        }
      }
    }
    if (any) {
      const double grey = 0.5 + 0.5 * std::clamp(column.perUnit * static_cast<double>(strongest) / full, -1.0, 1.0);
      std::fill(line(y) + left, line(y) + right, mixed(ink_.paper, ink_.ink, static_cast<int>(kFull * grey)));
    }
  }
}

}  // namespace strikeplate
