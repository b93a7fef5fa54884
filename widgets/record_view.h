#pragma once

#include <optional>

#include "widgets/view.h"

namespace strikeplate {

/// The wiggle traces of the selected shot with its picks. A click sets the pick of a trace at the onset nearby (Alt:
/// exactly there), a drag moves it, Delete takes it away; Page up and down change the shot.
class RecordView : public View {
  Q_OBJECT
 public:
  explicit RecordView(QWidget* parent = nullptr);
  void showScene(const Scene& scene) override;
  void showSelection(const Selection& selection) override;
  void showPlumbLine(double) override {}
  void showPositionRange(double, double) override {}
  void setLook(const Look& look) override;

 protected:
  void paintEvent(QPaintEvent* event) override;
  void mousePressEvent(QMouseEvent* event) override;
  void mouseMoveEvent(QMouseEvent* event) override;
  void mouseReleaseEvent(QMouseEvent* event) override;
  void keyPressEvent(QKeyEvent* event) override;

 private:
  [[nodiscard]] const Gather* gather() const;
  [[nodiscard]] QRectF plot() const;
  [[nodiscard]] int traceAt(double x) const;
  [[nodiscard]] double xOf(std::size_t trace) const;
  [[nodiscard]] double lastTime() const;
  [[nodiscard]] double timeAt(double y) const;
  [[nodiscard]] double yOf(double time) const;
  void paintTrace(QPainter& painter, const Gather& gather, std::size_t trace) const;
  void paintPicks(QPainter& painter) const;
  void propose(double y, bool free, Phase phase);

  Scene scene_;
  Look look_ = Look::of(LookKind::Light);
  std::optional<int> dragged_;
  std::shared_ptr<const Survey> atPress_;
};

}  // namespace strikeplate
