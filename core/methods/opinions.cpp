#include "core/methods/opinions.h"

#include <cmath>
#include <string>
#include <utility>

#include "core/traveltime/branches.h"

namespace strikeplate {
namespace {

constexpr const char* kAssumes = "level plane layers under the shot, velocity growing with depth";

/// h = a / (2 q), q = sqrt(s1^2 - s2^2); gradient in (a, s1, s2) with the covariance of a and s2.
Estimate interceptDepth(const LineFit& direct, const LineFit& refracted) {
  const double q2 = direct.slope * direct.slope - refracted.slope * refracted.slope;
  if (!direct.determined || !refracted.determined || !(q2 > 0.0) || !(refracted.intercept > 0.0) ||
      !(refracted.slope > 0.0)) {
    return Estimate::none("the branches do not give a positive intercept and a velocity that grows with depth");
  }
  const double q = std::sqrt(q2);
  const double byA = 1.0 / (2.0 * q);
  const double byS1 = -refracted.intercept * direct.slope / (2.0 * q * q2);
  const double byS2 = refracted.intercept * refracted.slope / (2.0 * q * q2);
  const double variance = byA * byA * refracted.varIntercept + byS1 * byS1 * direct.varSlope +
                          byS2 * byS2 * refracted.varSlope + 2.0 * byA * byS2 * refracted.covariance;
  return Estimate::normal(refracted.intercept * byA, std::sqrt(variance));
}

Opinion opinionOf(const TravelTimes& times, const Branch& branch, std::string route, Estimate depth) {
  Opinion opinion;
  opinion.route = std::move(route);
  opinion.layer = branch.layer;
  opinion.shot = branch.shot;
  opinion.x = times.shots[static_cast<std::size_t>(branch.shot)].x;
  opinion.depth = std::move(depth);
  opinion.assumes = kAssumes;
  return opinion;
}

}  // namespace

std::vector<Opinion> secondOpinions(const TravelTimes& times, const std::vector<Branch>& branches) {
  std::vector<Opinion> opinions;
  for (const Branch& branch : branches) {
    if (branch.layer != 2) {
      continue;
    }
    const Branch* direct = findBranch(branches, branch.shot, branch.side, 1);
    if (direct != nullptr) {
      opinions.push_back(opinionOf(times, branch, "intercept time", interceptDepth(direct->fit, branch.fit)));
    }
  }
  return opinions;
}

}  // namespace strikeplate
