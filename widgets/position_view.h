#pragma once

#include <QSharedPointer>

#include "widgets/position_gesture.h"
#include "widgets/view.h"

class QCPAxisTickerFixed;
class QCPItemStraightLine;
class QCustomPlot;

namespace strikeplate {

/// What the views with a plot over the position axis have in common: the plot, the shared range with its zoom and pan
/// (wheel, drag, keys plus, minus and Home), the look, and the plumb line, which stands on a layer of its own so that
/// following the pointer repaints nothing else.
class PositionView : public View {
  Q_OBJECT
 public:
  explicit PositionView(QWidget* parent = nullptr);
  /// Left and right margins of the plot, px; equal ones make equal position axes.
  void setAxisMargins(int left, int right);
  void showScene(const Scene& scene) override;
  void showPlumbLine(double x) override;
  void showPositionRange(double left, double right) override;
  void setLook(const Look& look) override;

 protected:
  /// Fills the plot anew from scene() and look(); the position axis is set already.
  virtual void drawData() = 0;
  void draw();
  /// Whether a drag with the left button pans, too; not where it does something better.
  [[nodiscard]] virtual bool leftDragPans() const { return false; }
  bool eventFilter(QObject* watched, QEvent* event) override;
  void keyPressEvent(QKeyEvent* event) override;

  [[nodiscard]] QCustomPlot& plot() const { return *plot_; }
  [[nodiscard]] const Look& look() const { return look_; }
  [[nodiscard]] double plumbLine() const { return plumbLine_; }
  [[nodiscard]] PositionRange range() const { return {left_, right_}; }
  Scene scene_;

 private:
  void placePlumbLine();
  void placeTicks();
  void wantRange(const PositionRange& range);
  bool gesture(QEvent* event);
  [[nodiscard]] PositionGesture::Axis axis() const;

  Look look_ = Look::of(LookKind::Light);
  QCustomPlot* plot_;
  QCPItemStraightLine* line_;
  QSharedPointer<QCPAxisTickerFixed> ticker_;
  PositionGesture gesture_;
  double left_ = 0.0, right_ = 100.0, plumbLine_ = Estimate::kNaN;
};

}  // namespace strikeplate
