#include "widgets/record_pick.h"

#include <algorithm>
#include <cmath>

#include "core/picking/trace_picker.h"

namespace strikeplate {
namespace {

constexpr double kFastestGround = 7000.0;                // m/s
constexpr double kLeastSigma = 2e-5, kMostSigma = 0.05;  // s

const ShotTrace& traceOf(const Survey& survey, int shot, int trace) {
  return survey.shots[static_cast<std::size_t>(shot)].traces[static_cast<std::size_t>(trace)];
}

/// True when the sigma of this pick is not the one that the program would give it.
bool sigmaIsOwn(const Gather& gather, std::size_t trace, const Pick& pick) {
  return pick.origin == PickOrigin::Imported ||
         (pick.origin == PickOrigin::Hand && std::abs(sigmaAt(gather, trace, pick.time) - pick.sigma) > 1e-9);
}

double keptWithin(const Gather& gather, const Shot& shot, int trace, double time) {
  const auto& samples = gather.traces[static_cast<std::size_t>(trace)];
  const double afterBlow = gather.sampleInterval - shot.triggerCorrection;
  if (!samples.empty()) {
    time = std::min(time, gather.timeOf(static_cast<double>(samples.size() - 1)));
    time = std::max(time, gather.start);
  }
  return std::max(time, afterBlow);
}

}  // namespace

double meantTime(const Gather& gather, const Shot& shot, int trace, double time, double halfWidth, bool free) {
  if (!free) {
    if (const auto onset = snapOnset(gather, static_cast<std::size_t>(trace), time, halfWidth)) {
      time = onset->time;
    }
  }
  return keptWithin(gather, shot, trace, time);
}

Pick handPick(const Gather& gather, const Shot& shot, int trace, double time) {
  const auto t = static_cast<std::size_t>(trace);
  const auto& before = shot.traces[t].pick;
  Pick pick = before.value_or(Pick{});
  pick.time = time;
  pick.sigma = before && sigmaIsOwn(gather, t, *before) ? before->sigma : sigmaAt(gather, t, time);
  pick.origin = PickOrigin::Hand;
  return pick;
}

std::string pickName(int shot, int trace) {
  return "shot " + std::to_string(shot + 1) + ", trace " + std::to_string(trace + 1);
}

std::optional<Edit> nudgedPick(const Survey& survey, const Gather& gather, int shot, int trace, int samples) {
  const auto& before = traceOf(survey, shot, trace).pick;
  if (!before || samples == 0) {
    return std::nullopt;
  }
  const Shot& of = survey.shots[static_cast<std::size_t>(shot)];
  const double time = keptWithin(gather, of, trace, before->time + samples * gather.sampleInterval);
  const Pick after = handPick(gather, of, trace, time);
  return after == *before
             ? std::nullopt
             : std::optional(edits::setPick(survey, shot, trace, after, "Nudge pick, " + pickName(shot, trace)));
}

std::optional<Edit> scaledSigma(const Survey& survey, int shot, int trace, double factor) {
  const auto& before = traceOf(survey, shot, trace).pick;
  if (!before) {
    return std::nullopt;
  }
  Pick after = *before;
  after.sigma = std::clamp(factor * before->sigma, kLeastSigma, kMostSigma);
  after.origin = PickOrigin::Hand;
  return edits::setPick(survey, shot, trace, after, "Set sigma, " + pickName(shot, trace));
}

std::optional<Edit> deletedPicks(const Survey& survey, int shot, int first, int last) {
  std::vector<PickChange> changes;
  for (int t = first; t <= last; ++t) {
    if (traceOf(survey, shot, t).pick) {
      changes.push_back({shot, t, std::nullopt, std::nullopt});
    }
  }
  if (changes.empty()) {
    return std::nullopt;
  }
  const bool one = changes.size() == 1;
  const std::string text = one ? "Delete pick, " + pickName(shot, changes.front().trace)
                               : "Delete " + std::to_string(changes.size()) + " picks, shot " +
                                     std::to_string(shot + 1) + ", traces " + std::to_string(first + 1) + " to " +
                                     std::to_string(last + 1);
  return edits::setPicks(survey, changes, text);
}

std::optional<Edit> signalPick(const Survey& survey, const Gather& gather, int shot, int trace,
                               std::optional<double> near) {
  constexpr double kNear = 0.010;  // s, either side of what is known
  const auto t = static_cast<std::size_t>(trace);
  const Shot& of = survey.shots[static_cast<std::size_t>(shot)];
  OnsetWindow window{gather.offset(t) / kFastestGround - of.triggerCorrection};
  if (near) {
    window = {std::max(window.from, *near - kNear), *near + kNear};
  }
  auto onset = pickOnset(gather.traces[t], gather.sampleInterval, gather.start, window);
  if (!onset && near) {
    onset = snapOnset(gather, t, *near, kNear);
  }
  if (!onset) {
    return std::nullopt;
  }
  Pick pick = of.traces[t].pick.value_or(Pick{});
  pick.time = keptWithin(gather, of, trace, onset->time);
  pick.sigma = onset->sigma;
  pick.origin = PickOrigin::Automatic;
  return edits::setPick(survey, shot, trace, pick, "Pick by signal, " + pickName(shot, trace));
}

}  // namespace strikeplate
