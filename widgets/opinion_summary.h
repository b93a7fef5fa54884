#pragma once

#include <vector>

#include "core/survey/interpretation.h"

namespace strikeplate {

/// One second opinion beside the section.
struct OpinionRow {
  const Opinion* opinion = nullptr;  ///< into Interpretation::opinions
  Estimate section;                  ///< m, what the section says at the opinion's own position
  bool disagrees = false;            ///< beyond both 95 % errors together
};

/// All routes to one depth.
struct OpinionSummary {
  int layer = 2;                             ///< the depth is to its top
  double x = Estimate::kNaN;                 ///< m
  Estimate section;                          ///< m, what the section says at x
  std::vector<OpinionRow> rows;              ///< determined ones, by route in the order in which they come
  std::vector<const Opinion*> undetermined;  ///< routes that could not be gone anywhere on this layer, one each
  int count = 0;                             ///< of depths in the means
  double weightedMean = Estimate::kNaN;      ///< m, weights 1/sigma^2
  double mean = Estimate::kNaN;              ///< m
  double deviation = Estimate::kNaN;         ///< m, sample standard deviation; NaN below two
};

/// Every route's depths to the top of `layer` at the position nearest to x (m) where the route gives one. A route
/// that gives depths at many positions is read at one, so that each counts alike. Disagreement: the difference
/// exceeds 1.96 sqrt(s1^2 + s2^2), as for two independent estimates.
OpinionSummary opinionsAt(const Interpretation& interpretation, int layer, double x);

}  // namespace strikeplate
