#pragma once

#include "widgets/view.h"

class QCustomPlot;

namespace strikeplate {

/// Travel times of all shots over position, with the section's curves; a click selects the shot and trace, keys 1 to
/// 6 give the selected trace to a layer, 0 gives it back to the program.
class TravelTimePlot : public View {
  Q_OBJECT
 public:
  explicit TravelTimePlot(QWidget* parent = nullptr);
  void setAxisMargins(int left, int right);
  void showScene(const Scene& scene) override;
  void showSelection(const Selection& selection) override;
  void showPlumbLine(double x) override;
  void showPositionRange(double left, double right) override;
  void setLook(const Look& look) override;

 protected:
  void keyPressEvent(QKeyEvent* event) override;

 private:
  void draw();
  void click(const QPointF& position);

  Scene scene_;
  Look look_ = Look::of(LookKind::Light);
  QCustomPlot* plot_;
  double left_ = 0.0, right_ = 100.0, plumbLine_ = Estimate::kNaN;
};

}  // namespace strikeplate
