#include "app/trigger_dialog.h"

#include <cmath>

#include <QDialogButtonBox>
#include <QHeaderView>
#include <QLabel>
#include <QPushButton>
#include <QTableWidget>
#include <QVBoxLayout>

#include "core/base/numbers.h"
#include "core/survey/doubts.h"

namespace strikeplate {
namespace {

enum Column { kShot, kSuggested, kSigma, kCorrection, kColumns };

QTableWidgetItem* fixedItem(const QString& text) {
  auto* item = new QTableWidgetItem(text);
  item->setFlags(Qt::ItemIsEnabled | Qt::ItemIsSelectable);
  return item;
}

QString ms(double seconds) {
  return QString::fromStdString(fixed(1e3 * seconds, 2));
}

}  // namespace

TriggerDialog::TriggerDialog(const Scene& scene, QWidget* parent)
    : QDialog(parent), scene_(scene), table_(new QTableWidget(0, kColumns, this)) {
  setWindowTitle(tr("Trigger corrections"));
  resize(640, 360);
  auto* layout = new QVBoxLayout(this);
  auto* text =
      new QLabel(tr("The correction is added to the recorder's times. What the times suggest comes from the direct "
                    "branches and from reciprocal times; it is small against its sigma where nothing is wrong."),
                 this);
  text->setWordWrap(true);
  layout->addWidget(text);
  table_->setHorizontalHeaderLabels({tr("Shot"), tr("Suggested (ms)"), tr("Sigma (ms)"), tr("Correction (ms)")});
  table_->horizontalHeader()->setSectionResizeMode(QHeaderView::Stretch);
  table_->verticalHeader()->hide();
  table_->setAccessibleName(tr("Trigger corrections"));
  const Survey& survey = *scene_.survey;
  for (std::size_t s = 0; s < survey.shots.size(); ++s) {
    const int row = table_->rowCount();
    table_->insertRow(row);
    table_->setItem(row, kShot, fixedItem(QString::fromStdString(shotName(survey, static_cast<int>(s)))));
    Estimate suggested = Estimate::none("");
    if (scene_.interpretation && s < scene_.interpretation->triggerCorrections.size()) {
      suggested = scene_.interpretation->triggerCorrections[s];
    }
    // What is suggested comes on top of what is applied already.
    table_->setItem(row, kSuggested, fixedItem(ms(suggested.value + survey.shots[s].triggerCorrection)));
    table_->setItem(row, kSigma, fixedItem(ms(suggested.sigma)));
    table_->setItem(row, kCorrection, new QTableWidgetItem(ms(survey.shots[s].triggerCorrection)));
  }
  layout->addWidget(table_);
  auto* buttons = new QDialogButtonBox(QDialogButtonBox::Ok | QDialogButtonBox::Cancel, this);
  auto* take = buttons->addButton(tr("&Take what is beyond three sigmas"), QDialogButtonBox::ActionRole);
  connect(take, &QPushButton::clicked, this, &TriggerDialog::takeSuggestions);
  connect(buttons, &QDialogButtonBox::accepted, this, &QDialog::accept);
  connect(buttons, &QDialogButtonBox::rejected, this, &QDialog::reject);
  layout->addWidget(buttons);
}

void TriggerDialog::takeSuggestions() {
  for (int row = 0; row < table_->rowCount(); ++row) {
    const auto s = static_cast<std::size_t>(row);
    if (!scene_.interpretation || s >= scene_.interpretation->triggerCorrections.size()) {
      continue;
    }
    const Estimate& suggested = scene_.interpretation->triggerCorrections[s];
    if (suggested.determined && std::abs(suggested.value) > 3.0 * suggested.sigma) {
      table_->item(row, kCorrection)->setText(table_->item(row, kSuggested)->text());
    }
  }
}

Edit TriggerDialog::edit() const {
  Edit all{"Change trigger corrections", {}};
  for (int row = 0; row < table_->rowCount(); ++row) {
    const auto typed = parseNumber(table_->item(row, kCorrection)->text().replace(',', '.').toStdString());
    const double present = scene_.survey->shots[static_cast<std::size_t>(row)].triggerCorrection;
    if (typed && ms(*typed * 1e-3) != ms(present)) {
      Edit one = edits::setTriggerCorrection(*scene_.survey, row, *typed * 1e-3);
      all.changes.insert(all.changes.end(), one.changes.begin(), one.changes.end());
    }
  }
  return all;
}

}  // namespace strikeplate
