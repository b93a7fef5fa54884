#pragma once

#include <QDialog>
#include <QPageSize>

#include "core/report/sheet.h"

class QCheckBox;
class QComboBox;
class QLineEdit;
class QPlainTextEdit;

namespace strikeplate {

/// What is settled before the sheet leaves the program: the question, the answer as drafted or in the user's words,
/// colour and paper; and what the sheet still lacks.
class SheetDialog : public QDialog {
  Q_OBJECT
 public:
  enum Way { Print = 1, Pdf };  ///< what exec() returns; 0 when it was given up

  SheetDialog(const SheetContent& draft, QWidget* parent = nullptr);

  /// Adds the user's choices to options.
  void addTo(SheetOptions& options) const;
  [[nodiscard]] QPageSize::PageSizeId paper() const;

 private:
  QString draft_;
  QLineEdit* question_;
  QPlainTextEdit* answer_;
  QLineEdit* signatory_;
  QCheckBox* blackAndWhite_;
  QComboBox* paper_;
};

}  // namespace strikeplate
