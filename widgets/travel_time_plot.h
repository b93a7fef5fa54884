#pragma once

#include "widgets/position_view.h"

namespace strikeplate {

/// Travel times of all shots over position, with the section's curves; a click selects the shot and trace, keys 1 to
/// 6 give the selected trace to a layer, 0 gives it back to the program.
class TravelTimePlot : public PositionView {
  Q_OBJECT
 public:
  explicit TravelTimePlot(QWidget* parent = nullptr);
  void showSelection(const Selection& selection) override;

 protected:
  void drawData() override;
  void keyPressEvent(QKeyEvent* event) override;

 private:
  void click(const QPointF& position);
};

}  // namespace strikeplate
