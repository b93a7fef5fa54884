#pragma once

#include <QWidget>

#include "widgets/scene.h"

class QLabel;
class QTreeWidget;
class QTreeWidgetItem;

namespace strikeplate {

/// The reasons not to trust something, the gravest first. Many of one kind are one line that opens; beside the list
/// stands, for the chosen one, what it rests on and what would settle it.
class DoubtsList : public QWidget {
  Q_OBJECT
 public:
  explicit DoubtsList(QWidget* parent = nullptr);
  void showScene(const Scene& scene);

 signals:
  /// The user chose a doubt.
  void doubtChosen(const strikeplate::Doubt& doubt);

 protected:
  void showEvent(QShowEvent* event) override;

 private:
  void refresh();
  void restore(const QStringList& open, const QString& chosen);
  void fill();
  void choose(QTreeWidgetItem* item);
  void showDetail(const Doubt* doubt);
  [[nodiscard]] const Doubt* doubtOf(const QTreeWidgetItem* item) const;

  Scene scene_;
  std::shared_ptr<const Interpretation> shown_;  ///< what the list was built from
  QTreeWidget* tree_;
  QLabel* detail_;
};

}  // namespace strikeplate
