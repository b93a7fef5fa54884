#pragma once

#include <optional>
#include <set>

#include <QPolygonF>

#include "widgets/position_view.h"
#include "widgets/travel_time_picture.h"

class QMenu;
class QMouseEvent;
class QRubberBand;

namespace strikeplate {

class LassoLine;

/// Travel times of all shots over position, with fitted lines and the section's curves.
///
/// The ends of the selected shot's branches are ringed: a ring is dragged along the curve to re-assign arrivals, and
/// everything follows while it moves; Escape puts it back. A click on a pick selects its shot and trace; a drag over
/// empty ground marks all picks inside, with Alt those inside the line drawn; keys 1 to 6 give the marked picks, or
/// the selected one, to a layer, 0 gives them back to the program, Delete deletes them. Left and Right go along the
/// curve (with Shift they mark, with Alt they slide the far end of the branch), Page up and down change the shot. S,
/// M and D split, merge and dissolve the branch of the selected pick; K keeps the shot in view, F has the forward or
/// the reverse curves stand out. The menu at the right button holds all of it.
class TravelTimePlot : public PositionView {
  Q_OBJECT
 public:
  explicit TravelTimePlot(QWidget* parent = nullptr);
  void showScene(const Scene& scene) override;
  void showSelection(const Selection& selection) override;

  [[nodiscard]] const TravelTimeDisplay& display() const { return display_; }
  void setDisplay(const TravelTimeDisplay& display);
  /// The marked picks, or the selected one where none is marked.
  [[nodiscard]] std::vector<TraceOfShot> chosen() const;
  /// Where a branch end or a pick stands, px in this widget; for the pointer's way there.
  [[nodiscard]] std::optional<QPointF> placeOf(int arrival) const;

 public slots:
  /// Gives the chosen picks to a layer, 0 back to the program.
  void assignChosen(int layer);
  void deleteChosen();
  void splitBranchHere();
  void mergeBranchHere();
  void dissolveBranchHere();
  /// Slides the far end of the selected pick's branch by so many picks, outwards when > 0.
  void slideFarEnd(int by);
  /// Asks for the selected shot's mark of a kind; `proposed` (m or s) stands there to begin with when it is > 0.
  void askMark(strikeplate::MarkKind kind, double proposed);
  /// Whether the selected shot stays in view when not all shots are shown.
  void keepShot();
  /// Both sides alike, then forward, then reverse curves stand out.
  void nextSide();

 signals:
  void displayChanged();

 protected:
  void drawData() override;
  void keyPressEvent(QKeyEvent* event) override;

 private:
  struct EndDrag {
    BranchEnd end;
    std::shared_ptr<const Survey> atPress;
    std::shared_ptr<const Interpretation> before;
    int to = 0;
  };

  void press(QMouseEvent* event);
  void move(QMouseEvent* event);
  void release(QMouseEvent* event);
  void menuAt(const QPoint& position);
  void hover(const QPointF& position);
  void stepTrace(int by, bool mark);
  void stepShot(int by);
  void markInside(const QPolygonF& area, bool add);
  void fillBranchMenu(QMenu& menu, int arrival);
  void fillShotMenu(QMenu& menu, const QPoint& position);
  /// The selected pick, as an index into the arrivals; -1 when there is none.
  [[nodiscard]] int selectedArrival() const;
  void proposeIfAny(const Edit& edit, const QString& otherwise);
  [[nodiscard]] QString wordsAt(const QPointF& position) const;
  [[nodiscard]] QPointF pixel(double x, double offset, double time) const;
  void abandon();
  [[nodiscard]] int arrivalAt(const QPointF& position, double reach) const;
  [[nodiscard]] std::optional<BranchEnd> endAt(const QPointF& position) const;

  TravelTimeDisplay display_;
  TravelTimePicture picture_;
  std::set<TraceOfShot> marked_;
  std::optional<EndDrag> drag_;
  QPolygonF drawn_;        ///< where a marking drag went, px; empty when there is none
  bool freehand_ = false;  ///< it marks inside the line drawn, not inside its rectangle
  LassoLine* lasso_;
  QRubberBand* band_;
};

}  // namespace strikeplate
