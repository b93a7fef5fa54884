#pragma once

#include <map>
#include <memory>
#include <optional>
#include <vector>

#include <QPointF>

#include "core/survey/edit.h"
#include "widgets/record_axes.h"
#include "widgets/scene.h"

namespace strikeplate {

/// What lies under the pointer.
struct RecordTarget {
  enum class On {
    Nothing,  ///< no trace
    Trace,    ///< a trace, away from its pick
    Pick,
    Bracket  ///< an end of the selected trace's sigma bracket
  };
  On on = On::Nothing;
  int trace = -1;
};

/// px within which a pick or a bracket's end is met.
inline constexpr double kPickReach = 6.0;

/// x in px of the selected trace's sigma bracket, which stands beside the trace so that it does not hide the onset.
double bracketX(const RecordAxes& axes, int trace);

/// s on either side of the pointer in which a gesture looks for the onset: less the more is zoomed in, but never
/// fewer than ten samples, for the criterion needs something to stand on.
double snapHalfWidth(const RecordAxes& axes, const Gather& gather);

RecordTarget targetAt(const RecordAxes& axes, const Shot& shot, int selectedTrace, const QPointF& at);

/// One gesture of the left button on a record, from press to release. What it is to be shows on the way:
///  - on a pick: moves it;
///  - on an end of the sigma bracket: sets sigma;
///  - elsewhere: sets the trace's pick where the pointer is, until the pointer leaves the trace; from then on it is a
///    stroke, and every trace that the path crosses is picked where it crosses last.
/// Dead traces are passed over. Edits are made from the survey as it was at the press.
class RecordGesture {
 public:
  /// `target` is not Nothing, `at` where the button went down.
  RecordGesture(const Scene& scene, const RecordAxes& axes, const RecordTarget& target, const QPointF& at);

  /// The edit so far; none while there is nothing to change. `free` takes times as they are, without the onset
  /// nearby.
  std::optional<Edit> moveTo(const RecordAxes& axes, const QPointF& at, bool free);
  /// The same at the release, where a click without a move counts too.
  std::optional<Edit> release(const RecordAxes& axes, const QPointF& at, bool free);

  [[nodiscard]] bool isStroke() const { return stroke_; }
  /// Where the pointer has been, px.
  [[nodiscard]] const std::vector<QPointF>& path() const { return path_; }
  [[nodiscard]] int trace() const { return target_.trace; }
  /// True while the scene's records and shots are still those of the press.
  [[nodiscard]] bool fits(const Scene& scene) const;

 private:
  struct Crossing {
    double y = 0.0;
    Pick pick;
  };

  [[nodiscard]] const Shot& shot() const;
  [[nodiscard]] const Gather& gather() const;
  [[nodiscard]] bool live(int trace) const;
  [[nodiscard]] Pick pickAt(const RecordAxes& axes, int trace, double y, bool free) const;
  [[nodiscard]] std::optional<double> crossing(const RecordAxes& axes, int trace) const;
  std::optional<Edit> edit(const RecordAxes& axes, const QPointF& at, bool free);
  std::optional<Edit> single(const Pick& pick, const std::string& verb) const;
  std::optional<Edit> strokeEdit(const RecordAxes& axes, bool free);

  std::shared_ptr<const Survey> survey_;
  std::shared_ptr<const std::vector<Gather>> gathers_;
  int shot_;
  RecordTarget target_;
  double grip_ = 0.0;  // px from the pointer to what it took hold of
  bool moved_ = false, stroke_ = false;
  std::vector<QPointF> path_;
  std::map<int, Crossing> crossed_;
};

}  // namespace strikeplate
