#pragma once

#include <vector>

#include <QDialog>

#include "core/survey/times_table.h"

class QComboBox;
class QLabel;
class QPushButton;

namespace strikeplate {

/// Chooses which column of a table of travel times holds what, and its units; shows the first rows and what would
/// come of them. Remembers the choice for tables with the same columns.
class TimesDialog : public QDialog {
  Q_OBJECT
 public:
  /// `table` has to outlive the dialog.
  explicit TimesDialog(const CsvTable& table, QWidget* parent = nullptr);

  [[nodiscard]] TimesColumns columns() const;
  /// The line as chosen; what is missing otherwise.
  [[nodiscard]] Result<Survey> survey() const { return surveyFromTimes(table_, columns()); }

  void accept() override;

 private:
  void choose(const TimesColumns& columns);
  void showOutcome();

  const CsvTable& table_;
  std::vector<QComboBox*> fields_;  // one for each column
  QComboBox* lengths_;
  QComboBox* times_;
  QLabel* outcome_;
  QPushButton* ok_ = nullptr;
};

}  // namespace strikeplate
