#pragma once

#include <optional>

#include "widgets/line_strip_content.h"
#include "widgets/position_gesture.h"
#include "widgets/view.h"

namespace strikeplate {

/// The line as a ruler: geophones and shots at their true positions, each shot with how far it is picked and whether
/// a doubt hangs on it. A click chooses a shot, or the trace at a geophone; a drag of a shot moves it; a drag
/// elsewhere pans, the wheel zooms. Shots outside the shared range stand at the edge with an arrow.
class LineStrip : public View {
  Q_OBJECT
 public:
  explicit LineStrip(QWidget* parent = nullptr);
  /// Left and right margins of the ruler, px; those of the plots, so that the position axes are equal.
  void setAxisMargins(int left, int right);
  void showScene(const Scene& scene) override;
  void showSelection(const Selection& selection) override;
  void showPlumbLine(double x) override;
  void showPositionRange(double left, double right) override;
  void setLook(const Look& look) override;
  [[nodiscard]] QSize sizeHint() const override;

  /// Where things are on the widget, px, for whoever has to point at them.
  [[nodiscard]] QPointF shotPlace(int shot) const;
  [[nodiscard]] QPointF geophonePlace(int geophone) const;

 protected:
  bool event(QEvent* event) override;
  void paintEvent(QPaintEvent* event) override;
  void wheelEvent(QWheelEvent* event) override;
  void mousePressEvent(QMouseEvent* event) override;
  void mouseMoveEvent(QMouseEvent* event) override;
  void mouseReleaseEvent(QMouseEvent* event) override;
  void mouseDoubleClickEvent(QMouseEvent* event) override;
  void leaveEvent(QEvent* event) override;
  void keyPressEvent(QKeyEvent* event) override;

 private:
  /// What a point of the strip is on; -1 where it is on none.
  struct Target {
    int shot = -1;
    int geophone = -1;
  };
  /// A shot under way. Everything is reckoned from the survey as it was at the press.
  struct Drag {
    std::shared_ptr<const Survey> survey;
    int shot = 0;
    QPointF press;
    bool moved = false;
    ShotPoint point;  ///< where it is now
  };

  [[nodiscard]] bool empty() const { return !scene_.survey || scene_.survey->shots.empty(); }
  [[nodiscard]] PositionGesture::Axis axis() const;
  [[nodiscard]] double pixel(double x) const;
  [[nodiscard]] double shotRow() const;
  [[nodiscard]] double ruler() const;
  [[nodiscard]] double shotRadius() const;
  [[nodiscard]] Target targetAt(const QPointF& position) const;
  [[nodiscard]] QString wordsAt(const QPointF& position) const;
  void selectShot(int shot);
  void click(const QPointF& position);
  void dragShot(const QMouseEvent& event);
  void proposeDrag(Phase phase);
  void abandon();
  void wantRange(const PositionRange& range);
  void tellSelection();

  void paintRuler(QPainter& painter) const;
  void paintGeophones(QPainter& painter) const;
  void paintShots(QPainter& painter) const;
  void paintShot(QPainter& painter, int shot) const;
  void paintOutside(QPainter& painter, bool leftSide) const;
  void paintPlumbLine(QPainter& painter) const;

  Scene scene_;
  std::vector<StripShot> shots_;
  Look look_ = Look::of(LookKind::Light);
  PositionRange range_;
  double plumbLine_ = Estimate::kNaN;
  int marginLeft_ = 64, marginRight_ = 18;
  PositionGesture gesture_;
  std::optional<Drag> drag_;
};

}  // namespace strikeplate
