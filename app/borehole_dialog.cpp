#include "app/borehole_dialog.h"

#include <QDialogButtonBox>
#include <QHeaderView>
#include <QLabel>
#include <QPushButton>
#include <QTableWidget>
#include <QVBoxLayout>

#include "core/base/numbers.h"

namespace strikeplate {
namespace {

enum Column { kName, kX, kLayer, kDepth, kSigma, kUsed, kColumns };

/// A number typed with decimal point or comma.
std::optional<double> typedNumber(const QTableWidgetItem* item) {
  return item == nullptr ? std::nullopt : parseNumber(item->text().replace(',', '.').toStdString());
}

}  // namespace

BoreholeDialog::BoreholeDialog(const Survey& survey, QWidget* parent)
    : QDialog(parent),
      units_{survey.settings.feet},
      boreholes_(survey.boreholes),
      table_(new QTableWidget(0, kColumns, this)),
      problem_(new QLabel(this)) {
  setWindowTitle(tr("Boreholes"));
  resize(680, 320);
  const QString unit = QString::fromStdString(units_.lengthUnit());
  table_->setHorizontalHeaderLabels({tr("Name"), tr("Position (%1)").arg(unit), tr("Top of layer"),
                                     tr("Depth (%1)").arg(unit), tr("Sigma (%1)").arg(unit), tr("Used in section")});
  table_->horizontalHeader()->setSectionResizeMode(QHeaderView::Stretch);
  table_->setAccessibleName(tr("Boreholes"));
  auto* layout = new QVBoxLayout(this);
  layout->addWidget(table_);
  problem_->setWordWrap(true);
  layout->addWidget(problem_);
  auto* buttons = new QDialogButtonBox(QDialogButtonBox::Ok | QDialogButtonBox::Cancel, this);
  auto* more = buttons->addButton(tr("&Add"), QDialogButtonBox::ActionRole);
  auto* fewer = buttons->addButton(tr("&Remove"), QDialogButtonBox::ActionRole);
  layout->addWidget(buttons);
  const double middle = survey.geophones.empty() ? 0.0 : survey.geophones[survey.geophones.size() / 2].x;
  connect(more, &QPushButton::clicked, this, [this, middle] {
    Borehole borehole;
    borehole.x = middle;
    borehole.depth = 5.0;
    borehole.name = "BH" + std::to_string(table_->rowCount() + 1);
    addRow(borehole);
  });
  connect(fewer, &QPushButton::clicked, this, [this] { table_->removeRow(table_->currentRow()); });
  connect(buttons, &QDialogButtonBox::accepted, this, &BoreholeDialog::takeRows);
  connect(buttons, &QDialogButtonBox::rejected, this, &QDialog::reject);
  for (const Borehole& borehole : boreholes_) {
    addRow(borehole);
  }
}

void BoreholeDialog::addRow(const Borehole& borehole) {
  const int row = table_->rowCount();
  table_->insertRow(row);
  const auto number = [this](double metres) { return QString::fromStdString(fixed(units_.fromMetres(metres), 2)); };
  table_->setItem(row, kName, new QTableWidgetItem(QString::fromStdString(borehole.name)));
  table_->setItem(row, kX, new QTableWidgetItem(number(borehole.x)));
  table_->setItem(row, kLayer, new QTableWidgetItem(QString::number(borehole.layer)));
  table_->setItem(row, kDepth, new QTableWidgetItem(number(borehole.depth)));
  table_->setItem(row, kSigma, new QTableWidgetItem(number(borehole.sigma)));
  auto* used = new QTableWidgetItem;
  used->setFlags(Qt::ItemIsUserCheckable | Qt::ItemIsEnabled | Qt::ItemIsSelectable);
  used->setCheckState(borehole.used ? Qt::Checked : Qt::Unchecked);
  table_->setItem(row, kUsed, used);
}

void BoreholeDialog::takeRows() {
  std::vector<Borehole> rows;
  for (int row = 0; row < table_->rowCount(); ++row) {
    const auto x = typedNumber(table_->item(row, kX));
    const auto layer = typedNumber(table_->item(row, kLayer));
    const auto depth = typedNumber(table_->item(row, kDepth));
    const auto sigma = typedNumber(table_->item(row, kSigma));
    if (!x || !layer || *layer < 2 || *layer > 6 || *layer != static_cast<int>(*layer) || !depth || !(*depth > 0.0) ||
        !sigma || !(*sigma > 0.0)) {
      problem_->setText(
          tr("Row %1: position, depth and sigma are numbers, depth and sigma above zero, the layer a whole "
             "number from 2 to 6.")
              .arg(row + 1));
      return;
    }
    Borehole borehole;
    borehole.name = table_->item(row, kName)->text().trimmed().toStdString();
    borehole.x = units_.toMetres(*x);
    borehole.layer = static_cast<int>(*layer);
    borehole.depth = units_.toMetres(*depth);
    borehole.sigma = units_.toMetres(*sigma);
    borehole.used = table_->item(row, kUsed)->checkState() == Qt::Checked;
    rows.push_back(borehole);
  }
  boreholes_ = rows;
  accept();
}

}  // namespace strikeplate
