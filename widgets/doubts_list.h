#pragma once

#include <QWidget>

#include "core/survey/edit.h"
#include "widgets/scene.h"

class QLabel;
class QLineEdit;
class QTreeWidget;
class QTreeWidgetItem;

namespace strikeplate {

/// The reasons not to trust something, the gravest first. Many of one kind are one line that opens; beside the list
/// stands, for the chosen one, what it rests on and what would settle it, and room for the user's answer, which the
/// sheet prints. Answered doubts have a tick.
class DoubtsList : public QWidget {
  Q_OBJECT
 public:
  explicit DoubtsList(QWidget* parent = nullptr);
  void showScene(const Scene& scene);

 signals:
  /// The user chose a doubt.
  void doubtChosen(const strikeplate::Doubt& doubt);
  /// The user answered a doubt, or took an answer back.
  void proposed(const strikeplate::Edit& edit, strikeplate::Phase phase);

 protected:
  void showEvent(QShowEvent* event) override;

 private:
  void refresh();
  void restore(const QStringList& open, const QString& chosen);
  void fill();
  void choose(QTreeWidgetItem* item);
  void showDetail(const Doubt* doubt);
  void answer();
  [[nodiscard]] const Doubt* doubtOf(const QTreeWidgetItem* item) const;

  Scene scene_;
  std::shared_ptr<const Interpretation> shown_;  ///< what the list was built from
  std::vector<DoubtAnswer> shownAnswers_;
  QTreeWidget* tree_;
  QLabel* detail_;
  QLineEdit* answer_;
  Doubt shownDoubt_;  ///< what the answer is about; without a kind when nothing is chosen
};

}  // namespace strikeplate
