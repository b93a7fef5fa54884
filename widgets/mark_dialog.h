#pragma once

#include <optional>

#include <QDialog>

#include "core/survey/edit.h"

class QLabel;
class QLineEdit;
class QPushButton;

namespace strikeplate {

/// Asks for what the user read off a shot: its critical distance (in the survey's unit of length) or its reflection
/// time at zero offset (ms), and how sure that is.
class MarkDialog : public QDialog {
  Q_OBJECT
 public:
  /// `proposed` in m or s stands there to begin with when it is > 0, else the shot's present mark.
  MarkDialog(const Survey& survey, int shot, MarkKind kind, double proposed, QWidget* parent = nullptr);
  /// Without changes while the numbers are none.
  [[nodiscard]] Edit edit() const;

 private:
  [[nodiscard]] std::optional<ShotMark> mark() const;
  void check();

  Survey survey_;
  int shot_;
  MarkKind kind_;
  QLineEdit* value_;
  QLineEdit* sigma_;
  QLabel* lack_;
  QPushButton* ok_ = nullptr;
};

}  // namespace strikeplate
