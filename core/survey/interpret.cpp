#include <algorithm>
#include <cmath>
#include <utility>

#include "core/methods/opinions.h"
#include "core/section/solve.h"
#include "core/section/start_lines.h"
#include "core/survey/doubts.h"
#include "core/survey/interpretation.h"
#include "core/survey/marked_opinions.h"
#include "core/survey/times.h"
#include "core/traveltime/branches.h"
#include "core/traveltime/reciprocity.h"
#include "core/traveltime/trigger_delay.h"

namespace strikeplate {
namespace {

SectionOptions sectionOptions(const Survey& survey) {
  SectionOptions options;
  options.layers = survey.settings.layers;
  options.solveTriggerDelays = survey.settings.solveTriggerDelays;
  options.boreholes = survey.boreholes;
  return options;
}

/// Straight branches common to all shots, for times that make no section; layers stay 0 where not even that holds.
void takeLayersFromLines(TravelTimes& times, int layers) {
  constexpr std::size_t kFewest = 4;  // fewer make no branches
  if (times.arrivals.size() < kFewest) {
    return;
  }
  for (const int count : layers > 0 ? std::vector<int>{layers} : std::vector<int>{2, 1}) {
    const std::vector<LineStart> starts = lineStarts(times, count, 1);
    if (starts.empty()) {
      continue;
    }
    for (std::size_t i = 0; i < times.arrivals.size(); ++i) {
      times.arrivals[i].layer = starts.front().labels[i];
    }
    return;
  }
}

/// The layers that the section settled on, where the user did not say.
void takeLayers(TravelTimes& times, const Section& section, int layers) {
  if (!section.determined || section.layerOf.size() != times.arrivals.size()) {
    takeLayersFromLines(times, layers);
    return;
  }
  for (std::size_t i = 0; i < times.arrivals.size(); ++i) {
    if (!times.arrivals[i].layerByHand && section.layerOf[i] > 0) {
      times.arrivals[i].layer = section.layerOf[i];
    }
  }
}

/// All that follows from the settled assignment and the section.
void conclude(const Survey& survey, Interpretation& interpretation) {
  interpretation.branches = findBranches(interpretation.times);
  interpretation.reciprocals = reciprocalPairs(interpretation.times);
  interpretation.triggerCorrections =
      suggestedTriggerCorrections(interpretation.times, interpretation.branches, interpretation.reciprocals);
  interpretation.opinions = secondOpinions(interpretation.times, interpretation.branches);
  for (Opinion& opinion : markedOpinions(survey, interpretation.branches)) {
    interpretation.opinions.push_back(std::move(opinion));
  }
  interpretation.doubts = findDoubts(survey, interpretation);
}

}  // namespace

int Interpretation::arrivalOf(int shot, int trace) const {
  return arrivalIndex(times, shot, trace);
}

Interpretation interpret(const Survey& survey, const Progress& progress) {
  Interpretation interpretation;
  interpretation.times = travelTimes(survey);
  interpretation.section = solveSection(interpretation.times, sectionOptions(survey), progress);
  takeLayers(interpretation.times, interpretation.section, survey.settings.layers);
  conclude(survey, interpretation);
  return interpretation;
}

Interpretation interpretLive(const Survey& survey, const Interpretation& before) {
  if (!before.section.determined) {
    return interpret(survey);
  }
  Interpretation interpretation;
  interpretation.times = travelTimes(survey);
  for (Arrival& arrival : interpretation.times.arrivals) {
    if (!arrival.layerByHand) {
      const int old = before.arrivalOf(arrival.shot, arrival.trace);
      arrival.layer = old >= 0 ? before.times.arrivals[static_cast<std::size_t>(old)].layer : 0;
    }
  }
  interpretation.section = resolveSection(interpretation.times, sectionOptions(survey), before.section.memory);
  takeLayers(interpretation.times, interpretation.section, survey.settings.layers);
  conclude(survey, interpretation);
  return interpretation;
}

}  // namespace strikeplate
