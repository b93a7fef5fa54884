#pragma once

#include <optional>
#include <string>
#include <utility>
#include <vector>

#include <QDialog>

#include "core/survey/survey.h"

class QLabel;
class QLineEdit;
class QPlainTextEdit;

namespace strikeplate {

/// Who, where, when and how: the head of the sheet; and where the line lies on the map.
class InfoDialog : public QDialog {
  Q_OBJECT
 public:
  explicit InfoDialog(const SurveyInfo& info, QWidget* parent = nullptr);
  /// What was typed; a map that cannot be right is left out.
  [[nodiscard]] SurveyInfo info() const;
  /// Why the points on the map cannot be those of the line, in one sentence; empty when they can or none is given.
  [[nodiscard]] std::string mapFault() const;

  void accept() override;

 private:
  [[nodiscard]] std::optional<LineOnMap> map() const;
  QWidget* makeMapRow(const std::optional<MapPoint>& point);

  std::vector<QLineEdit*> mapFields_;  // distance, longitude, latitude of the first point, then of the second
  QLabel* fault_;
  SurveyInfo info_;
  std::vector<std::pair<std::string SurveyInfo::*, QLineEdit*>> fields_;
  QPlainTextEdit* notes_;
};

}  // namespace strikeplate
