#pragma once

#include <optional>
#include <set>

#include "widgets/position_view.h"
#include "widgets/travel_time_picture.h"

class QMouseEvent;
class QRubberBand;

namespace strikeplate {

/// Travel times of all shots over position, with fitted lines and the section's curves.
///
/// The ends of the selected shot's branches are ringed: a ring is dragged along the curve to re-assign arrivals, and
/// everything follows while it moves; Escape puts it back. A click on a pick selects its shot and trace; a drag over
/// empty ground marks all picks inside; keys 1 to 6 give the marked picks, or the selected one, to a layer, 0 gives
/// them back to the program, Delete deletes them. Left and Right go along the curve (with Shift they mark), Page up
/// and down change the shot.
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
  void markInside(const QRectF& area, bool add);
  void abandon();
  [[nodiscard]] int arrivalAt(const QPointF& position, double reach) const;
  [[nodiscard]] std::optional<BranchEnd> endAt(const QPointF& position) const;
  [[nodiscard]] QString describe(int arrival) const;

  TravelTimeDisplay display_;
  TravelTimePicture picture_;
  std::set<TraceOfShot> marked_;
  std::optional<EndDrag> drag_;
  std::optional<QPointF> bandFrom_;
  QRubberBand* band_;
};

}  // namespace strikeplate
