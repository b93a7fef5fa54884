#pragma once

#include <set>
#include <vector>

#include <QRectF>

#include "widgets/branch_drag.h"
#include "widgets/look.h"
#include "widgets/scene.h"
#include "widgets/travel_time_display.h"

class QCPItemText;
class QCustomPlot;

namespace strikeplate {

/// Draws all shots' picks with their 95 % bars, the section's curves, and for the selected shot its fitted lines
/// (dashed back to the intercept time at the shot), the ends of its branches, which can be taken hold of, its
/// crossover and critical distances, the user's marks, and its reciprocal times.
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
  void drawMarked();
  void drawBranchMarks();
  void drawReciprocals();
  void drawEnds();
  void label(const Branch& branch, double x, double time);
  [[nodiscard]] int picksUnder(const QRectF& place) const;
  void setTimeAxis();
  [[nodiscard]] double positionOf(int geophone) const;
  [[nodiscard]] bool isSelected(const Arrival& arrival) const;
  /// Opacity of what belongs to a side, 0 to 255: the other side steps back when one is to stand out.
  [[nodiscard]] int strength(double signedOffset, int full) const;

  QCustomPlot& plot_;
  Scene scene_;
  Look look_;
  TravelTimeDisplay display_;
  std::set<TraceOfShot> marked_;
  std::vector<QCPItemText*> labels_;
  double top_ = 0.0, bottom_ = 0.0;  // ms, of the time axis
};

}  // namespace strikeplate
