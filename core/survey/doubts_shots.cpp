// Doubts about whole shots: reciprocal times and triggers.
#include <algorithm>
#include <cmath>

#include "core/base/units.h"
#include "core/survey/doubts.h"

namespace strikeplate::doubt_rules {
namespace {

constexpr double kSmallestDelay = 1.0e-3;  // s; a smaller trigger error is within what a hammer switch does

bool triggerIsDoubtful(const Estimate& correction) {
  return correction.determined && std::abs(correction.value) > kSmallestDelay &&
         std::abs(correction.value) > 3.0 * correction.sigma;
}

bool triggerIsDoubtful(const Interpretation& interpretation, int shot) {
  const auto s = static_cast<std::size_t>(shot);
  return s < interpretation.triggerCorrections.size() && triggerIsDoubtful(interpretation.triggerCorrections[s]);
}

}  // namespace

void triggers(const Survey& survey, const Interpretation& interpretation, std::vector<Doubt>& doubts) {
  for (std::size_t s = 0; s < interpretation.triggerCorrections.size(); ++s) {
    const Estimate& correction = interpretation.triggerCorrections[s];
    if (!triggerIsDoubtful(correction)) {
      continue;
    }
    Doubt doubt;
    doubt.kind = "trigger";
    doubt.shot = static_cast<int>(s);
    doubt.x = survey.shots[s].point.x;
    doubt.where = shotName(survey, doubt.shot);
    doubt.says =
        "The times of " + doubt.where + " come " + milliseconds(std::abs(correction.value)) +
        (correction.value > 0 ? " too early, as after a late trigger." : " too late, as after an early trigger.");
    doubt.restsOn = "Its direct branch and its reciprocal times with the other shots, sigma " +
                    milliseconds(correction.sigma, 2) + ".";
    const auto& solved = interpretation.section.triggerDelays;
    if (s < solved.size() && solved[s].determined) {
      doubt.restsOn += " The section allows for " + milliseconds(std::abs(solved[s].value)) + " of it already.";
    }
    doubt.wouldSettle = "Apply the correction of " + milliseconds(correction.value) +
                        " (Picks, Trigger corrections) if the field notes agree; it can be undone and is printed.";
    doubts.push_back(std::move(doubt));
  }
}

void reciprocalTimes(const Survey& survey, const Interpretation& interpretation, std::vector<Doubt>& doubts) {
  for (const ReciprocalPair& pair : interpretation.reciprocals) {
    const double difference = pair.difference();
    const double allowed = std::max(1.0e-3, pair.tolerance);
    // A pair that a doubtful trigger explains would only say the same again.
    if (!(std::abs(difference) > allowed) || triggerIsDoubtful(interpretation, pair.shotA) ||
        triggerIsDoubtful(interpretation, pair.shotB)) {
      continue;
    }
    Doubt doubt;
    doubt.kind = "reciprocal time";
    doubt.shot = pair.shotA;
    doubt.x = survey.shots[static_cast<std::size_t>(pair.shotA)].point.x;
    doubt.where = shotName(survey, pair.shotA) + " and " + shotName(survey, pair.shotB);
    doubt.says = "The times between " + doubt.where + " differ by " + milliseconds(std::abs(difference)) + ".";
    doubt.restsOn = milliseconds(pair.timeAB) + " one way and " + milliseconds(pair.timeBA) +
                    " the other, where the picks allow " + milliseconds(allowed) + " (95 %).";
    doubt.wouldSettle = "Check the positions of both shots and the far picks of both records.";
    doubts.push_back(std::move(doubt));
  }
}

}  // namespace strikeplate::doubt_rules
