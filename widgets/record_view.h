#pragma once

#include <memory>
#include <optional>
#include <utility>
#include <vector>

#include <QImage>

#include "widgets/record_gesture.h"
#include "widgets/record_keys.h"
#include "widgets/record_overlay.h"
#include "widgets/record_traces.h"
#include "widgets/view.h"

class QMenu;

namespace strikeplate {

/// The traces of the selected shot with its picks. A click sets the pick of a trace at the onset nearby (Alt or Ctrl:
/// exactly there), a drag moves a pick or an end of the selected trace's sigma bracket, a stroke across traces picks
/// all that it crosses (RecordGesture); keys as in recordKeys(). The wheel zooms time, with Ctrl traces; the middle
/// button moves both; a double click beside the traces shows the first breaks again.
class RecordView : public View {
  Q_OBJECT
 public:
  explicit RecordView(QWidget* parent = nullptr);
  void showScene(const Scene& scene) override;
  void showSelection(const Selection& selection) override;
  void showPlumbLine(double x) override;
  void showPositionRange(double left, double right) override;
  void setLook(const Look& look) override;

  [[nodiscard]] const RecordDisplay& display() const { return display_; }
  void setDisplay(const RecordDisplay& display);
  /// The same from within, as by key or menu: says so with displayChanged().
  void changeDisplay(const RecordDisplay& display);
  [[nodiscard]] bool inFeet() const { return scene_.survey && scene_.survey->settings.feet; }

  /// Does what a key does; everything that the view can do is there.
  void perform(RecordCommand command);
  /// What fits a trace (-1: none), for a right click; the caller owns it.
  [[nodiscard]] QMenu* makeMenu(int trace);

  [[nodiscard]] const RecordAxes& axes() const { return axes_; }
  [[nodiscard]] const RecordRange& range() const { return range_; }
  /// First and last of the traces marked together; -1 when none are.
  [[nodiscard]] std::pair<int, int> marked() const { return marked_; }

 signals:
  void displayChanged(const strikeplate::RecordDisplay& display);
  /// The whole picker shall look at this shot.
  void pickShotWanted(int shot);

 protected:
  void paintEvent(QPaintEvent* event) override;
  void resizeEvent(QResizeEvent* event) override;
  void changeEvent(QEvent* event) override;
  void mousePressEvent(QMouseEvent* event) override;
  void mouseMoveEvent(QMouseEvent* event) override;
  void mouseReleaseEvent(QMouseEvent* event) override;
  void mouseDoubleClickEvent(QMouseEvent* event) override;
  void wheelEvent(QWheelEvent* event) override;
  void leaveEvent(QEvent* event) override;
  void contextMenuEvent(QContextMenuEvent* event) override;
  void keyPressEvent(QKeyEvent* event) override;
  void keyReleaseEvent(QKeyEvent* event) override;
  void focusOutEvent(QFocusEvent* event) override;

 private:
  /// What the cached picture of the traces depends on.
  struct Painted {
    const void* gathers = nullptr;
    int shot = -1;
    double triggerCorrection = 0.0;
    bool feet = false;
    RecordRange range;
    RecordDisplay display;
    QSize size;
    double scale = 0.0;
    LookKind look = LookKind::Light;
    bool operator==(const Painted&) const = default;
  };
  /// Keys that move a pick, from the first press to the release: one edit.
  struct Nudge {
    std::shared_ptr<const Survey> survey;
    int shot, trace, samples;
  };

  [[nodiscard]] const Gather* gather() const;
  [[nodiscard]] const Shot& shot() const;
  [[nodiscard]] RecordPicture picture() const;
  [[nodiscard]] bool hasTrace() const;

  // What is shown.
  void takeShot(bool newRecords);
  void conditionTraces();
  void goHome();
  void showAll();
  void setRange(const RecordRange& range);
  void showRange(const RecordRange& range);
  void reveal();
  void placeAxes();
  void paintTraces();
  void drawTraces();
  void paintOverlay(QPainter& painter);
  void zoom(double timeFactor, double traceFactor, const QPointF& about);

  // The pointer.
  void hover(const QPointF& at);
  void sayTrace();
  void abandon();
  void extendMarked(int trace);
  [[nodiscard]] QPointF inPlot(const QPointF& at) const;

  // Edits and keys.
  void commit(const std::optional<Edit>& edit);
  void select(const std::optional<Selection>& selection);
  bool performTool(RecordCommand command);
  bool performPick(RecordCommand command);
  bool performStep(RecordCommand command);
  void performView(RecordCommand command);
  void nudge(int samples);
  void finishNudge();
  void deletePicks();
  void assignLayer(int layer);
  void pickBySignal();
  [[nodiscard]] std::vector<int> tracesMeant() const;

  Scene scene_;
  Look look_ = Look::of(LookKind::Light);
  RecordDisplay display_;
  RecordAxes axes_;
  RecordRange range_;
  bool atHome_ = true;
  bool homeKnewPicks_ = false;
  double positionLeft_ = Estimate::kNaN, positionRight_ = Estimate::kNaN;  // m, as shared with other panes
  double plumbLine_ = Estimate::kNaN;                                      // m

  std::shared_ptr<const std::vector<Gather>> shownGathers_;  // those that traces_ was made from
  int shownShot_ = -1;
  ShownTraces traces_;
  std::vector<float> units_;  // amplitude of each trace that fills a spacing
  QImage image_;
  Painted painted_;

  std::optional<RecordGesture> gesture_;
  bool live_ = false;  // the gesture has proposed something
  Selection selectionAtPress_;
  std::optional<Nudge> nudge_;
  std::optional<QPointF> panFrom_;
  bool marking_ = false;
  std::pair<int, int> marked_{-1, -1};
  int markAnchor_ = -1;
  std::optional<QPointF> pointer_;
};

}  // namespace strikeplate
