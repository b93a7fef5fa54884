#pragma once

#include <qcustomplot.h>

#include "widgets/section_drawing.h"

namespace strikeplate {

/// What the section says at the plumb line: position, and the depth to every interface with its 95 % interval, each
/// at its own height.
class PlumbReadout : public QCPAbstractItem {
 public:
  explicit PlumbReadout(QCustomPlot* plot);
  /// `x` in m; the read-out stands left of the line where it would otherwise reach beyond `rightEnd`, px.
  void show(const Scene& scene, const Look& look, double x, double rightEnd);
  double selectTest(const QPointF&, bool, QVariant*) const override { return -1.0; }

 protected:
  void draw(QCPPainter* painter) override;

 private:
  Scene scene_;
  Look look_ = Look::of(LookKind::Light);
  double x_ = Estimate::kNaN;
  double rightEnd_ = 0.0;
};

}  // namespace strikeplate
