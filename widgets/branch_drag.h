#pragma once

#include <optional>
#include <vector>

#include "core/survey/edit.h"
#include "core/traveltime/arrivals.h"
#include "core/traveltime/branch.h"

namespace strikeplate {

/// One end of a branch, which the user can take and slide along the curve.
struct BranchEnd {
  int shot = 0;
  int side = 1;  ///< as Branch::side
  int layer = 1;
  bool far = true;  ///< the end at the larger offset
  int arrival = 0;  ///< index into TravelTimes::arrivals of the pick at this end
  bool operator==(const BranchEnd&) const = default;
};

/// The ends of a shot's branches that can be slid: every far end, and the near ends of all layers but the first.
std::vector<BranchEnd> branchEnds(const std::vector<Branch>& branches, int shot);

/// The arrival on the end's shot and side whose geophone is nearest to x (m); the end's own arrival when there is
/// none nearer.
int arrivalUnder(const TravelTimes& times, const BranchEnd& end, double x);

/// What the assignment becomes when the end is slid to the arrival `to` on its curve: what it is drawn over joins its
/// layer; what it is drawn back from goes to the branch beyond, or, where there is none, to the next layer outwards
/// or inwards. A branch keeps at least one arrival. No changes when nothing moves or there is no layer to go to.
Edit slideBranchEnd(const Survey& survey, const TravelTimes& times, const BranchEnd& end, int to);

/// Gives the picks of many traces to a layer, 0 back to the program. Traces without a pick are passed over.
struct TraceOfShot {
  int shot = 0;
  int trace = 0;
  auto operator<=>(const TraceOfShot&) const = default;
};
Edit assignTraces(const Survey& survey, const std::vector<TraceOfShot>& traces, int layer);

}  // namespace strikeplate
