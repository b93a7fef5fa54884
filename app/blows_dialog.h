#pragma once

#include <vector>

#include <QDialog>

#include "core/survey/edit.h"

class QLabel;
class QPushButton;
class QTreeWidget;

namespace strikeplate {

/// The blows of every shot point: each one's lag and similarity, and whether it is part of the stack.
class BlowsDialog : public QDialog {
  Q_OBJECT
 public:
  explicit BlowsDialog(const Survey& survey, QWidget* parent = nullptr);
  /// What was changed, as one edit; without changes when nothing was.
  [[nodiscard]] Edit edit() const;

 private:
  [[nodiscard]] std::vector<std::vector<bool>> chosen() const;
  void check();

  Survey survey_;
  QTreeWidget* tree_;
  QLabel* lack_;
  QPushButton* ok_ = nullptr;
};

}  // namespace strikeplate
