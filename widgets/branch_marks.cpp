#include "widgets/branch_marks.h"

#include <cmath>

#include "core/traveltime/branches.h"

namespace strikeplate {
namespace {

void addCrossover(const Branch& nearer, const Branch& farther, std::vector<BranchMark>& marks) {
  const Crossover crossing = crossover(nearer.fit, farther.fit);
  if (crossing.offset.determined) {
    marks.push_back({BranchMark::Kind::Crossover, nearer.shot, nearer.side, farther.layer, crossing.offset.value,
                     crossing.offset.sigma, crossing.time});
  }
}

void addCritical(const Branch& direct, const Branch& head, std::vector<BranchMark>& marks) {
  const double v1 = 1.0 / direct.fit.slope, v2 = 1.0 / head.fit.slope;
  const double perSecond = v1 * v1 * v2 / (v2 * v2 - v1 * v1);
  const double offset = head.fit.intercept * perSecond;
  if (v1 > 0.0 && v2 > v1 && offset > 0.0) {
    marks.push_back({BranchMark::Kind::Critical, head.shot, head.side, head.layer, offset,
                     perSecond * std::sqrt(head.fit.varIntercept), head.fit.at(offset)});
  }
}

}  // namespace

std::vector<BranchMark> branchMarks(const Survey& survey, const Interpretation& interpretation, int shot) {
  std::vector<BranchMark> marks;
  if (shot < 0 || static_cast<std::size_t>(shot) >= survey.shots.size()) {
    return marks;
  }
  for (const int side : {-1, 1}) {
    for (int layer = 2; layer <= interpretation.section.layers; ++layer) {
      const Branch* above = findBranch(interpretation.branches, shot, side, layer - 1);
      const Branch* below = findBranch(interpretation.branches, shot, side, layer);
      if (above == nullptr || below == nullptr || !above->fit.determined || !below->fit.determined) {
        continue;
      }
      addCrossover(*above, *below, marks);
      if (layer == 2) {
        addCritical(*above, *below, marks);
      }
    }
  }
  for (const ShotMark& mark : survey.shots[static_cast<std::size_t>(shot)].marks) {
    if (mark.kind == MarkKind::ReflectionTime) {
      marks.push_back({BranchMark::Kind::ReflectionByHand, shot, 0, 2, 0.0, mark.sigma, mark.value});
      continue;
    }
    for (const int side : {-1, 1}) {
      const Branch* head = findBranch(interpretation.branches, shot, side, 2);
      if (head != nullptr && head->fit.determined) {
        marks.push_back(
            {BranchMark::Kind::CriticalByHand, shot, side, 2, mark.value, mark.sigma, head->fit.at(mark.value)});
      }
    }
  }
  return marks;
}

}  // namespace strikeplate
