#include "app/times_dialog.h"

#include <algorithm>

#include <QComboBox>
#include <QDialogButtonBox>
#include <QFormLayout>
#include <QHeaderView>
#include <QLabel>
#include <QPushButton>
#include <QSettings>
#include <QSignalBlocker>
#include <QTableWidget>
#include <QVBoxLayout>

#include "core/base/file_names.h"

namespace strikeplate {
namespace {

constexpr int kRowsShown = 50;
constexpr int kNothing = -1;

/// Where the settings keep the choice for tables with these columns.
QString keyOf(const CsvTable& table) {
  QStringList names;
  for (const std::string& column : table.columns) {
    names << QString::fromStdString(column).toLower().trimmed();
  }
  return "timesColumns/" + names.join("|").replace('/', '_').replace('\\', '_');
}

QStringList toWords(const TimesColumns& columns) {
  QStringList words = {columns.feet ? "ft" : "m", columns.milliseconds ? "ms" : "s"};
  for (const auto& field : columns.fields) {
    words << QString::number(field ? static_cast<int>(*field) : kNothing);
  }
  return words;
}

TimesColumns fromWords(const QStringList& words) {
  TimesColumns columns;
  columns.feet = words[0] == "ft";
  columns.milliseconds = words[1] == "ms";
  for (const QString& word : words.mid(2)) {
    const int number = word.toInt();
    const bool known = number >= 0 && number <= static_cast<int>(TimesField::Origin);
    columns.fields.push_back(known ? std::optional(static_cast<TimesField>(number)) : std::nullopt);
  }
  return columns;
}

}  // namespace

TimesDialog::TimesDialog(const CsvTable& table, QWidget* parent)
    : QDialog(parent),
      table_(table),
      lengths_(new QComboBox(this)),
      times_(new QComboBox(this)),
      outcome_(new QLabel(this)) {
  setWindowTitle(tr("Travel times from %1").arg(QString::fromStdString(lastPart(table.name))));
  resize(860, 520);
  const std::pair<QString, int> kMeanings[] = {
      {tr("not used"), kNothing},
      {tr("position of the shot"), static_cast<int>(TimesField::ShotX)},
      {tr("position of the geophone"), static_cast<int>(TimesField::GeophoneX)},
      {tr("offset from the shot"), static_cast<int>(TimesField::Offset)},
      {tr("time of the first break"), static_cast<int>(TimesField::Time)},
      {tr("sigma of the time"), static_cast<int>(TimesField::Sigma)},
      {tr("layer"), static_cast<int>(TimesField::Layer)},
      {tr("elevation at the shot"), static_cast<int>(TimesField::ShotElevation)},
      {tr("elevation at the geophone"), static_cast<int>(TimesField::GeophoneElevation)},
      {tr("depth of the shot"), static_cast<int>(TimesField::ShotDepth)},
      {tr("trigger correction"), static_cast<int>(TimesField::TriggerCorrection)},
      {tr("how the pick came about"), static_cast<int>(TimesField::Origin)}};

  auto* grid = new QTableWidget(this);
  const int columns = static_cast<int>(table.columns.size());
  const int rows = std::min(kRowsShown, static_cast<int>(table.rows.size()));
  grid->setColumnCount(columns);
  grid->setRowCount(rows + 1);
  grid->setAccessibleName(tr("First rows of the table; the row on top says what each column holds"));
  QStringList headers;
  for (int c = 0; c < columns; ++c) {
    headers << QString::fromStdString(table.columns[static_cast<std::size_t>(c)]);
    auto* field = new QComboBox;
    for (const auto& [text, value] : kMeanings) {
      field->addItem(text, value);
    }
    field->setAccessibleName(tr("Column %1 holds").arg(headers.back()));
    grid->setCellWidget(0, c, field);
    fields_.push_back(field);
    connect(field, &QComboBox::currentIndexChanged, this, &TimesDialog::showOutcome);
    for (int r = 0; r < rows; ++r) {
      auto* cell = new QTableWidgetItem(
          QString::fromStdString(table.rows[static_cast<std::size_t>(r)][static_cast<std::size_t>(c)]));
      cell->setFlags(Qt::ItemIsEnabled);
      grid->setItem(r + 1, c, cell);
    }
  }
  QStringList numbers = {tr("holds")};
  for (int r = 0; r < rows; ++r) {
    numbers << QString::number(table.lines[static_cast<std::size_t>(r)]);
  }
  grid->setHorizontalHeaderLabels(headers);
  grid->setVerticalHeaderLabels(numbers);
  grid->resizeColumnsToContents();
  for (int c = 0; c < columns; ++c) {
    grid->setColumnWidth(c, std::max(grid->columnWidth(c), fields_[static_cast<std::size_t>(c)]->sizeHint().width()));
  }

  lengths_->addItems({tr("metres"), tr("feet")});
  times_->addItems({tr("seconds"), tr("milliseconds")});
  connect(lengths_, &QComboBox::currentIndexChanged, this, &TimesDialog::showOutcome);
  connect(times_, &QComboBox::currentIndexChanged, this, &TimesDialog::showOutcome);
  outcome_->setWordWrap(true);
  auto* units = new QFormLayout;
  units->addRow(tr("&Lengths in"), lengths_);
  units->addRow(tr("&Times in"), times_);
  auto* buttons = new QDialogButtonBox(QDialogButtonBox::Ok | QDialogButtonBox::Cancel, this);
  ok_ = buttons->button(QDialogButtonBox::Ok);
  ok_->setText(tr("&Read"));
  connect(buttons, &QDialogButtonBox::accepted, this, &TimesDialog::accept);
  connect(buttons, &QDialogButtonBox::rejected, this, &QDialog::reject);
  auto* layout = new QVBoxLayout(this);
  layout->addWidget(grid, 1);
  layout->addLayout(units);
  layout->addWidget(outcome_);
  layout->addWidget(buttons);

  const QStringList remembered = QSettings().value(keyOf(table)).toStringList();
  choose(remembered.size() == columns + 2 ? fromWords(remembered) : guessTimesColumns(table));
}

TimesColumns TimesDialog::columns() const {
  TimesColumns columns;
  columns.feet = lengths_->currentIndex() == 1;
  columns.milliseconds = times_->currentIndex() == 1;
  for (const QComboBox* field : fields_) {
    const int value = field->currentData().toInt();
    columns.fields.push_back(value == kNothing ? std::nullopt : std::optional(static_cast<TimesField>(value)));
  }
  return columns;
}

void TimesDialog::choose(const TimesColumns& columns) {
  for (std::size_t c = 0; c < fields_.size(); ++c) {
    const QSignalBlocker quiet(fields_[c]);
    const auto& field = columns.fields[c];
    fields_[c]->setCurrentIndex(fields_[c]->findData(field ? static_cast<int>(*field) : kNothing));
  }
  const QSignalBlocker quietLengths(lengths_);
  const QSignalBlocker quietTimes(times_);
  lengths_->setCurrentIndex(columns.feet ? 1 : 0);
  times_->setCurrentIndex(columns.milliseconds ? 1 : 0);
  showOutcome();
}

void TimesDialog::showOutcome() {
  const Result<Survey> read = survey();
  ok_->setEnabled(read.ok());
  if (!read) {
    outcome_->setText(QString::fromStdString(read.message()));
    return;
  }
  int picks = 0;
  double last = 0.0;
  for (const Shot& shot : read->shots) {
    for (const ShotTrace& trace : shot.traces) {
      picks += trace.pick ? 1 : 0;
      last = std::max(last, trace.pick ? trace.pick->time : 0.0);
    }
  }
  const auto counted = [](int count, const QString& one, const QString& many) {
    return QString::number(count) + " " + (count == 1 ? one : many);
  };
  const int shots = static_cast<int>(read->shots.size());
  const int geophones = static_cast<int>(read->geophones.size());
  outcome_->setText(tr("%1 of %2 at %3, from %4 to %5 m, the latest %6 ms.")
                        .arg(counted(picks, tr("first break"), tr("first breaks")),
                             counted(shots, tr("shot"), tr("shots")),
                             counted(geophones, tr("geophone"), tr("geophones")))
                        .arg(read->geophones.front().x, 0, 'f', 1)
                        .arg(read->geophones.back().x, 0, 'f', 1)
                        .arg(1e3 * last, 0, 'f', 1) +
                    (read->remarks.size() > 1 ? " " + QString::fromStdString(read->remarks.front()) : QString()));
}

void TimesDialog::accept() {
  QSettings().setValue(keyOf(table_), toWords(columns()));
  QDialog::accept();
}

}  // namespace strikeplate
