#include "app/sheet_dialog.h"

#include <QCheckBox>
#include <QComboBox>
#include <QDialogButtonBox>
#include <QFormLayout>
#include <QLabel>
#include <QLineEdit>
#include <QPlainTextEdit>
#include <QPushButton>
#include <QSettings>
#include <QVBoxLayout>

namespace strikeplate {

SheetDialog::SheetDialog(const SheetContent& draft, QWidget* parent)
    : QDialog(parent),
      draft_(QString::fromStdString(draft.answer)),
      question_(new QLineEdit(this)),
      answer_(new QPlainTextEdit(draft_, this)),
      signatory_(new QLineEdit(this)),
      blackAndWhite_(new QCheckBox(tr("&Black and white"), this)),
      paper_(new QComboBox(this)) {
  setWindowTitle(tr("Interpretation sheet"));
  resize(620, 420);
  question_->setPlaceholderText(QString::fromStdString(draft.question));
  answer_->setTabChangesFocus(true);
  paper_->addItem(tr("A4"), QPageSize::A4);
  paper_->addItem(tr("Letter"), QPageSize::Letter);
  paper_->setCurrentIndex(QSettings().value("letter").toBool() ? 1 : 0);
  blackAndWhite_->setChecked(QSettings().value("blackAndWhite").toBool());

  auto* form = new QFormLayout;
  form->addRow(tr("&Question"), question_);
  form->addRow(tr("&Answer"), answer_);
  form->addRow(tr("&Signed by"), signatory_);
  form->addRow(tr("&Paper"), paper_);
  form->addRow(QString(), blackAndWhite_);
  auto* layout = new QVBoxLayout(this);
  layout->addLayout(form);
  if (!draft.missing.empty()) {
    QStringList missing;
    for (const std::string& label : draft.missing) {
      missing << QString::fromStdString(label);
    }
    auto* lacks = new QLabel(tr("Still not given (Edit, Job, client and crew): %1.").arg(missing.join(", ")), this);
    lacks->setWordWrap(true);
    layout->addWidget(lacks);
  }
  for (const std::string& warning : draft.warnings) {
    auto* label = new QLabel(QString::fromStdString(warning), this);
    label->setWordWrap(true);
    layout->addWidget(label);
  }
  auto* buttons = new QDialogButtonBox(QDialogButtonBox::Cancel, this);
  auto* print = buttons->addButton(tr("Pre&view and print..."), QDialogButtonBox::ActionRole);
  auto* pdf = buttons->addButton(tr("Save as P&DF..."), QDialogButtonBox::ActionRole);
  connect(print, &QPushButton::clicked, this, [this] { done(Print); });
  connect(pdf, &QPushButton::clicked, this, [this] { done(Pdf); });
  connect(buttons, &QDialogButtonBox::rejected, this, &QDialog::reject);
  layout->addWidget(buttons);
}

void SheetDialog::addTo(SheetOptions& options) const {
  options.question = question_->text().trimmed().toStdString();
  const QString answer = answer_->toPlainText().trimmed();
  options.answer = answer == draft_.trimmed() ? std::string() : answer.toStdString();
  options.signatory = signatory_->text().trimmed().toStdString();
  options.blackAndWhite = blackAndWhite_->isChecked();
  QSettings settings;
  settings.setValue("letter", paper() == QPageSize::Letter);
  settings.setValue("blackAndWhite", options.blackAndWhite);
}

QPageSize::PageSizeId SheetDialog::paper() const {
  return static_cast<QPageSize::PageSizeId>(paper_->currentData().toInt());
}

}  // namespace strikeplate
