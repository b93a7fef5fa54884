#include "app/info_dialog.h"

#include <algorithm>

#include <QDialogButtonBox>
#include <QFormLayout>
#include <QLabel>
#include <QLineEdit>
#include <QPlainTextEdit>
#include <QVBoxLayout>

#include "widgets/typed_numbers.h"

namespace strikeplate {

InfoDialog::InfoDialog(const SurveyInfo& info, QWidget* parent)
    : QDialog(parent), fault_(new QLabel(this)), info_(info), notes_(new QPlainTextEdit(this)) {
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
  form->addRow(tr("Line on the map, &first point"),
               makeMapRow(info.map ? std::optional(info.map->first) : std::nullopt));
  form->addRow(tr("Line on the map, &last point"),
               makeMapRow(info.map ? std::optional(info.map->second) : std::nullopt));
  auto* hint = new QLabel(
      tr("Longitude and latitude in degrees, WGS 84, west and south negative; a local grid has no place here."),
      this);
  hint->setWordWrap(true);
  form->addRow(QString(), hint);
  fault_->setWordWrap(true);
  fault_->hide();
  form->addRow(QString(), fault_);
  auto* buttons = new QDialogButtonBox(QDialogButtonBox::Ok | QDialogButtonBox::Cancel, this);
  connect(buttons, &QDialogButtonBox::accepted, this, &QDialog::accept);
  connect(buttons, &QDialogButtonBox::rejected, this, &QDialog::reject);
  layout->addWidget(buttons);
}

QWidget* InfoDialog::makeMapRow(const std::optional<MapPoint>& point) {
  auto* box = new QWidget(this);
  auto* row = new QHBoxLayout(box);
  row->setContentsMargins(0, 0, 0, 0);
  const QStringList names = {tr("distance along the line, m"), tr("longitude, °"), tr("latitude, °")};
  const std::vector<double> values =
      point ? std::vector<double>{point->x, point->longitude, point->latitude} : std::vector<double>{};
  for (qsizetype i = 0; i < names.size(); ++i) {
    auto* field = new QLineEdit(box);
    field->setPlaceholderText(names[i]);
    field->setAccessibleName(names[i]);
    if (!values.empty()) {
      field->setText(shortNumber(values[static_cast<std::size_t>(i)], i == 0 ? 3 : 8));
    }
    row->addWidget(field);
    mapFields_.push_back(field);
  }
  return box;
}

std::optional<LineOnMap> InfoDialog::map() const {
  std::vector<double> numbers;
  for (const QLineEdit* field : mapFields_) {
    if (const auto number = typedNumber(field->text())) {
      numbers.push_back(*number);
    }
  }
  if (numbers.size() != mapFields_.size()) {
    return std::nullopt;
  }
  return LineOnMap{{numbers[0], numbers[1], numbers[2]}, {numbers[3], numbers[4], numbers[5]}};
}

std::string InfoDialog::mapFault() const {
  const bool empty = std::all_of(mapFields_.begin(), mapFields_.end(),
                                 [](const QLineEdit* field) { return field->text().trimmed().isEmpty(); });
  if (empty) {
    return "";
  }
  const auto typed = map();
  return typed
             ? faultOf(*typed)
             : tr("The line on the map needs a distance, a longitude and a latitude for both points, or none at all.")
                   .toStdString();
}

void InfoDialog::accept() {
  const std::string fault = mapFault();
  fault_->setText(QString::fromStdString(fault));
  fault_->setVisible(!fault.empty());
  if (fault.empty()) {
    QDialog::accept();
  }
}

SurveyInfo InfoDialog::info() const {
  SurveyInfo info = info_;
  for (const auto& [member, field] : fields_) {
    info.*member = field->text().trimmed().toStdString();
  }
  info.map = mapFault().empty() ? map() : std::nullopt;
  info.notes = notes_->toPlainText().trimmed().toStdString();
  return info;
}

}  // namespace strikeplate
