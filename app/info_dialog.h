#pragma once

#include <string>
#include <utility>
#include <vector>

#include <QDialog>

#include "core/survey/survey.h"

class QLineEdit;
class QPlainTextEdit;

namespace strikeplate {

/// Who, where, when and how: the head of the sheet.
class InfoDialog : public QDialog {
  Q_OBJECT
 public:
  explicit InfoDialog(const SurveyInfo& info, QWidget* parent = nullptr);
  [[nodiscard]] SurveyInfo info() const;

 private:
  SurveyInfo info_;
  std::vector<std::pair<std::string SurveyInfo::*, QLineEdit*>> fields_;
  QPlainTextEdit* notes_;
};

}  // namespace strikeplate
