#pragma once

#include <QDialog>

class QTreeWidget;

namespace strikeplate {

/// All keys and gestures on one screen, by pane.
class KeyList : public QDialog {
  Q_OBJECT
 public:
  explicit KeyList(QWidget* parent = nullptr);

 private:
  void addPane(const QString& pane, const QList<std::pair<QString, QString>>& rows);

  QTreeWidget* list_;
};

}  // namespace strikeplate
