#include "core/survey/autopick.h"

#include <utility>

#include "core/picking/line_picker.h"

namespace strikeplate {
namespace {

bool isTrusted(const ShotTrace& trace, const AutoPickOptions& options) {
  return trace.pick && trace.pick->origin != PickOrigin::Automatic && !options.replaceHandPicks;
}

LinePickOptions pickerOptions(const Survey& survey, const AutoPickOptions& options) {
  LinePickOptions out;
  for (const Shot& shot : survey.shots) {
    auto& trusted = out.trusted.emplace_back();
    for (const ShotTrace& trace : shot.traces) {
      trusted.push_back(isTrusted(trace, options)
                            ? std::optional<Onset>(Onset{trace.pick->time, trace.pick->sigma, 1.0})
                            : std::nullopt);
    }
  }
  return out;
}

}  // namespace

Edit pickAutomatically(const Survey& survey, const std::vector<Gather>& gathers, const AutoPickOptions& options,
                       const Progress& progress) {
  const LinePicks picks = pickLine(gathers, pickerOptions(survey, options), progress);
  std::vector<PickChange> changes;
  for (std::size_t s = 0; s < survey.shots.size() && picks.finished; ++s) {
    if (options.shot >= 0 && options.shot != static_cast<int>(s)) {
      continue;
    }
    for (std::size_t t = 0; t < survey.shots[s].traces.size(); ++t) {
      const ShotTrace& trace = survey.shots[s].traces[t];
      std::optional<Pick> pick;
      if (const auto& onset = picks.onsets[s][t]) {
        pick = Pick{onset->time, onset->sigma, 0, PickOrigin::Automatic};
      }
      if (!isTrusted(trace, options) && pick != trace.pick) {
        changes.push_back({static_cast<int>(s), static_cast<int>(t), {}, pick});
      }
    }
  }
  return edits::setPicks(survey, changes,
                         options.shot < 0 ? "Pick the line automatically"
                                          : "Pick shot " + std::to_string(options.shot + 1) + " automatically");
}

Edit stillFitting(const Survey& survey, const Edit& edit) {
  Edit fitting{edit.text, {}};
  for (const Change& change : edit.changes) {
    const auto* pick = std::get_if<PickChange>(&change);
    const auto present = [&survey](const PickChange& p) -> const std::optional<Pick>& {
      return survey.shots[static_cast<std::size_t>(p.shot)].traces[static_cast<std::size_t>(p.trace)].pick;
    };
    if (pick == nullptr || present(*pick) == pick->before) {
      fitting.changes.push_back(change);
    }
  }
  return fitting;
}

}  // namespace strikeplate
