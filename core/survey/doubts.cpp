#include "core/survey/doubts.h"

#include <algorithm>

#include "core/base/units.h"

namespace strikeplate {

std::string answerTo(const Survey& survey, const Doubt& doubt) {
  const auto answer =
      std::find_if(survey.doubtAnswers.begin(), survey.doubtAnswers.end(),
                   [&doubt](const DoubtAnswer& a) { return a.kind == doubt.kind && a.where == doubt.where; });
  return answer == survey.doubtAnswers.end() ? std::string() : answer->note;
}

std::string shotName(const Survey& survey, int shot) {
  const Units units{survey.settings.feet};
  return "shot " + std::to_string(shot + 1) + " at " +
         units.length(survey.shots[static_cast<std::size_t>(shot)].point.x);
}

std::vector<Doubt> findDoubts(const Survey& survey, const Interpretation& interpretation) {
  using Rule = void (*)(const Survey&, const Interpretation&, std::vector<Doubt>&);
  // What can make every depth wrong comes first, what touches one pick or one file comes last.
  static constexpr Rule kRules[] = {
      doubt_rules::triggers,   doubt_rules::reciprocalTimes, doubt_rules::boreholes,     doubt_rules::coverage,
      doubt_rules::velocities, doubt_rules::layerCount,      doubt_rules::hiddenLayers,  doubt_rules::opinions,
      doubt_rules::depths,     doubt_rules::assignment,      doubt_rules::lateGeophones, doubt_rules::picks,
      doubt_rules::files,
  };
  std::vector<Doubt> doubts;
  for (const Rule rule : kRules) {
    rule(survey, interpretation, doubts);
  }
  return doubts;
}

}  // namespace strikeplate
