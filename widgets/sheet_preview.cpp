#include "widgets/sheet_preview.h"

#include <algorithm>

#include <QCheckBox>
#include <QComboBox>
#include <QFileDialog>
#include <QFormLayout>
#include <QGroupBox>
#include <QLabel>
#include <QLineEdit>
#include <QListWidget>
#include <QLocale>
#include <QMessageBox>
#include <QPlainTextEdit>
#include <QPrintDialog>
#include <QPrintPreviewWidget>
#include <QPrinter>
#include <QPushButton>
#include <QSignalBlocker>
#include <QTimer>
#include <QVBoxLayout>

#include "core/survey/doubts.h"
#include "widgets/sheet_painter.h"

namespace strikeplate {
namespace {

constexpr int kTypingPause = 400;  // ms after the last key before the pages are painted again
constexpr int kSideWidth = 340;    // px

QPageSize::PageSizeId usualPaper() {
  return QLocale::system().measurementSystem() == QLocale::ImperialUSSystem ? QPageSize::Letter : QPageSize::A4;
}

void setUp(QPrinter& printer, QPageSize::PageSizeId paper) {
  printer.setPageSize(QPageSize(paper));
  printer.setFullPage(true);
  printer.setPageMargins(QMarginsF(0, 0, 0, 0), QPageLayout::Millimeter);
  printer.setPageOrientation(QPageLayout::Portrait);
}

}  // namespace

SheetPreview::SheetPreview(const Survey& survey, const Interpretation& interpretation, const SheetOptions& options,
                           QWidget* parent)
    : QDialog(parent),
      survey_(survey),
      interpretation_(interpretation),
      given_(options),
      printer_(std::make_unique<QPrinter>(QPrinter::HighResolution)),
      later_(new QTimer(this)) {
  setWindowTitle(tr("Field interpretation sheet"));
  printer_->setOutputFormat(QPrinter::PdfFormat);  // the preview needs none that exists
  preview_ = new QPrintPreviewWidget(printer_.get(), this);
  auto* side = new QWidget;
  side->setFixedWidth(kSideWidth);
  auto* column = new QVBoxLayout(side);
  column->setContentsMargins(0, 0, 0, 0);
  column->addWidget(makeChoices());
  column->addWidget(makeWords());
  column->addWidget(makeChecklist(), 1);
  column->addWidget(makeButtons());
  auto* row = new QHBoxLayout(this);
  row->addWidget(preview_, 1);
  row->addWidget(side);
  later_->setSingleShot(true);
  later_->setInterval(kTypingPause);
  connect(later_, &QTimer::timeout, this, &SheetPreview::refresh);
  connect(preview_, &QPrintPreviewWidget::paintRequested, this, [this](QPrinter* printer) {
    const Outcome painted = paintSheet(*printer, survey_, interpretation_, this->options());
    Q_UNUSED(painted);  // a preview that cannot be painted stays empty; printing says why
  });
  resize(1180, 860);
  showDraft();
  refresh();
}

SheetPreview::~SheetPreview() = default;

QWidget* SheetPreview::makeChoices() {
  auto* box = new QWidget;
  auto* form = new QFormLayout(box);
  paper_ = new QComboBox;
  paper_->addItem(tr("A4"), QPageSize::A4);
  paper_->addItem(tr("Letter"), QPageSize::Letter);
  paper_->setCurrentIndex(paper_->findData(usualPaper()));
  unit_ = new QComboBox;
  unit_->addItems({tr("Metres"), tr("Feet")});
  unit_->setCurrentIndex(survey_.settings.feet ? 1 : 0);
  colours_ = new QComboBox;
  colours_->addItems({tr("Colour"), tr("Black and white")});
  colours_->setCurrentIndex(given_.blackAndWhite ? 1 : 0);
  records_ = new QCheckBox(tr("Each record with its picks"));
  records_->setChecked(given_.records);
  tables_ = new QCheckBox(tr("All tables in full"));
  tables_->setChecked(given_.tables);
  places_ = new QCheckBox(tr("Places of geophones and shots"));
  places_->setChecked(given_.places);
  form->addRow(tr("Paper"), paper_);
  form->addRow(tr("Lengths"), unit_);
  form->addRow(tr("Print in"), colours_);
  form->addRow(tr("Further pages"), records_);
  form->addRow(QString(), tables_);
  form->addRow(QString(), places_);
  connect(paper_, &QComboBox::currentIndexChanged, this, &SheetPreview::refresh);
  connect(unit_, &QComboBox::currentIndexChanged, this, &SheetPreview::changeUnit);
  connect(colours_, &QComboBox::currentIndexChanged, this, &SheetPreview::refresh);
  connect(records_, &QCheckBox::toggled, this, &SheetPreview::refresh);
  connect(tables_, &QCheckBox::toggled, this, &SheetPreview::refresh);
  connect(places_, &QCheckBox::toggled, this, &SheetPreview::refresh);
  return box;
}

QWidget* SheetPreview::makeWords() {
  auto* box = new QWidget;
  auto* column = new QVBoxLayout(box);
  question_ = new QLineEdit(QString::fromStdString(given_.question));
  answer_ = new QPlainTextEdit(QString::fromStdString(given_.answer));
  answer_->setFixedHeight(110);
  answer_->document()->setModified(!given_.answer.empty());
  old_ = new QLabel(tr("The interpretation has changed since this answer was written."));
  old_->setWordWrap(true);
  stands_ = new QPushButton(tr("The answer still stands"));
  stands_->setAutoDefault(false);
  auto* draft = new QPushButton(tr("Use the drafted answer"));
  draft->setAutoDefault(false);
  signatory_ = new QLineEdit(QString::fromStdString(given_.signatory));
  for (const auto& [caption, widget] : {std::pair<QString, QWidget*>{tr("Question of the client"), question_},
                                        {tr("Answer"), answer_},
                                        {tr("Licensed professional, name"), signatory_}}) {
    auto* label = new QLabel(caption);
    label->setBuddy(widget);
    column->addWidget(label);
    column->addWidget(widget);
    if (widget == answer_) {
      column->addWidget(old_);
      column->addWidget(stands_);
      column->addWidget(draft);
    }
  }
  connect(question_, &QLineEdit::textEdited, later_, qOverload<>(&QTimer::start));
  connect(signatory_, &QLineEdit::textEdited, later_, qOverload<>(&QTimer::start));
  connect(answer_, &QPlainTextEdit::textChanged, this, [this] {
    answerTouched_ = true;
    later_->start();
  });
  connect(stands_, &QPushButton::clicked, this, [this] {
    answerTouched_ = true;
    refresh();
  });
  connect(draft, &QPushButton::clicked, this, [this] {
    answer_->document()->setModified(false);
    showDraft();
    refresh();
  });
  return box;
}

QWidget* SheetPreview::makeChecklist() {
  auto* box = new QWidget;
  auto* column = new QVBoxLayout(box);
  missing_ = new QLabel;
  checks_ = new QListWidget;
  checks_->setWordWrap(true);
  checks_->setSelectionMode(QAbstractItemView::NoSelection);
  checks_->setHorizontalScrollBarPolicy(Qt::ScrollBarAlwaysOff);
  missing_->setBuddy(checks_);
  column->addWidget(missing_);
  column->addWidget(checks_, 1);
  return box;
}

QWidget* SheetPreview::makeButtons() {
  auto* box = new QWidget;
  auto* row = new QHBoxLayout(box);
  auto* print = new QPushButton(tr("Print…"));
  auto* save = new QPushButton(tr("Save as PDF…"));
  auto* close = new QPushButton(tr("Close"));
  for (QPushButton* button : {print, save, close}) {
    button->setAutoDefault(false);
    row->addWidget(button);
  }
  connect(print, &QPushButton::clicked, this, &SheetPreview::askAndPrint);
  connect(save, &QPushButton::clicked, this, &SheetPreview::askAndSave);
  connect(close, &QPushButton::clicked, this, &QDialog::reject);
  return box;
}

SheetOptions SheetPreview::options() const {
  SheetOptions options = given_;
  options.question = question_->text().trimmed().toStdString();
  options.answer =
      answer_->document()->isModified() ? answer_->toPlainText().simplified().toStdString() : std::string();
  options.answerTo = options.answer.empty() ? std::string()
                     : answerTouched_       ? sheetDraft(survey_, interpretation_)
                                            : given_.answerTo;
  options.signatory = signatory_->text().trimmed().toStdString();
  options.blackAndWhite = colours_->currentIndex() == 1;
  options.records = records_->isChecked();
  options.tables = tables_->isChecked();
  options.places = places_->isChecked();
  return options;
}

QPageSize::PageSizeId SheetPreview::paper() const {
  return static_cast<QPageSize::PageSizeId>(paper_->currentData().toInt());
}

void SheetPreview::setPaper(QPageSize::PageSizeId paper) {
  paper_->setCurrentIndex(paper_->findData(paper));
}

void SheetPreview::setFolder(const QString& folder) {
  folder_ = folder;
}

bool SheetPreview::inFeet() const {
  return survey_.settings.feet;
}

SheetContent SheetPreview::content() const {
  return sheetContent(survey_, interpretation_, options());
}

std::vector<SheetCheck> SheetPreview::checklist() const {
  std::vector<SheetCheck> checks = sheetChecklist(survey_, interpretation_, options());
  SheetCheck room{"Everything on the pages", ""};
  const SheetContent sheet = content();
  if (!sheet.tablePages) {
    const QSizeF size = QPageSize(paper()).size(QPageSize::Millimeter);
    const QStringList leftOut = sheetLeftOut(size, survey_, interpretation_, sheet);
    if (!leftOut.isEmpty()) {
      room.missing = "Two pages leave out " + leftOut.join(QStringLiteral(", ")).toStdString() +
                     "; tick the tables in full to print them.";
    }
  }
  checks.push_back(room);
  return checks;
}

Outcome SheetPreview::print(QPrinter& printer) const {
  return paintSheet(printer, survey_, interpretation_, options());
}

Outcome SheetPreview::savePdf(const QString& path) const {
  return writeSheetPdf(path, survey_, interpretation_, options(), paper());
}

void SheetPreview::refresh() {
  later_->stop();
  setUp(*printer_, paper());
  showAge();
  showChecklist();
  preview_->updatePreview();
}

void SheetPreview::showAge() {
  const bool old = answerIsOld(survey_, interpretation_, options());
  old_->setVisible(old);
  stands_->setVisible(old);
}

void SheetPreview::showChecklist() {
  const std::vector<SheetCheck> checks = checklist();
  checks_->clear();
  for (const SheetCheck& check : checks) {
    const QString item = QString::fromStdString(check.item);
    if (!check.missing.empty()) {
      checks_->addItem(QStringLiteral("○ %1: %2").arg(item, QString::fromStdString(check.missing)));
    }
  }
  const int missing = checks_->count();
  for (const SheetCheck& check : checks) {
    if (check.missing.empty()) {
      checks_->addItem(QStringLiteral("✓ %1").arg(QString::fromStdString(check.item)));
    }
  }
  missing_->setText(missing == 0 ? tr("Nothing that a report should hold is missing")
                                 : tr("Still missing: %1 of %2").arg(missing).arg(checks.size()));
}

// The draft is shown to be edited, and follows the unit until it is.
void SheetPreview::showDraft() {
  if (!answer_->document()->isModified()) {
    const QSignalBlocker quiet(answer_);
    answer_->setPlainText(QString::fromStdString(content().answer));
    answer_->document()->setModified(false);
  }
}

void SheetPreview::changeUnit() {
  survey_.settings.feet = unit_->currentIndex() == 1;
  interpretation_.doubts = findDoubts(survey_, interpretation_);
  showDraft();
  refresh();
}

void SheetPreview::askAndPrint() {
  QPrinter printer(QPrinter::HighResolution);
  printer.setDocName(QString::fromStdString(content().title));
  setUp(printer, paper());
  QPrintDialog dialog(&printer, this);
  if (dialog.exec() == QDialog::Accepted) {
    say(print(printer), tr("Not printed"), tr("Sheet printed"));
  }
}

void SheetPreview::askAndSave() {
  QString path = QFileDialog::getSaveFileName(this, tr("Save the sheet as PDF"), folder_, tr("PDF (*.pdf)"));
  if (path.isEmpty()) {
    return;
  }
  if (!path.endsWith(QLatin1String(".pdf"), Qt::CaseInsensitive)) {
    path += QStringLiteral(".pdf");
  }
  say(savePdf(path), tr("Not written"), tr("Sheet written to %1").arg(path));
}

void SheetPreview::say(const Outcome& outcome, const QString& title, const QString& done) {
  if (outcome) {
    emit written(done);
  } else {
    QMessageBox::warning(this, title, QString::fromStdString(outcome.message()));
  }
}

}  // namespace strikeplate
