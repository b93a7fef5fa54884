// How the geometry dialog is put together.
#include <algorithm>

#include <QApplication>
#include <QClipboard>
#include <QComboBox>
#include <QDialogButtonBox>
#include <QGridLayout>
#include <QLabel>
#include <QLineEdit>
#include <QPushButton>
#include <QSpinBox>

#include "widgets/geometry_dialog.h"
#include "widgets/place_table.h"

namespace strikeplate {

QWidget* GeometryDialog::buildTables() {
  auto* tables = new QWidget(this);
  auto* grid = new QGridLayout(tables);
  grid->setContentsMargins(0, 0, 0, 0);
  auto* geophoneName = new QLabel(tr("&Geophones"), tables);
  geophoneName->setBuddy(geophones_);
  auto* shotName = new QLabel(tr("&Shots (elevation of the ground; depth below it)"), tables);
  shotName->setBuddy(shots_);
  geophones_->setAccessibleName(tr("Geophones"));
  shots_->setAccessibleName(tr("Shots"));
  grid->addWidget(geophoneName, 0, 0);
  grid->addWidget(shotName, 0, 1);
  grid->addWidget(geophones_, 1, 0);
  grid->addWidget(shots_, 1, 1);
  grid->setColumnStretch(0, 2);
  grid->setColumnStretch(1, 3);
  return tables;
}

QWidget* GeometryDialog::buildRule() {
  auto* rule = new QWidget(this);
  auto* row = new QHBoxLayout(rule);
  row->setContentsMargins(0, 0, 0, 0);
  const auto add = [&](const QString& name, QWidget* field) {
    auto* label = new QLabel(name, rule);
    label->setBuddy(field);
    row->addWidget(label);
    row->addWidget(field);
  };
  target_->addItems({tr("geophone positions"), tr("geophone elevations"), tr("shot positions"), tr("shot elevations"),
                     tr("shot depths")});
  first_->setMaximumWidth(80);
  spacing_->setMaximumWidth(80);
  add(tr("F&ill"), target_);
  add(tr("fi&rst"), first_);
  add(tr("s&pacing"), spacing_);
  add(tr("&from number"), from_);
  add(tr("&count"), count_);
  auto* fill = new QPushButton(tr("Fi&ll in"), rule);
  fill->setAutoDefault(false);
  row->addWidget(fill);
  row->addStretch();
  const auto limit = [this] {
    const PlaceTable& table = target_->currentIndex() < kShotX ? *geophones_ : *shots_;
    from_->setRange(1, std::max(table.rowCount(), 1));
    count_->setRange(1, std::max(table.rowCount(), 1));
    count_->setValue(table.rowCount());
  };
  connect(target_, &QComboBox::currentIndexChanged, this, limit);
  connect(fill, &QPushButton::clicked, this, &GeometryDialog::fillByRule);
  connect(first_, &QLineEdit::returnPressed, this, &GeometryDialog::fillByRule);
  connect(spacing_, &QLineEdit::returnPressed, this, &GeometryDialog::fillByRule);
  connect(geophones_->model(), &QAbstractItemModel::rowsInserted, this, limit);
  return rule;
}

QWidget* GeometryDialog::buildFoot() {
  auto* foot = new QWidget(this);
  auto* row = new QHBoxLayout(foot);
  row->setContentsMargins(0, 0, 0, 0);
  unit_->addItems({tr("metres"), tr("feet")});
  unit_->setCurrentIndex(survey_.settings.feet ? 1 : 0);
  auto* unitName = new QLabel(tr("Lengths i&n"), foot);
  unitName->setBuddy(unit_);
  row->addWidget(unitName);
  row->addWidget(unit_);
  auto* paste = new QPushButton(tr("P&aste"), foot);
  auto* reverse = new QPushButton(tr("Re&verse line"), foot);
  paste->setToolTip(tr("Cells of a spreadsheet, into the table and from the cell that was chosen last (Ctrl+V)"));
  reverse->setToolTip(tr("Counts the line from its other end; boreholes turn round with it"));
  for (QPushButton* button : {paste, reverse}) {
    button->setAutoDefault(false);
    button->setFocusPolicy(Qt::TabFocus);
    row->addWidget(button);
  }
  row->addWidget(notice_, 1);
  auto* buttons = new QDialogButtonBox(QDialogButtonBox::Ok | QDialogButtonBox::Cancel, foot);
  ok_ = buttons->button(QDialogButtonBox::Ok);
  row->addWidget(buttons);
  const auto setUnits = [this](int index) {
    geophones_->setUnits({index == 1});
    shots_->setUnits({index == 1});
  };
  setUnits(unit_->currentIndex());
  connect(unit_, &QComboBox::currentIndexChanged, this, setUnits);
  connect(paste, &QPushButton::clicked, this,
          [this] { (shots_->hasFocus() ? shots_ : geophones_)->paste(QApplication::clipboard()->text()); });
  connect(reverse, &QPushButton::clicked, this, [this] {
    const LinePlaces turned = reversed(places());
    boreholes_ = turned.boreholes;
    showPlaces(turned);
  });
  connect(buttons, &QDialogButtonBox::accepted, this, &GeometryDialog::take);
  connect(buttons, &QDialogButtonBox::rejected, this, &QDialog::reject);
  return foot;
}

}  // namespace strikeplate
