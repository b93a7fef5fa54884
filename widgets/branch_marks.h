#pragma once

#include <vector>

#include "core/survey/interpretation.h"
#include "core/survey/survey.h"

namespace strikeplate {

/// A distance on a shot's curve that its branches or the user's mark give.
struct BranchMark {
  enum class Kind { Crossover, Critical, CriticalByHand, ReflectionByHand };
  Kind kind = Kind::Crossover;
  int shot = 0;
  int side = 1;         ///< as Branch::side; 0 where it is about both sides
  int layer = 2;        ///< the deeper layer
  double offset = 0.0;  ///< m from the shot
  double sigma = 0.0;   ///< m, or s for a reflection time
  double time = 0.0;    ///< s, where it stands on the time axis
};

/// Crossover distance of every two neighbouring branches of a shot (crossover() of traveltime/branches.h); the
/// critical distance of layer 2 that its intercept time i means under level layers, x = i v1^2 v2/(v2^2 - v1^2) with
/// v = 1/s, sigma from its intercept alone; and the user's own marks. Source: Sheriff and Geldart, Exploration
/// Seismology (1995).
std::vector<BranchMark> branchMarks(const Survey& survey, const Interpretation& interpretation, int shot);

}  // namespace strikeplate
