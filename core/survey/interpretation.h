#pragma once

#include <string>
#include <vector>

#include "core/base/progress.h"
#include "core/methods/opinion.h"
#include "core/section/section.h"
#include "core/survey/survey.h"
#include "core/traveltime/arrivals.h"
#include "core/traveltime/branch.h"
#include "core/traveltime/reciprocity.h"

namespace strikeplate {

/// A reason not to trust something.
struct Doubt {
  std::string kind;                      ///< short and stable, such as "reciprocal time"
  std::string where;                     ///< in words, such as "shot 3, traces 14 to 17"
  std::string says;                      ///< one sentence
  std::string restsOn;                   ///< what it rests on, with numbers
  std::string wouldSettle;               ///< what would settle it
  int shot = -1, trace = -1, layer = 0;  ///< what to select to see the evidence; -1 and 0 where it does not apply
  double x = Estimate::kNaN;             ///< m, where on the line
};

/// Everything the program concludes from a survey. Plain data; a pure function of the survey.
struct Interpretation {
  TravelTimes times;  ///< used picks, with the layer that was settled on
  std::vector<Branch> branches;
  std::vector<ReciprocalPair> reciprocals;
  std::vector<Estimate> triggerCorrections;  ///< s, what each shot's times still seem to lack; for each shot
  std::vector<Opinion> opinions;
  Section section;
  std::vector<Doubt> doubts;

  /// Index into times.arrivals for a shot's trace, or -1.
  [[nodiscard]] int arrivalOf(int shot, int trace) const;
};

/// The whole interpretation: assignment, branches, hand methods, section, doubts.
Interpretation interpret(const Survey& survey, const Progress& progress = {});

/// The same while a gesture is under way: number of layers, automatic assignments of unchanged picks and learnt
/// hyperparameters are held as in `before`; bands included.
Interpretation interpretLive(const Survey& survey, const Interpretation& before);

/// One sentence that is true now, such as "Layer 2 under 46 m: 5.8 m (5.5 to 6.2 m), 3 doubts". x in m.
std::string answerLine(const Survey& survey, const Interpretation& interpretation, double x);

}  // namespace strikeplate
