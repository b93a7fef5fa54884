#include "widgets/record_gesture.h"

#include <algorithm>
#include <cmath>

#include "widgets/record_pick.h"

namespace strikeplate {
namespace {

constexpr double kStill = 3.0;                            // px a hand trembles
constexpr double kSnapPixels = 16.0;                      // px within which an onset is looked for
constexpr double kLeastSnap = 0.0015, kMostSnap = 0.006;  // s
constexpr double kEndShare = 0.35;  // of a spacing by which a stroke may fall short of its outermost traces
constexpr double kLeastSigma = 2e-5, kMostSigma = 0.05;  // s

}  // namespace

double bracketX(const RecordAxes& axes, int trace) {
  return axes.xOf(trace) + std::clamp(0.45 * axes.spacing(), 12.0, 22.0);
}

double snapHalfWidth(const RecordAxes& axes, const Gather& gather) {
  return std::max(std::clamp(kSnapPixels * axes.secondsPerPixel(), kLeastSnap, kMostSnap),
                  10.0 * gather.sampleInterval);
}

RecordTarget targetAt(const RecordAxes& axes, const Shot& shot, int selectedTrace, const QPointF& at) {
  const auto pickOf = [&](int trace) -> const std::optional<Pick>& {
    return shot.traces[static_cast<std::size_t>(trace)].pick;
  };
  if (selectedTrace >= 0 && selectedTrace < axes.count() && pickOf(selectedTrace)) {
    const Pick& pick = *pickOf(selectedTrace);
    const double early = axes.yOf(selectedTrace, pick.time - pick.sigma);
    const double late = axes.yOf(selectedTrace, pick.time + pick.sigma);
    const double away = std::min(std::abs(at.y() - early), std::abs(at.y() - late));
    if (std::abs(at.x() - bracketX(axes, selectedTrace)) <= kPickReach && away <= kPickReach) {
      return {RecordTarget::On::Bracket, selectedTrace};
    }
  }
  const int trace = axes.traceAt(at.x());
  if (trace < 0) {
    return {};
  }
  const bool onPick = pickOf(trace) && std::abs(axes.yOf(trace, pickOf(trace)->time) - at.y()) <= kPickReach;
  return {onPick ? RecordTarget::On::Pick : RecordTarget::On::Trace, trace};
}

RecordGesture::RecordGesture(const Scene& scene, const RecordAxes& axes, const RecordTarget& target,
                             const QPointF& at)
    : survey_(scene.survey), gathers_(scene.gathers), shot_(scene.selection.shot), target_(target), path_{at} {
  const auto& pick = shot().traces[static_cast<std::size_t>(target.trace)].pick;
  if (pick && target.on == RecordTarget::On::Pick) {
    grip_ = axes.yOf(target.trace, pick->time) - at.y();
  } else if (pick && target.on == RecordTarget::On::Bracket) {
    const double middle = axes.yOf(target.trace, pick->time);
    const double reach = std::abs(axes.yOf(target.trace, pick->time + pick->sigma) - middle);
    grip_ = middle + (at.y() < middle ? -reach : reach) - at.y();
  }
}

const Shot& RecordGesture::shot() const {
  return survey_->shots[static_cast<std::size_t>(shot_)];
}

const Gather& RecordGesture::gather() const {
  return (*gathers_)[static_cast<std::size_t>(shot_)];
}

bool RecordGesture::live(int trace) const {
  return shot().traces[static_cast<std::size_t>(trace)].state != TraceState::Dead;
}

bool RecordGesture::fits(const Scene& scene) const {
  const auto s = static_cast<std::size_t>(shot_);
  return scene.survey->records == survey_->records && scene.survey->shots.size() == survey_->shots.size() &&
         scene.survey->shots[s].traces.size() == shot().traces.size() && scene.selection.shot == shot_;
}

std::optional<Edit> RecordGesture::moveTo(const RecordAxes& axes, const QPointF& at, bool free) {
  const QPointF way = at - path_.front();
  moved_ = moved_ || std::hypot(way.x(), way.y()) > kStill;
  if (target_.on == RecordTarget::On::Trace) {
    path_.push_back(at);
    stroke_ = stroke_ || (axes.traceAt(at.x()) != target_.trace && std::abs(way.x()) > kPickReach);
  }
  return moved_ ? edit(axes, at, free) : std::nullopt;
}

std::optional<Edit> RecordGesture::release(const RecordAxes& axes, const QPointF& at, bool free) {
  const auto last = moveTo(axes, at, free);
  const bool click = !moved_ && target_.on == RecordTarget::On::Trace;
  return click ? edit(axes, at, free) : last;
}

std::optional<Edit> RecordGesture::edit(const RecordAxes& axes, const QPointF& at, bool free) {
  if (stroke_) {
    return strokeEdit(axes, free);
  }
  if (!live(target_.trace)) {
    return std::nullopt;
  }
  const auto& before = shot().traces[static_cast<std::size_t>(target_.trace)].pick;
  if (target_.on == RecordTarget::On::Bracket) {
    Pick pick = *before;
    pick.sigma =
        std::clamp(std::abs(axes.timeAt(target_.trace, at.y() + grip_) - pick.time), kLeastSigma, kMostSigma);
    pick.origin = PickOrigin::Hand;
    return single(pick, "Set sigma, ");
  }
  return single(pickAt(axes, target_.trace, at.y() + grip_, free), before ? "Move pick, " : "Set pick, ");
}

Pick RecordGesture::pickAt(const RecordAxes& axes, int trace, double y, bool free) const {
  const double width = snapHalfWidth(axes, gather());
  return handPick(gather(), shot(), trace, meantTime(gather(), shot(), trace, axes.timeAt(trace, y), width, free));
}

std::optional<Edit> RecordGesture::single(const Pick& pick, const std::string& verb) const {
  const auto& before = shot().traces[static_cast<std::size_t>(target_.trace)].pick;
  if (before && *before == pick) {
    return std::nullopt;
  }
  return edits::setPick(*survey_, shot_, target_.trace, pick, verb + pickName(shot_, target_.trace));
}

std::optional<double> RecordGesture::crossing(const RecordAxes& axes, int trace) const {
  const double x = axes.xOf(trace);
  for (std::size_t i = path_.size() - 1; i > 0; --i) {
    const QPointF &a = path_[i - 1], &b = path_[i];
    if (std::min(a.x(), b.x()) <= x && x <= std::max(a.x(), b.x()) && a.x() != b.x()) {
      return a.y() + (x - a.x()) / (b.x() - a.x()) * (b.y() - a.y());
    }
  }
  const double nearby = kEndShare * axes.spacing();
  if (std::abs(x - path_.back().x()) <= nearby) {
    return path_.back().y();
  }
  return std::abs(x - path_.front().x()) <= nearby ? std::optional(path_.front().y()) : std::nullopt;
}

std::optional<Edit> RecordGesture::strokeEdit(const RecordAxes& axes, bool free) {
  std::vector<PickChange> changes;
  for (int t = 0; t < axes.count(); ++t) {
    const auto y = live(t) ? crossing(axes, t) : std::nullopt;
    if (!y) {
      crossed_.erase(t);
      continue;
    }
    // Only where the path is new is there an onset to look for.
    const auto known = crossed_.find(t);
    if (known == crossed_.end() || known->second.y != *y) {
      crossed_[t] = {*y, pickAt(axes, t, *y, free)};
    }
    changes.push_back({shot_, t, std::nullopt, crossed_[t].pick});
  }
  if (changes.empty()) {
    return std::nullopt;
  }
  return edits::setPicks(*survey_, changes,
                         changes.size() == 1 ? "Set pick, " + pickName(shot_, changes.front().trace)
                                             : "Pick shot " + std::to_string(shot_ + 1) + ", traces " +
                                                   std::to_string(changes.front().trace + 1) + " to " +
                                                   std::to_string(changes.back().trace + 1));
}

}  // namespace strikeplate
