#pragma once

#include "widgets/position_view.h"
#include "widgets/section_content.h"

class QCPAxisTickerFixed;

namespace strikeplate {

class PlumbReadout;
class SectionDrawing;

/// The section under the ground, with the read-out of every interface at the plumb line. A click selects the layer or
/// the shot; a drag pans, the wheel zooms.
class SectionPlot : public PositionView {
  Q_OBJECT
 public:
  explicit SectionPlot(QWidget* parent = nullptr);
  void showSelection(const Selection& selection) override;
  void showPlumbLine(double x) override;
  /// Where a point of the ground is on the widget, px; x along the line and elevation in m.
  [[nodiscard]] QPointF placeOf(double x, double elevation) const;

 protected:
  void drawData() override;
  [[nodiscard]] bool leftDragPans() const override { return true; }

 private:
  void setElevationAxis();
  void follow(const QPointF& position);
  void click(const QPointF& position);
  [[nodiscard]] bool atBorehole(const QPointF& position, const Borehole& hole) const;

  ElevationRange elevations_;
  QSharedPointer<QCPAxisTickerFixed> elevationTicker_;
  int height_ = 0;  ///< px, of the axis that the elevations were laid out for
  SectionDrawing* drawing_;
  PlumbReadout* readout_;
};

}  // namespace strikeplate
