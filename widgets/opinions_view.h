#pragma once

#include <QWidget>

#include "widgets/look.h"
#include "widgets/scene.h"

class QLabel;

namespace strikeplate {

class OpinionsChart;

/// Second opinions on the depth to the selected layer at the plumb line: their means in words, and all of them on one
/// axis.
class OpinionsView : public QWidget {
  Q_OBJECT
 public:
  explicit OpinionsView(QWidget* parent = nullptr);
  void showScene(const Scene& scene);
  void showSelection(const Selection& selection);
  void showPlumbLine(double x);
  void setLook(const Look& look);
  [[nodiscard]] QString headWords() const;

 signals:
  void hint(const QString& text);

 protected:
  void showEvent(QShowEvent* event) override;

 private:
  void refresh();
  [[nodiscard]] int layer() const;
  [[nodiscard]] double position() const;

  Scene scene_;
  std::shared_ptr<const Interpretation> shown_;  ///< what the chart points into
  double plumbLine_ = Estimate::kNaN;
  QLabel* head_;
  OpinionsChart* chart_;
};

}  // namespace strikeplate
