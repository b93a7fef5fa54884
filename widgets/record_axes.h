#pragma once

#include <vector>

#include <QRectF>

#include "core/line/gather.h"
#include "widgets/record_display.h"

namespace strikeplate {

/// What part of a shot is shown: times in s as the axis says them (after the blow, reduced if so chosen), and trace
/// places: numbers from 1, or m along the line when traces stand at their true position.
struct RecordRange {
  double first = 0.0, last = 0.1;
  double left = 0.5, right = 1.5;
  bool operator==(const RecordRange&) const = default;
};

/// Where traces and times lie on the screen, and back. Time runs down (or up), traces from left to right.
/// Shown time = recorder time + trigger correction - offset / reducing velocity.
class RecordAxes {
 public:
  RecordAxes() = default;
  /// plot in px; the ranges must not be empty.
  RecordAxes(const Gather& gather, double triggerCorrection, const RecordDisplay& display, const QRectF& plot,
             const RecordRange& range);

  [[nodiscard]] int count() const { return static_cast<int>(place_.size()); }
  [[nodiscard]] const QRectF& plot() const { return plot_; }
  [[nodiscard]] const RecordRange& range() const { return range_; }
  [[nodiscard]] bool timeUp() const { return timeUp_; }

  /// px of a trace, and of a place on the axis.
  [[nodiscard]] double xOf(int trace) const { return xAt(place_[static_cast<std::size_t>(trace)]); }
  [[nodiscard]] double xAt(double place) const;
  [[nodiscard]] double placeAt(double x) const;
  /// px of a position in m along the line; between numbered traces it is interpolated. NaN more than half a spacing
  /// outside numbered traces.
  [[nodiscard]] double xOfMetres(double metres) const;
  /// m along the line at px; the nearest trace's when traces are numbered. NaN without traces.
  [[nodiscard]] double metresAt(double x) const;
  /// The trace nearest to px, -1 without traces.
  [[nodiscard]] int traceAt(double x) const;
  /// Median distance between neighbouring traces, px.
  [[nodiscard]] double spacing() const { return spacing_; }

  [[nodiscard]] double shownTime(int trace, double recorderTime) const;
  [[nodiscard]] double recorderTime(int trace, double shownTime) const;
  [[nodiscard]] double yOfShown(double shownTime) const;
  [[nodiscard]] double shownAt(double y) const;
  /// px of a recorder time on a trace, and back.
  [[nodiscard]] double yOf(int trace, double recorderTime) const { return yOfShown(shownTime(trace, recorderTime)); }
  [[nodiscard]] double timeAt(int trace, double y) const { return recorderTime(trace, shownAt(y)); }
  /// s for one px.
  [[nodiscard]] double secondsPerPixel() const { return (range_.last - range_.first) / plot_.height(); }

 private:
  [[nodiscard]] double medianSpacing() const;

  QRectF plot_;
  RecordRange range_;
  bool timeUp_ = false;
  bool truePosition_ = false;
  std::vector<double> place_;   // of each trace, in the range's terms
  std::vector<double> metres_;  // of each trace
  std::vector<double> shift_;   // s from recorder to shown time, of each trace
  double spacing_ = 0.0;
};

/// Zoomed by a factor (> 1 shows less) about a shown time or place, which stays where it is.
RecordRange zoomedTime(RecordRange range, double factor, double about);
RecordRange zoomedTraces(RecordRange range, double factor, double about);
/// Moved by seconds and places.
RecordRange panned(RecordRange range, double seconds, double places);
/// Within `limits`: neither wider than they are nor outside them, and not narrower than `leastTime` s and
/// `leastPlace`.
RecordRange within(RecordRange range, const RecordRange& limits, double leastTime, double leastPlace);

}  // namespace strikeplate
