#include "app/info_dialog.h"

#include <QDialogButtonBox>
#include <QFormLayout>
#include <QLineEdit>
#include <QPlainTextEdit>
#include <QVBoxLayout>

namespace strikeplate {

InfoDialog::InfoDialog(const SurveyInfo& info, QWidget* parent)
    : QDialog(parent), info_(info), notes_(new QPlainTextEdit(this)) {
  setWindowTitle(tr("Job, client and crew"));
  auto* layout = new QVBoxLayout(this);
  auto* form = new QFormLayout;
  layout->addLayout(form);
  const std::vector<std::pair<std::string SurveyInfo::*, QString>> rows = {
      {&SurveyInfo::title, tr("&Title")},
      {&SurveyInfo::client, tr("&Client")},
      {&SurveyInfo::site, tr("&Site")},
      {&SurveyInfo::line, tr("&Line")},
      {&SurveyInfo::date, tr("&Date")},
      {&SurveyInfo::crew, tr("C&rew")},
      {&SurveyInfo::observer, tr("&Observer")},
      {&SurveyInfo::source, tr("So&urce")},
      {&SurveyInfo::geophoneType, tr("&Geophones")},
      {&SurveyInfo::recorder, tr("Recorde&r")},
      {&SurveyInfo::weather, tr("&Weather and ground")},
      {&SurveyInfo::datum, tr("Elevation datu&m")},
  };
  for (const auto& [member, label] : rows) {
    auto* field = new QLineEdit(QString::fromStdString(info.*member), this);
    field->setMinimumWidth(360);
    form->addRow(label, field);
    fields_.emplace_back(member, field);
  }
  notes_->setPlainText(QString::fromStdString(info.notes));
  notes_->setTabChangesFocus(true);
  notes_->setMaximumHeight(90);
  form->addRow(tr("&Notes"), notes_);
  auto* buttons = new QDialogButtonBox(QDialogButtonBox::Ok | QDialogButtonBox::Cancel, this);
  connect(buttons, &QDialogButtonBox::accepted, this, &QDialog::accept);
  connect(buttons, &QDialogButtonBox::rejected, this, &QDialog::reject);
  layout->addWidget(buttons);
}

SurveyInfo InfoDialog::info() const {
  SurveyInfo info = info_;
  for (const auto& [member, field] : fields_) {
    info.*member = field->text().trimmed().toStdString();
  }
  info.notes = notes_->toPlainText().trimmed().toStdString();
  return info;
}

}  // namespace strikeplate
