#pragma once

#include <QDialog>

#include "core/survey/places_edit.h"

class QComboBox;
class QLabel;
class QLineEdit;
class QListWidget;
class QPushButton;
class QSpinBox;

namespace strikeplate {

class PlaceTable;

/// The geometry of the line as two tables, geophones and shots: typed, pasted, filled by rule, turned round; checked
/// as it is typed. Yields one edit.
class GeometryDialog : public QDialog {
  Q_OBJECT
 public:
  explicit GeometryDialog(const Survey& survey, QWidget* parent = nullptr);

  /// What the tables say, m.
  [[nodiscard]] LinePlaces places() const;
  /// The edit that was accepted; without changes when nothing was changed.
  [[nodiscard]] const Edit& edit() const { return edit_; }

 protected:
  /// Return belongs to the field it is typed in; only the button closes the dialog.
  void keyPressEvent(QKeyEvent* event) override;

 private:
  /// What a rule can fill, in the order of its box.
  enum Target { kGeophoneX, kGeophoneElevation, kShotX, kShotElevation, kShotDepth };

  QWidget* buildTables();
  QWidget* buildRule();
  QWidget* buildFoot();
  void showPlaces(const LinePlaces& places);
  void fillByRule();
  void check();
  void say(const QString& sentence, bool grave);
  bool checkCells();
  void take();

  Survey survey_;
  std::vector<Borehole> boreholes_;  ///< they turn round with the line
  Edit edit_;
  PlaceTable* geophones_;
  PlaceTable* shots_;
  PlaceTable* chosen_;  ///< the one that was used last, where pasted cells go
  QComboBox* target_;
  QLineEdit* first_;
  QLineEdit* spacing_;
  QSpinBox* from_;
  QSpinBox* count_;
  QComboBox* unit_;
  QListWidget* sentences_;
  QLabel* notice_;
  QPushButton* ok_;
};

}  // namespace strikeplate
