#include "app/blows_dialog.h"

#include <algorithm>

#include <QDialogButtonBox>
#include <QHeaderView>
#include <QLabel>
#include <QPushButton>
#include <QTreeWidget>
#include <QVBoxLayout>

#include "core/base/file_names.h"
#include "core/base/numbers.h"
#include "core/survey/doubts.h"

namespace strikeplate {
namespace {

enum Column { kRecord, kLag, kSimilarity, kColumns };

constexpr double kLateTrigger = 1.5e-3;  // s, as alignBlows names it
constexpr double kUnlike = 0.6;          // correlation, as alignBlows asks for

QString remarkOn(const Blow& blow) {
  if (blow.similarity < kUnlike) {
    return BlowsDialog::tr("unlike the others");
  }
  if (blow.lag < -kLateTrigger) {
    return BlowsDialog::tr("its trigger came late");
  }
  return blow.lag > kLateTrigger ? BlowsDialog::tr("its trigger came early") : QString();
}

QTreeWidgetItem* blowItem(const Survey& survey, const Blow& blow, bool only) {
  const ShotRecord& record = *survey.records[static_cast<std::size_t>(blow.record)];
  QString lag = QString::fromStdString(fixed(1e3 * blow.lag, 2));
  if (const QString remark = remarkOn(blow); !remark.isEmpty()) {
    lag += "  " + remark;
  }
  auto* item =
      new QTreeWidgetItem({QString::fromStdString(lastPart(record.file)), only ? BlowsDialog::tr("single blow") : lag,
                           only ? QString() : QString::fromStdString(fixed(blow.similarity, 3))});
  item->setToolTip(kRecord, QString::fromStdString(record.file));
  item->setCheckState(kRecord, blow.used ? Qt::Checked : Qt::Unchecked);
  return item;
}

}  // namespace

BlowsDialog::BlowsDialog(const Survey& survey, QWidget* parent)
    : QDialog(parent), survey_(survey), tree_(new QTreeWidget(this)), lack_(new QLabel(this)) {
  setWindowTitle(tr("Blows and stack"));
  resize(620, 480);
  auto* text =
      new QLabel(tr("Blows at one shot point are moved by their lags and averaged. A lag below zero means that "
                    "the trigger came late. Clear the tick to leave a blow out of the stack; its record and "
                    "the picks stay."),
                 this);
  text->setWordWrap(true);
  tree_->setColumnCount(kColumns);
  tree_->setHeaderLabels({tr("Shot and records"), tr("Lag (ms)"), tr("Similarity (-1 to 1)")});
  tree_->setAccessibleName(tr("Blows of every shot"));
  for (std::size_t s = 0; s < survey_.shots.size(); ++s) {
    auto* shot = new QTreeWidgetItem(tree_, {QString::fromStdString(shotName(survey_, static_cast<int>(s)))});
    shot->setFlags(Qt::ItemIsEnabled);
    for (const Blow& blow : survey_.shots[s].blows) {
      shot->addChild(blowItem(survey_, blow, survey_.shots[s].blows.size() == 1));
    }
    shot->setExpanded(true);
  }
  for (int column = 0; column < kColumns; ++column) {
    tree_->resizeColumnToContents(column);
  }
  lack_->setWordWrap(true);
  auto* buttons = new QDialogButtonBox(QDialogButtonBox::Ok | QDialogButtonBox::Cancel, this);
  ok_ = buttons->button(QDialogButtonBox::Ok);
  connect(tree_, &QTreeWidget::itemChanged, this, &BlowsDialog::check);
  connect(buttons, &QDialogButtonBox::accepted, this, &QDialog::accept);
  connect(buttons, &QDialogButtonBox::rejected, this, &QDialog::reject);
  auto* layout = new QVBoxLayout(this);
  layout->addWidget(text);
  layout->addWidget(tree_, 1);
  layout->addWidget(lack_);
  layout->addWidget(buttons);
}

std::vector<std::vector<bool>> BlowsDialog::chosen() const {
  std::vector<std::vector<bool>> chosen;
  for (int s = 0; s < tree_->topLevelItemCount(); ++s) {
    const QTreeWidgetItem* shot = tree_->topLevelItem(s);
    chosen.emplace_back();
    for (int b = 0; b < shot->childCount(); ++b) {
      chosen.back().push_back(shot->child(b)->checkState(kRecord) == Qt::Checked);
    }
  }
  return chosen;
}

Edit BlowsDialog::edit() const {
  return edits::useBlows(survey_, chosen());
}

void BlowsDialog::check() {
  QString lack;
  const auto all = chosen();
  for (std::size_t s = 0; s < all.size() && lack.isEmpty(); ++s) {
    if (!all[s].empty() && std::find(all[s].begin(), all[s].end(), true) == all[s].end()) {
      lack = tr("%1 has no blow left; keep at least one, or mark its traces as dead in the record.")
                 .arg(QString::fromStdString(shotName(survey_, static_cast<int>(s))));
    }
  }
  lack_->setText(lack);
  ok_->setEnabled(lack.isEmpty());
}

}  // namespace strikeplate
