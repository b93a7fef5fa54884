// How the record view paints: the traces once, what lies over them every time.
#include <algorithm>
#include <cmath>

#include <QPainter>

#include "widgets/record_frame.h"
#include "widgets/record_loupe.h"
#include "widgets/record_trace_paint.h"
#include "widgets/record_view.h"

namespace strikeplate {

void RecordView::paintEvent(QPaintEvent*) {
  QPainter painter(this);
  if (gather() == nullptr) {
    painter.fillRect(rect(), look_.paper);
    painter.setPen(look_.ink);
    painter.drawText(rect().adjusted(16, 16, -16, -16), Qt::AlignCenter | Qt::TextWordWrap,
                     tr("No record. Drop shot records on the window, or open them from the File menu."));
    return;
  }
  paintTraces();
  painter.drawImage(0, 0, image_);
  painter.setRenderHint(QPainter::Antialiasing);
  paintOverlay(painter);
}

void RecordView::paintTraces() {
  Painted wanted{scene_.gathers.get(),
                 scene_.selection.shot,
                 shot().triggerCorrection,
                 scene_.survey->settings.feet,
                 range_,
                 display_,
                 size(),
                 devicePixelRatioF(),
                 look_.kind};
  // These lie over the traces.
  wanted.display.magnifier = wanted.display.predicted = wanted.display.reciprocal = false;
  if (image_.isNull() || !(wanted == painted_)) {
    painted_ = wanted;
    drawTraces();
  }
}

void RecordView::drawTraces() {
  const double scale = devicePixelRatioF();
  if (image_.size() != size() * scale) {
    image_ = QImage(size() * scale, QImage::Format_RGB32);
  }
  image_.setDevicePixelRatio(scale);
  image_.fill(look_.paper);
  {
    QPainter painter(&image_);
    paintRecordFrame(painter, picture());
  }
  const QRectF& plot = axes_.plot();
  const QRect area = QRectF(plot.topLeft() * scale, plot.size() * scale).toRect().intersected(image_.rect());
  TraceInk ink{display_.style, look_.ink.rgb(), look_.paper.rgb(), 0.8 * look_.lineWidth * scale};
  TracePainter painter(image_, area, ink, display_.timeUp);
  const auto rows = static_cast<std::size_t>(area.height() * kRowsPerPixel);
  const double interval = gather()->sampleInterval;
  const double perRow = (range_.last - range_.first) / static_cast<double>(rows) / interval;
  RowExtremes extremes;
  for (int t = 0; t < axes_.count(); ++t) {
    const auto i = static_cast<std::size_t>(t);
    const double reach = std::max(display_.clip, 3.0) * axes_.spacing();
    const double x = axes_.xOf(t);
    if (!(units_[i] > 0.0F) || x + reach < plot.left() || x - reach > plot.right()) {
      continue;
    }
    rowExtremes(traces_.trace(i), (axes_.recorderTime(t, range_.first) - gather()->start) / interval, perRow, rows,
                extremes);
    const double spacing = scale * axes_.spacing();
    painter.setInk(shot().traces[i].state == TraceState::Dead ? look_.faint.rgb() : look_.ink.rgb());
    painter.paint(extremes, {scale * x, spacing * display_.gain / static_cast<double>(units_[i]),
                             spacing * display_.clip, scale * x - 0.5 * spacing, scale * x + 0.5 * spacing});
  }
  QPainter words(&image_);
  paintTraceStates(words, picture());
}

void RecordView::paintOverlay(QPainter& painter) {
  const RecordPicture shown = picture();
  painter.save();
  painter.setClipRect(axes_.plot().adjusted(0, -1, 0, 1));
  RecordMarks marks{scene_.selection.trace, marked_, -1, plumbLine_};
  if (std::isfinite(plumbLine_)) {
    const int nearest = axes_.traceAt(axes_.xOfMetres(plumbLine_));
    marks.underPlumbLine = std::isfinite(axes_.xOfMetres(plumbLine_)) ? nearest : -1;
  }
  paintRecordMarks(painter, shown, marks);
  if (display_.predicted) {
    paintPredicted(painter, shown);
  }
  if (display_.reciprocal) {
    // A shot at the end of the spread stands on the frame.
    painter.setClipRect(axes_.plot().adjusted(-6, 0, 12, 0));
    paintReciprocal(painter, shown);
    painter.setClipRect(axes_.plot().adjusted(0, -1, 0, 1));
  }
  paintPicks(painter, shown, scene_.selection.trace);
  if (gesture_ && gesture_->isStroke()) {
    QColor colour = look_.accent;
    colour.setAlpha(110);
    painter.setPen(QPen(colour, 4.0, Qt::SolidLine, Qt::RoundCap, Qt::RoundJoin));
    painter.drawPolyline(gesture_->path().data(), static_cast<int>(gesture_->path().size()));
  }
  if (display_.magnifier && pointer_ && axes_.plot().contains(*pointer_)) {
    paintLoupe(painter, shown, traces_, *pointer_);
  }
  painter.restore();
  if (gather()->traces.front().empty()) {
    painter.setPen(look_.faint);
    painter.drawText(axes_.plot().adjusted(8, 8, -8, -8), Qt::AlignRight | Qt::AlignBottom | Qt::TextWordWrap,
                     tr("Times without a record"));
  }
}

}  // namespace strikeplate
