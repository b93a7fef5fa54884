#pragma once

#include "widgets/position_view.h"

class QListWidget;

namespace strikeplate {

/// The section with its 95 % bands under the ground, and the list of doubts beneath.
class SectionPanel : public PositionView {
  Q_OBJECT
 public:
  explicit SectionPanel(QWidget* parent = nullptr);
  void showScene(const Scene& scene) override;
  void showSelection(const Selection&) override {}

 protected:
  void drawData() override;

 private:
  void drawInterface(const Section& section, std::size_t index, double& lowest);

  QListWidget* doubts_;
};

}  // namespace strikeplate
