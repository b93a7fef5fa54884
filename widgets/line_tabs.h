#pragma once

#include "widgets/view.h"

class QTabBar;

namespace strikeplate {

/// The lines of the job, one tab each; hidden while there is only one. Choosing a tab brings its line to hand.
class LineTabs : public View {
  Q_OBJECT
 public:
  explicit LineTabs(QWidget* parent = nullptr);

  void showScene(const Scene& scene) override;
  void showSelection(const Selection& selection) override;
  void showPlumbLine(double x) override;
  void showPositionRange(double left, double right) override;
  void setLook(const Look& look) override;

  /// The line `step` places further, going round at the ends.
  void stepLine(int step);

 private:
  void showLine(int index);

  Scene scene_;
  QTabBar* tabs_;
};

}  // namespace strikeplate
