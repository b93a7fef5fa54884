#include "app/handbook.h"

#include <QHBoxLayout>
#include <QLabel>
#include <QLineEdit>
#include <QListWidget>
#include <QScrollBar>
#include <QSplitter>
#include <QTextBlock>
#include <QTextBrowser>
#include <QVBoxLayout>

namespace strikeplate {

Handbook::Handbook(const QString& markdown, QWidget* parent)
    : QDialog(parent),
      words_(new QLineEdit(this)),
      outcome_(new QLabel(this)),
      chapters_(new QListWidget(this)),
      text_(new QTextBrowser(this)) {
  setWindowTitle(tr("Handbook"));
  resize(900, 640);
  words_->setPlaceholderText(tr("Search the handbook; Enter goes to the next place"));
  words_->setClearButtonEnabled(true);
  words_->setAccessibleName(tr("Search the handbook"));
  chapters_->setAccessibleName(tr("Chapters"));
  text_->setAccessibleName(tr("Text of the handbook"));
  text_->setOpenExternalLinks(false);
  text_->document()->setDocumentMargin(14.0);
  text_->document()->setMarkdown(markdown);
  for (QTextBlock block = text_->document()->begin(); block.isValid(); block = block.next()) {
    const int level = block.blockFormat().headingLevel();
    if (level == 2 || level == 3) {
      auto* item = new QListWidgetItem(QString(level == 3 ? "    " : "") + block.text(), chapters_);
      item->setData(Qt::UserRole, block.blockNumber());
    }
  }
  auto* panes = new QSplitter(this);
  panes->addWidget(chapters_);
  panes->addWidget(text_);
  panes->setStretchFactor(1, 1);
  panes->setSizes({240, 660});
  auto* top = new QHBoxLayout;
  top->addWidget(words_, 1);
  top->addWidget(outcome_);
  auto* layout = new QVBoxLayout(this);
  layout->addLayout(top);
  layout->addWidget(panes, 1);
  connect(words_, &QLineEdit::textEdited, this, [this] { search(false); });
  connect(words_, &QLineEdit::returnPressed, this, [this] { search(true); });
  connect(chapters_, &QListWidget::currentItemChanged, this, [this](const QListWidgetItem* item) {
    if (item != nullptr) {
      goTo(item->data(Qt::UserRole).toInt());
    }
  });
  words_->setFocus();
}

void Handbook::showChapter(const QString& title) {
  for (int row = 0; row < chapters_->count(); ++row) {
    if (chapters_->item(row)->text().trimmed() == title) {
      chapters_->setCurrentRow(row);
      return;
    }
  }
}

// The heading goes to the top, so that what follows it can be read.
void Handbook::goTo(int block) {
  QTextCursor cursor(text_->document()->findBlockByNumber(block));
  text_->verticalScrollBar()->setValue(text_->verticalScrollBar()->maximum());
  text_->setTextCursor(cursor);
  text_->verticalScrollBar()->setValue(text_->verticalScrollBar()->value() + text_->cursorRect(cursor).top() - 8);
}

void Handbook::search(bool further) {
  const QString words = words_->text().trimmed();
  outcome_->clear();
  if (words.isEmpty()) {
    return;
  }
  QTextCursor from = text_->textCursor();
  from.setPosition(further ? from.selectionEnd() : 0);
  text_->setTextCursor(from);
  if (!text_->find(words)) {
    text_->moveCursor(QTextCursor::Start);
    if (!text_->find(words)) {
      outcome_->setText(tr("Not found"));
    }
  }
}

}  // namespace strikeplate
