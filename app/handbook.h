#pragma once

#include <QDialog>

class QLabel;
class QLineEdit;
class QListWidget;
class QTextBrowser;

namespace strikeplate {

/// The handbook: its chapters at the left, the text at the right, and a search over all of it.
class Handbook : public QDialog {
  Q_OBJECT
 public:
  explicit Handbook(const QString& markdown, QWidget* parent = nullptr);
  /// Shows the chapter of this title; leaves the place as it is when there is none.
  void showChapter(const QString& title);

 private:
  void search(bool further);
  void goTo(int block);

  QLineEdit* words_;
  QLabel* outcome_;
  QListWidget* chapters_;
  QTextBrowser* text_;
};

}  // namespace strikeplate
