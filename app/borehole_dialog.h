#pragma once

#include <vector>

#include <QDialog>

#include "core/base/units.h"
#include "core/survey/survey.h"

class QLabel;
class QTableWidget;

namespace strikeplate {

/// Boreholes on the line: where, which layer's top was met, how deep, how sure, used or only compared.
class BoreholeDialog : public QDialog {
  Q_OBJECT
 public:
  explicit BoreholeDialog(const Survey& survey, QWidget* parent = nullptr);
  [[nodiscard]] std::vector<Borehole> boreholes() const { return boreholes_; }

 private:
  void addRow(const Borehole& borehole);
  void takeRows();

  Units units_;
  std::vector<Borehole> boreholes_;
  QTableWidget* table_;
  QLabel* problem_;
};

}  // namespace strikeplate
