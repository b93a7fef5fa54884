#include "core/survey/autopick.h"

#include <utility>

#include "core/picking/line_picker.h"
#include "core/section/predict.h"
#include "core/survey/times.h"

namespace strikeplate {
namespace {

constexpr double kSure = 9.5;              // in log probability
constexpr double kExpectedSigma = 1.5e-3;  // s, of the section's expectation, with heavy tails

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

/// The survey with the picks that can be built upon, and no others.
Survey withSurePicks(Survey survey, const LinePicks& picks, const AutoPickOptions& options) {
  for (std::size_t s = 0; s < survey.shots.size(); ++s) {
    for (std::size_t t = 0; t < survey.shots[s].traces.size(); ++t) {
      ShotTrace& trace = survey.shots[s].traces[t];
      const auto& onset = picks.onsets[s][t];
      if (!isTrusted(trace, options)) {
        trace.pick.reset();
        if (onset && picks.sureness[s][t] >= kSure) {
          trace.pick = Pick{onset->time, onset->sigma, 0, PickOrigin::Automatic};
        }
      }
    }
  }
  return survey;
}

/// What a section of the sure picks expects on every trace; empty where there is no such section.
std::vector<std::vector<std::optional<Onset>>> expectedBySection(const Survey& survey) {
  SectionOptions options;
  options.layers = survey.settings.layers;
  options.boreholes = survey.boreholes;
  const TravelTimes sure = travelTimes(survey);
  const Section section = solveSection(sure, options);
  TravelTimes all = sure;
  all.arrivals.clear();
  for (std::size_t s = 0; s < survey.shots.size(); ++s) {
    for (std::size_t t = 0; t < survey.shots[s].traces.size(); ++t) {
      all.arrivals.push_back(
          {static_cast<int>(s), static_cast<int>(t), survey.shots[s].traces[t].geophone, 0.0, 1.0, 0, false});
    }
  }
  const std::vector<double> times = predictedTimes(all, section, options);
  std::vector<std::vector<std::optional<Onset>>> out;
  for (std::size_t s = 0, i = 0; s < survey.shots.size() && !times.empty(); ++s) {
    auto& row = out.emplace_back();
    for (std::size_t t = 0; t < survey.shots[s].traces.size(); ++t, ++i) {
      row.push_back(Onset{times[i] - survey.shots[s].triggerCorrection, kExpectedSigma, 1.0});
    }
  }
  return out;
}

}  // namespace

Edit pickAutomatically(const Survey& survey, const std::vector<Gather>& gathers, const AutoPickOptions& options,
                       const Progress& progress) {
  LinePickOptions lineOptions = pickerOptions(survey, options);
  const auto half = [&progress](double from) {
    return [&progress, from](double f) { return goOn(progress, from + 0.5 * f); };
  };
  LinePicks picks = pickLine(gathers, lineOptions, half(0.0));
  if (picks.finished) {
    lineOptions.predicted = expectedBySection(withSurePicks(survey, picks, options));
    if (!lineOptions.predicted.empty()) {
      picks = pickLine(gathers, lineOptions, half(0.5));
    }
  }
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
