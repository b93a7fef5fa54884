#include "widgets/doubts_list.h"

#include <QHBoxLayout>
#include <QHeaderView>
#include <QLabel>
#include <QLineEdit>
#include <QScrollArea>
#include <QTreeWidget>
#include <QVBoxLayout>

#include "core/survey/doubts.h"
#include "widgets/doubt_groups.h"

namespace strikeplate {
namespace {

/// More than this many of one kind are put into one line that opens.
constexpr std::size_t kFewEnough = 3;
constexpr int kIndex = Qt::UserRole;

QString text(const std::string& words) {
  return QString::fromStdString(words);
}

QTreeWidgetItem* itemOf(const Survey& survey, const Doubt& doubt, std::size_t index, int height) {
  const bool answered = !answerTo(survey, doubt).empty();
  auto* item = new QTreeWidgetItem({(answered ? QString("\u2713 ") : QString()) + text(doubt.says)});
  item->setSizeHint(0, QSize(0, height));
  item->setData(0, kIndex, static_cast<int>(index));
  item->setToolTip(0, text(doubt.says));
  return item;
}

}  // namespace

DoubtsList::DoubtsList(QWidget* parent)
    : QWidget(parent), tree_(new QTreeWidget(this)), detail_(new QLabel(this)), answer_(new QLineEdit(this)) {
  tree_->setHeaderHidden(true);
  tree_->setFrameShape(QFrame::NoFrame);
  tree_->setIndentation(14);
  tree_->setUniformRowHeights(true);
  tree_->setTextElideMode(Qt::ElideRight);
  tree_->setAccessibleName(tr("Doubts"));
  detail_->setWordWrap(true);
  detail_->setAlignment(Qt::AlignTop | Qt::AlignLeft);
  detail_->setTextFormat(Qt::RichText);
  detail_->setTextInteractionFlags(Qt::TextSelectableByMouse | Qt::TextSelectableByKeyboard);
  detail_->setContentsMargins(8, 3, 8, 3);
  detail_->setAccessibleName(tr("The chosen doubt"));
  auto* scroll = new QScrollArea(this);
  scroll->setWidget(detail_);
  scroll->setWidgetResizable(true);
  scroll->setFrameShape(QFrame::NoFrame);
  scroll->setHorizontalScrollBarPolicy(Qt::ScrollBarAlwaysOff);
  auto* layout = new QHBoxLayout(this);
  layout->setContentsMargins(0, 0, 0, 0);
  layout->setSpacing(1);
  layout->addWidget(tree_, 5);
  answer_->setPlaceholderText(tr("Your answer, printed on the sheet; Enter keeps it"));
  answer_->setAccessibleName(tr("Answer to the chosen doubt"));
  answer_->setEnabled(false);
  auto* side = new QVBoxLayout;
  side->setContentsMargins(0, 0, 0, 0);
  side->setSpacing(2);
  side->addWidget(scroll, 1);
  side->addWidget(answer_);
  layout->addLayout(side, 4);
  connect(answer_, &QLineEdit::editingFinished, this, &DoubtsList::answer);
  setFocusProxy(tree_);
  connect(tree_, &QTreeWidget::currentItemChanged, this, [this](QTreeWidgetItem* item) { choose(item); });
  // The evidence may have been scrolled away since: a click on the chosen doubt goes there again.
  connect(tree_, &QTreeWidget::itemClicked, this, [this](QTreeWidgetItem* item) { choose(item); });
}

const Doubt* DoubtsList::doubtOf(const QTreeWidgetItem* item) const {
  if (item == nullptr || !shown_) {
    return nullptr;
  }
  const auto index = static_cast<std::size_t>(item->data(0, kIndex).toInt());
  return index < shown_->doubts.size() ? &shown_->doubts[index] : nullptr;
}

void DoubtsList::showScene(const Scene& scene) {
  scene_ = scene;
  refresh();
}

void DoubtsList::showEvent(QShowEvent* event) {
  refresh();
  QWidget::showEvent(event);
}

// While another tab is in front nothing is built, so that a drag pays only for what is seen.
void DoubtsList::refresh() {
  if (!isVisible() || (shown_ == scene_.interpretation && shownAnswers_ == scene_.survey->doubtAnswers)) {
    return;
  }
  const Doubt* before = doubtOf(tree_->currentItem());
  const QString chosen = before != nullptr ? text(before->kind + before->where) : QString();
  QStringList open;
  for (int i = 0; i < tree_->topLevelItemCount(); ++i) {
    if (tree_->topLevelItem(i)->isExpanded()) {
      open << text(doubtOf(tree_->topLevelItem(i))->kind);
    }
  }
  shown_ = scene_.interpretation;
  shownAnswers_ = scene_.survey->doubtAnswers;
  const QSignalBlocker quiet(tree_);
  fill();
  restore(open, chosen);
}

// What was open stays open, and what was chosen stays chosen, as long as it is still there.
void DoubtsList::restore(const QStringList& open, const QString& chosen) {
  QTreeWidgetItem* now = nullptr;
  for (int i = 0; i < tree_->topLevelItemCount(); ++i) {
    QTreeWidgetItem* top = tree_->topLevelItem(i);
    top->setExpanded(top->childCount() > 0 && open.contains(text(doubtOf(top)->kind)));
    for (int c = -1; c < top->childCount() && !chosen.isEmpty(); ++c) {
      QTreeWidgetItem* item = c < 0 ? top : top->child(c);
      const Doubt* doubt = doubtOf(item);
      now = now == nullptr && text(doubt->kind + doubt->where) == chosen ? item : now;
    }
  }
  tree_->setCurrentItem(now);
  showDetail(doubtOf(now));
}

void DoubtsList::fill() {
  tree_->clear();
  if (!shown_) {
    return;
  }
  const auto& doubts = shown_->doubts;
  const int height = fontMetrics().height() + 3;
  for (const DoubtGroup& group : doubtGroups(*shown_)) {
    const std::size_t strongest = group.doubts.front();
    if (group.doubts.size() <= kFewEnough) {
      for (const std::size_t index : group.doubts) {
        tree_->addTopLevelItem(itemOf(*scene_.survey, doubts[index], index, height));
      }
      continue;
    }
    // The line stands for the strongest of its kind; opened, it shows the others.
    QTreeWidgetItem* top = itemOf(*scene_.survey, doubts[strongest], strongest, height);
    top->setText(
        0,
        tr("%1 \u00d7 %2, the strongest: %3").arg(group.doubts.size()).arg(group.kind, text(doubts[strongest].says)));
    for (std::size_t i = 1; i < group.doubts.size(); ++i) {
      top->addChild(itemOf(*scene_.survey, doubts[group.doubts[i]], group.doubts[i], height));
    }
    tree_->addTopLevelItem(top);
  }
}

void DoubtsList::choose(QTreeWidgetItem* item) {
  const Doubt* doubt = doubtOf(item);
  showDetail(doubt);
  if (doubt != nullptr) {
    emit doubtChosen(*doubt);
  }
}

void DoubtsList::answer() {
  const std::string note = answer_->text().trimmed().toStdString();
  if (!shownDoubt_.kind.empty() && note != answerTo(*scene_.survey, shownDoubt_)) {
    emit proposed(edits::answerDoubt(*scene_.survey, shownDoubt_.kind, shownDoubt_.where, note), Phase::Commit);
  }
}

void DoubtsList::showDetail(const Doubt* doubt) {
  const bool same = doubt != nullptr && doubt->kind == shownDoubt_.kind && doubt->where == shownDoubt_.where;
  shownDoubt_ = doubt != nullptr ? *doubt : Doubt{};
  answer_->setEnabled(doubt != nullptr);
  if (!same || !answer_->hasFocus()) {
    answer_->setText(doubt != nullptr ? text(answerTo(*scene_.survey, *doubt)) : QString());
  }
  if (doubt == nullptr) {
    const bool none = shown_ && shown_->doubts.empty();
    detail_->setText(none ? tr("Nothing speaks against this interpretation. That is no proof of it: compare with a "
                               "borehole where there is one.")
                          : tr("Choose a doubt to see what it rests on and what would settle it."));
    return;
  }
  detail_->setText(tr("<b>%1</b><br>%2<br><b>What would settle it:</b> %3")
                       .arg(text(doubt->says).toHtmlEscaped(), text(doubt->restsOn).toHtmlEscaped(),
                            text(doubt->wouldSettle).toHtmlEscaped()));
}

}  // namespace strikeplate
