#pragma once

#include "widgets/view.h"

class QCustomPlot;
class QListWidget;

namespace strikeplate {

/// The section with its 95 % bands under the ground, and the list of doubts beneath.
class SectionPanel : public View {
  Q_OBJECT
 public:
  explicit SectionPanel(QWidget* parent = nullptr);
  void setAxisMargins(int left, int right);
  void showScene(const Scene& scene) override;
  void showSelection(const Selection&) override {}
  void showPlumbLine(double x) override;
  void showPositionRange(double left, double right) override;
  void setLook(const Look& look) override;

 private:
  void draw();
  void drawInterface(const Section& section, std::size_t index, double& lowest);

  Scene scene_;
  Look look_ = Look::of(LookKind::Light);
  QCustomPlot* plot_;
  QListWidget* doubts_;
  double left_ = 0.0, right_ = 100.0, plumbLine_ = Estimate::kNaN;
};

}  // namespace strikeplate
