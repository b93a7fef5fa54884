#pragma once

#include <QWidget>

#include "core/survey/edit.h"
#include "widgets/look.h"
#include "widgets/scene.h"

namespace strikeplate {

/// What every pane has in common: it shows a scene, proposes edits, and takes part in the one selection, the plumb
/// line and the shared position axis. A view never changes the survey.
class View : public QWidget {
  Q_OBJECT
 public:
  using QWidget::QWidget;

  /// Shows a new scene; called for every step of a drag, so it must be quick. Keeps zoom and gesture state.
  virtual void showScene(const Scene& scene) = 0;
  virtual void showSelection(const Selection& selection) = 0;
  /// The vertical line at a station under the pointer, x in m along the line; NaN hides it.
  virtual void showPlumbLine(double x) = 0;
  /// The position axis that all panes share, m. Views without a position axis ignore it.
  virtual void showPositionRange(double left, double right) = 0;
  virtual void setLook(const Look& look) = 0;

 signals:
  void proposed(const strikeplate::Edit& edit, strikeplate::Phase phase);
  void selectionWanted(const strikeplate::Selection& selection);
  void plumbLineWanted(double x);
  void positionRangeWanted(double left, double right);
  /// A short text for the status bar: what the pointer is on, with numbers.
  void hint(const QString& text);
};

}  // namespace strikeplate
