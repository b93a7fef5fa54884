#include "widgets/geometry_dialog.h"

#include <cmath>

#include <QComboBox>
#include <QFileInfo>
#include <QKeyEvent>
#include <QLabel>
#include <QLineEdit>
#include <QListWidget>
#include <QPushButton>
#include <QSpinBox>
#include <QVBoxLayout>

#include "core/line/geometry_checks.h"
#include "widgets/place_table.h"
#include "widgets/typed_numbers.h"

namespace strikeplate {
namespace {

QString recordNames(const Survey& survey, const Shot& shot) {
  QStringList names;
  for (const Blow& blow : shot.blows) {
    const auto& record = survey.records[static_cast<std::size_t>(blow.record)];
    names << QFileInfo(QString::fromStdString(record->file)).fileName();
  }
  return names.join(", ");
}

}  // namespace

GeometryDialog::GeometryDialog(const Survey& survey, QWidget* parent)
    : QDialog(parent),
      survey_(survey),
      boreholes_(survey.boreholes),
      geophones_(new PlaceTable({tr("Position"), tr("Elevation")}, {}, this)),
      shots_(new PlaceTable({tr("Position"), tr("Elevation"), tr("Depth")}, tr("Records"), this)),
      chosen_(geophones_),
      target_(new QComboBox(this)),
      first_(new QLineEdit("0", this)),
      spacing_(new QLineEdit("1", this)),
      from_(new QSpinBox(this)),
      count_(new QSpinBox(this)),
      unit_(new QComboBox(this)),
      sentences_(new QListWidget(this)),
      notice_(new QLabel(this)),
      ok_(nullptr) {
  setWindowTitle(tr("Geometry of the line"));
  resize(820, 620);
  auto* layout = new QVBoxLayout(this);
  layout->addWidget(buildTables(), 1);
  layout->addWidget(buildRule());
  sentences_->setWordWrap(true);
  sentences_->setMaximumHeight(6 * fontMetrics().height());
  sentences_->setSelectionMode(QAbstractItemView::NoSelection);
  sentences_->setAccessibleName(tr("Checks"));
  layout->addWidget(sentences_);
  layout->addWidget(buildFoot());
  showPlaces(placesOf(survey));
  QStringList records;
  for (const Shot& shot : survey.shots) {
    records << recordNames(survey, shot);
  }
  shots_->setNotes(records);
  for (PlaceTable* table : {geophones_, shots_}) {
    connect(table, &PlaceTable::valuesChanged, this, &GeometryDialog::check);
    connect(table, &PlaceTable::notice, notice_, &QLabel::setText);
    connect(table, &PlaceTable::currentCellChanged, this, [this, table] { chosen_ = table; });
    connect(table, &PlaceTable::cellPressed, this, [this, table] { chosen_ = table; });
  }
  check();
}

void GeometryDialog::showPlaces(const LinePlaces& places) {
  std::vector<std::vector<double>> rows;
  for (const Geophone& geophone : places.geophones) {
    rows.push_back({geophone.x, geophone.elevation});
  }
  geophones_->setValues(rows);
  rows.clear();
  for (const ShotPoint& shot : places.shots) {
    rows.push_back({shot.x, shot.elevation, shot.depth});
  }
  shots_->setValues(rows);
}

LinePlaces GeometryDialog::places() const {
  LinePlaces places;
  for (int row = 0; row < geophones_->rowCount(); ++row) {
    places.geophones.push_back({geophones_->value(row, 0), geophones_->value(row, 1)});
  }
  for (int row = 0; row < shots_->rowCount(); ++row) {
    places.shots.push_back({shots_->value(row, 0), shots_->value(row, 1), shots_->value(row, 2)});
  }
  places.boreholes = boreholes_;
  return places;
}

void GeometryDialog::fillByRule() {
  const auto first = typedNumber(first_->text());
  const auto spacing = typedNumber(spacing_->text());
  if (!first || !spacing) {
    notice_->setText(tr("First and spacing have to be numbers."));
    return;
  }
  notice_->clear();
  const Units units{unit_->currentIndex() == 1};
  const int target = target_->currentIndex();
  PlaceTable& table = target < kShotX ? *geophones_ : *shots_;
  table.fill(target < kShotX ? target : target - kShotX, from_->value() - 1, count_->value(), units.toMetres(*first),
             units.toMetres(*spacing));
}

void GeometryDialog::say(const QString& sentence, bool grave) {
  auto* item = new QListWidgetItem(sentence, sentences_);
  QFont font = item->font();
  font.setBold(grave);
  item->setFont(font);
}

// True when every cell is a number that makes sense; says which are not.
bool GeometryDialog::checkCells() {
  const std::size_t before = static_cast<std::size_t>(sentences_->count());
  const auto all = [this](const PlaceTable& table, const QString& what) {
    for (int row = 0; row < table.rowCount(); ++row) {
      for (int column = 0; column < table.lengthColumns(); ++column) {
        if (!std::isfinite(table.value(row, column))) {
          say(tr("%1 %2: \"%3\" is no number.").arg(what).arg(row + 1).arg(table.item(row, column)->text()), true);
        } else if (column == 2 && table.value(row, column) < 0.0) {
          say(tr("%1 %2: a depth below the ground cannot be negative.").arg(what).arg(row + 1), true);
        }
      }
    }
  };
  all(*geophones_, tr("Geophone"));
  all(*shots_, tr("Shot"));
  return static_cast<std::size_t>(sentences_->count()) == before;
}

void GeometryDialog::check() {
  sentences_->clear();
  bool usable = checkCells();
  if (usable) {
    const LinePlaces now = places();
    const auto edit = placesEdit(survey_, now, {});
    usable = edit.ok();
    if (!usable) {
      say(QString::fromStdString(edit.message()), true);
    } else if (!edit->changes.empty() && std::holds_alternative<ContentChange>(edit->changes.front())) {
      say(tr("The order along the line changes; geophones and shots will be numbered anew."), false);
    }
    for (const std::string& sentence : checkGeometry(now.geophones, now.shots)) {
      if (usable || sentence.rfind("Two geophones", 0) != 0) {
        say(QString::fromStdString(sentence), false);
      }
    }
  }
  if (sentences_->count() == 0) {
    say(tr("Nothing looks wrong."), false);
  }
  ok_->setEnabled(usable);
}

void GeometryDialog::keyPressEvent(QKeyEvent* event) {
  const bool enter = event->key() == Qt::Key_Return || event->key() == Qt::Key_Enter;
  if (!enter) {
    QDialog::keyPressEvent(event);
  }
}

void GeometryDialog::take() {
  auto edit = placesEdit(survey_, places(), tr("Change the geometry").toStdString());
  if (edit) {
    edit_ = std::move(*edit);
    accept();
  }
}

}  // namespace strikeplate
