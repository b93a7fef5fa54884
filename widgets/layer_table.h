#pragma once

#include <QWidget>

#include "widgets/look.h"
#include "widgets/scene.h"

class QLabel;
class QTableWidget;

namespace strikeplate {

/// One row for each layer: velocity, depth to its top along the line and under the plumb line, dip; each with its 95
/// % interval.
class LayerTable : public QWidget {
  Q_OBJECT
 public:
  explicit LayerTable(QWidget* parent = nullptr);
  void showScene(const Scene& scene);
  void showSelection(const Selection& selection);
  void showPlumbLine(double x);
  void setLook(const Look& look);

 signals:
  void layerWanted(int layer);

 private:
  void fill();
  void fillPlumbColumn();
  void fillRow(int row);
  void put(int row, int column, const QString& text, const QString& tip = {});

  Scene scene_;
  Look look_ = Look::of(LookKind::Light);
  double plumbLine_ = Estimate::kNaN;
  QTableWidget* table_;
  QLabel* reason_;  ///< stands in for the table when there is no section
};

/// Depth to the top of a layer under the geophones, as the sheet gives it.
struct DepthsAlong {
  double least = Estimate::kNaN, mean = Estimate::kNaN,
         most = Estimate::kNaN;  ///< m; NaN where nothing is determined
  double share = 0.0;            ///< of the geophones, where it is determined, 0 to 1
};
DepthsAlong depthsAlong(const Survey& survey, const Section& section, int layer);

}  // namespace strikeplate
