#pragma once

#include <QDialog>

#include "core/survey/edit.h"
#include "widgets/scene.h"

class QTableWidget;

namespace strikeplate {

/// Each shot's trigger correction beside what the times suggest, to be typed or taken over.
class TriggerDialog : public QDialog {
  Q_OBJECT
 public:
  explicit TriggerDialog(const Scene& scene, QWidget* parent = nullptr);
  /// The corrections that were changed, as one edit.
  [[nodiscard]] Edit edit() const;

 private:
  void takeSuggestions();

  Scene scene_;
  QTableWidget* table_;
};

}  // namespace strikeplate
