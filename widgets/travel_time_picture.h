#pragma once

#include <set>
#include <vector>

#include <QRectF>

#include "widgets/branch_drag.h"
#include "widgets/look.h"
#include "widgets/scene.h"

class QCPItemText;
class QCustomPlot;

namespace strikeplate {

/// How the travel-time plot shows the times.
struct TravelTimeDisplay {
  bool allShots = true;            ///< or the selected one alone
  bool fittedLines = true;         ///< of the selected shot, with velocity and intercept time
  bool predicted = true;           ///< the section's curves
  bool residuals = false;          ///< pick minus section instead of times
  double reductionVelocity = 0.0;  ///< m/s; times less offset over this velocity; 0 shows them as they are
  bool operator==(const TravelTimeDisplay&) const = default;
};

/// Where an arrival stands on the time axis of a display, ms; NaN where it has no place.
double shownTime(const Interpretation& interpretation, int arrival, const TravelTimeDisplay& display);

/// Draws all shots' picks with their 95 % bars, the section's curves, and for the selected shot its fitted lines
/// (dashed back to the intercept time at the shot) and the ends of its branches, which can be taken hold of.
class TravelTimePicture {
 public:
  explicit TravelTimePicture(QCustomPlot& plot) : plot_(plot) {}

  /// The plot has been cleared of plottables, and its position axis is set.
  void draw(const Scene& scene, const Look& look, const TravelTimeDisplay& display,
            const std::set<TraceOfShot>& marked);

 private:
  void drawCurves(bool selected);
  void drawPicks(bool selected);
  void drawLines();
  void drawMarks();
  void drawEnds();
  void label(const Branch& branch, double x, double time);
  [[nodiscard]] int picksUnder(const QRectF& place) const;
  void setTimeAxis();
  [[nodiscard]] double positionOf(int geophone) const;
  [[nodiscard]] bool isSelected(const Arrival& arrival) const;

  QCustomPlot& plot_;
  Scene scene_;
  Look look_;
  TravelTimeDisplay display_;
  std::set<TraceOfShot> marked_;
  std::vector<QCPItemText*> labels_;
  double top_ = 0.0, bottom_ = 0.0;  // ms, of the time axis
};

}  // namespace strikeplate
