#pragma once

#include "widgets/position_range.h"
#include "widgets/view.h"

class QSplitter;
class QTabWidget;

namespace strikeplate {

class DoubtsList;
class LayerTable;
class OpinionsView;
class SectionPlot;

/// The section plot, and beneath it the layers, the second opinions and the doubts, one at a time.
class SectionPanel : public View {
  Q_OBJECT
 public:
  explicit SectionPanel(QWidget* parent = nullptr);
  /// Left and right margins of the plot, px; equal ones make equal position axes.
  void setAxisMargins(int left, int right);
  void showScene(const Scene& scene) override;
  void showSelection(const Selection& selection) override;
  void showPlumbLine(double x) override;
  void showPositionRange(double left, double right) override;
  void setLook(const Look& look) override;

  [[nodiscard]] SectionPlot& plot() const { return *plot_; }
  [[nodiscard]] QTabWidget& tabs() const { return *tabs_; }
  /// How the room is shared between plot and tabs, for keeping.
  [[nodiscard]] QSplitter& splitter() const { return *splitter_; }

 private:
  void goTo(const Doubt& doubt);

  Scene scene_;
  PositionRange range_;
  SectionPlot* plot_;
  LayerTable* layers_;
  OpinionsView* opinions_;
  DoubtsList* doubts_;
  QTabWidget* tabs_;
  QSplitter* splitter_;
};

}  // namespace strikeplate
