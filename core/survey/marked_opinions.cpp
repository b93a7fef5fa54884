#include "core/survey/marked_opinions.h"

#include <cmath>
#include <optional>
#include <utility>

#include "core/methods/two_layers.h"

namespace strikeplate {
namespace {

/// Velocity (m/s) of a layer at a shot; both sides weigh the same, since a dip makes one too slow and one too fast.
std::optional<Datum> velocityAt(const std::vector<Branch>& branches, int shot, int layer) {
  double slowness = 0.0, variance = 0.0;
  int count = 0;
  for (const Branch& branch : branches) {
    if (branch.shot == shot && branch.layer == layer && branch.fit.determined && branch.fit.slope > 0.0) {
      slowness += branch.fit.slope;
      variance += branch.fit.varSlope;
      ++count;
    }
  }
  if (count == 0) {
    return std::nullopt;
  }
  const double velocity = count / slowness;
  return Datum{velocity, velocity * velocity * std::sqrt(variance) / count};
}

Estimate depthOf(const ShotMark& mark, const std::vector<Branch>& branches, int shot) {
  const Datum datum{mark.value, mark.sigma};
  const auto v1 = velocityAt(branches, shot, 1);
  if (!v1) {
    return Estimate::none("the shot has no direct branch; give picks near it to layer 1");
  }
  if (mark.kind == MarkKind::ReflectionTime) {
    return depthFromReflection(datum, *v1);
  }
  const auto v2 = velocityAt(branches, shot, 2);
  return v2 ? depthFromCriticalDistance(datum, *v1, *v2)
            : Estimate::none("the shot has no branch of layer 2; give picks farther off to it");
}

}  // namespace

std::vector<Opinion> markedOpinions(const Survey& survey, const std::vector<Branch>& branches) {
  std::vector<Opinion> opinions;
  for (std::size_t s = 0; s < survey.shots.size(); ++s) {
    for (const ShotMark& mark : survey.shots[s].marks) {
      const bool reflection = mark.kind == MarkKind::ReflectionTime;
      Opinion opinion;
      opinion.route = reflection ? "reflection time" : "critical distance";
      opinion.layer = 2;
      opinion.shot = static_cast<int>(s);
      opinion.x = survey.shots[s].point.x;
      opinion.depth = depthOf(mark, branches, opinion.shot);
      opinion.assumes = reflection ? "a level interface under the shot, marked by hand at zero offset"
                                   : "level plane layers under the shot, marked by hand";
      opinions.push_back(std::move(opinion));
    }
  }
  return opinions;
}

}  // namespace strikeplate
