#include "app/answer_line.h"

#include <QHBoxLayout>

namespace strikeplate {

AnswerLine::AnswerLine(QWidget* parent) : QWidget(parent), answer_(new QLabel(this)), hint_(new QLabel(this)) {
  auto* layout = new QHBoxLayout(this);
  layout->setContentsMargins(10, 4, 10, 4);
  layout->setSpacing(16);
  QFont large = answer_->font();
  large.setPointSizeF(large.pointSizeF() * 1.15);
  large.setBold(true);
  answer_->setFont(large);
  answer_->setAccessibleName(tr("Answer"));
  hint_->setAccessibleName(tr("Under the pointer"));
  hint_->setAlignment(Qt::AlignRight | Qt::AlignVCenter);
  // Long sentences shorten the pane's text, never the window.
  answer_->setMinimumWidth(0);
  hint_->setMinimumWidth(0);
  answer_->setSizePolicy(QSizePolicy::Ignored, QSizePolicy::Preferred);
  hint_->setSizePolicy(QSizePolicy::Ignored, QSizePolicy::Preferred);
  layout->addWidget(answer_, 2);
  layout->addWidget(hint_, 3);
}

void AnswerLine::setAnswer(const QString& sentence) {
  answer_->setText(sentence);
  answer_->setToolTip(sentence);
}

void AnswerLine::setHint(const QString& text) {
  hint_->setText(hint_->fontMetrics().elidedText(text, Qt::ElideRight, hint_->width()));
  hint_->setToolTip(text);
}

void AnswerLine::setLook(const Look& look) {
  setAutoFillBackground(true);
  QPalette palette = this->palette();
  palette.setColor(QPalette::Window, look.window);
  palette.setColor(QPalette::WindowText, look.ink);
  setPalette(palette);
  QPalette faint = palette;
  faint.setColor(QPalette::WindowText, look.faint);
  hint_->setPalette(faint);
}

}  // namespace strikeplate
