#pragma once

#include <QLabel>
#include <QWidget>

#include "widgets/look.h"

namespace strikeplate {

/// The bottom line: one sentence that is true now, with what the pointer is on beside it.
class AnswerLine : public QWidget {
  Q_OBJECT
 public:
  explicit AnswerLine(QWidget* parent = nullptr);
  void setAnswer(const QString& sentence);
  void setHint(const QString& text);
  void setLook(const Look& look);
  [[nodiscard]] QString answer() const { return answer_->text(); }

 private:
  QLabel* answer_;
  QLabel* hint_;
};

}  // namespace strikeplate
