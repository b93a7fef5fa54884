#pragma once

#include <memory>

#include <QDialog>
#include <QPageSize>

#include "core/base/result.h"
#include "core/report/sheet_checklist.h"

class QCheckBox;
class QComboBox;
class QLabel;
class QLineEdit;
class QListWidget;
class QPlainTextEdit;
class QPrinter;
class QPrintPreviewWidget;
class QPushButton;
class QTimer;

namespace strikeplate {

/// The sheet as it will be printed, with the choices that are the printer's and not the survey's: paper, unit,
/// colours, further pages, the question, the answer in the user's own words, the name under the signature line.
/// Beside it what published guidance asks for and the survey still lacks. Prints and saves; the survey is not
/// changed: whoever opened the preview keeps its options there (edits::setSheet).
class SheetPreview : public QDialog {
  Q_OBJECT
 public:
  SheetPreview(const Survey& survey, const Interpretation& interpretation, const SheetOptions& options,
               QWidget* parent = nullptr);
  ~SheetPreview() override;

  /// What the choices come to. The answer is empty as long as the user has not changed the drafted one; an answer
  /// that was not touched keeps what it was written to.
  [[nodiscard]] SheetOptions options() const;
  [[nodiscard]] QPageSize::PageSizeId paper() const;
  void setPaper(QPageSize::PageSizeId paper);
  /// Where saving begins to look.
  void setFolder(const QString& folder);
  [[nodiscard]] bool inFeet() const;
  /// The words that the preview shows.
  [[nodiscard]] SheetContent content() const;
  [[nodiscard]] std::vector<SheetCheck> checklist() const;

  Outcome print(QPrinter& printer) const;
  Outcome savePdf(const QString& path) const;

 signals:
  /// A sentence for the status bar: what was written.
  void written(const QString& sentence);

 private:
  QWidget* makeChoices();
  QWidget* makeWords();
  QWidget* makeChecklist();
  QWidget* makeButtons();
  void refresh();
  void showChecklist();
  void showDraft();
  void showAge();
  void changeUnit();
  void askAndPrint();
  void askAndSave();
  void say(const Outcome& outcome, const QString& title, const QString& done);

  Survey survey_;                  // in the unit chosen
  Interpretation interpretation_;  // with doubts worded in that unit
  SheetOptions given_;
  QString folder_;
  std::unique_ptr<QPrinter> printer_;
  QPrintPreviewWidget* preview_ = nullptr;
  QComboBox* paper_ = nullptr;
  QComboBox* unit_ = nullptr;
  QComboBox* colours_ = nullptr;
  QCheckBox* records_ = nullptr;
  QCheckBox* tables_ = nullptr;
  QCheckBox* places_ = nullptr;
  QLineEdit* question_ = nullptr;
  QPlainTextEdit* answer_ = nullptr;
  QLabel* old_ = nullptr;          // says that the answer was written for another interpretation
  QPushButton* stands_ = nullptr;  // takes the answer as written for this one
  bool answerTouched_ = false;     // by the user, since the preview was opened
  QLineEdit* signatory_ = nullptr;
  QLabel* missing_ = nullptr;
  QListWidget* checks_ = nullptr;
  QTimer* later_ = nullptr;
};

}  // namespace strikeplate
