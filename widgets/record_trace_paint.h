#pragma once

#include <vector>

#include <QImage>
#include <QRect>

#include "widgets/record_display.h"
#include "widgets/record_extremes.h"

namespace strikeplate {

/// Rows of extremes for each row of pixels: edges are smoothed by so many steps.
inline constexpr int kRowsPerPixel = 2;

/// Where one trace is drawn, in the image's pixels.
struct TraceColumn {
  double zero = 0.0;             ///< x of amplitude 0
  double perUnit = 1.0;          ///< px to the right for amplitude 1
  double clip = 0.0;             ///< px, > 0: swings end there
  double left = 0.0, right = 0;  ///< the strip that belongs to the trace, which density fills
};

struct TraceInk {
  TraceStyle style = TraceStyle::Wiggle;
  QRgb ink = 0xff000000;
  QRgb paper = 0xffffffff;
  double width = 1.0;  ///< px
};

/// Draws traces into an image of 32 bits a pixel, row by row; much faster than a path for each trace.
class TracePainter {
 public:
  /// Draws into `area` of the image, which must lie inside it. The image must outlive the painter and
  /// not be copied meanwhile.
  TracePainter(QImage& image, const QRect& area, const TraceInk& ink, bool timeUp);

  /// `extremes` has kRowsPerPixel rows for each pixel of the area's height, in rising time; it is used up.
  void paint(RowExtremes& extremes, const TraceColumn& column);
  /// The same in another ink.
  void setInk(QRgb ink) { ink_.ink = ink; }

 private:
  void paintLines(const RowExtremes& extremes, const TraceColumn& column);
  void paintDensity(const RowExtremes& extremes, const TraceColumn& column);
  void cover(float from, float to);  // in 256ths of a pixel from the area's left
  void blendRow(int y);
  [[nodiscard]] QRgb* line(int pixelRow);

  uchar* bits_;  // of the image
  qsizetype stride_;
  QRect area_;
  TraceInk ink_;
  bool timeUp_;
  std::vector<int> coverage_;  // of the row in hand, summed over its rows of extremes
  int first_ = 0, last_ = -1;  // columns touched in it
};

}  // namespace strikeplate
