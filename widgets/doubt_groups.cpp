#include "widgets/doubt_groups.h"

#include <algorithm>
#include <cmath>

namespace strikeplate {
namespace {

// Residual over sigma of the pick that a doubt is about; 0 for a doubt about something else.
double strength(const Interpretation& interpretation, const Doubt& doubt) {
  const int arrival = doubt.shot >= 0 && doubt.trace >= 0 ? interpretation.arrivalOf(doubt.shot, doubt.trace) : -1;
  const auto& predicted = interpretation.section.predicted;
  if (arrival < 0 || static_cast<std::size_t>(arrival) >= predicted.size()) {
    return 0.0;
  }
  const Arrival& a = interpretation.times.arrivals[static_cast<std::size_t>(arrival)];
  const double misfit = std::abs(a.time - predicted[static_cast<std::size_t>(arrival)]) / a.sigma;
  return std::isfinite(misfit) ? misfit : 0.0;
}

}  // namespace

std::vector<DoubtGroup> doubtGroups(const Interpretation& interpretation) {
  std::vector<DoubtGroup> groups;
  for (std::size_t i = 0; i < interpretation.doubts.size(); ++i) {
    const QString kind = QString::fromStdString(interpretation.doubts[i].kind);
    auto group = std::find_if(groups.begin(), groups.end(), [&](const DoubtGroup& g) { return g.kind == kind; });
    if (group == groups.end()) {
      groups.push_back({kind, {}});
      group = groups.end() - 1;
    }
    group->doubts.push_back(i);
  }
  for (DoubtGroup& group : groups) {
    std::stable_sort(group.doubts.begin(), group.doubts.end(), [&](std::size_t a, std::size_t b) {
      return strength(interpretation, interpretation.doubts[a]) > strength(interpretation, interpretation.doubts[b]);
    });
  }
  return groups;
}

}  // namespace strikeplate
