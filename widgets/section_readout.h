#pragma once

#include <qcustomplot.h>

#include "widgets/section_drawing.h"

namespace strikeplate {

/// What the section says at the plumb line: position, and the depth to every interface with its 95 % interval, each
/// at its own height.
class PlumbReadout : public QCPAbstractItem {
 public:
  /// `drawing` is drawn before it and outlives it.
  PlumbReadout(QCustomPlot* plot, const SectionDrawing& drawing);
  /// `x` in m; the read-out stands left of the line where it would otherwise cover the layers' names.
  void show(const Scene& scene, const Look& look, double x);
  double selectTest(const QPointF&, bool, QVariant*) const override { return -1.0; }

 protected:
  void draw(QCPPainter* painter) override;

 private:
  const SectionDrawing& drawing_;
  Scene scene_;
  Look look_ = Look::of(LookKind::Light);
  double x_ = Estimate::kNaN;
};

}  // namespace strikeplate
