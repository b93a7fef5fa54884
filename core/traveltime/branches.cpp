#include "core/traveltime/branches.h"

#include <algorithm>
#include <cmath>
#include <map>
#include <tuple>

#include "core/traveltime/line_fit.h"

namespace strikeplate {
namespace {

void fitBranch(const TravelTimes& times, Branch& branch) {
  std::sort(branch.arrivals.begin(), branch.arrivals.end(), [&times](int a, int b) {
    return times.offset(times.arrivals[static_cast<std::size_t>(a)]) <
           times.offset(times.arrivals[static_cast<std::size_t>(b)]);
  });
  std::vector<FitPoint> points;
  for (const int index : branch.arrivals) {
    const Arrival& a = times.arrivals[static_cast<std::size_t>(index)];
    points.push_back({times.offset(a), a.time, a.sigma});
  }
  const bool direct = branch.layer == 1 && !(times.shots[static_cast<std::size_t>(branch.shot)].depth > 0.0);
  branch.fit = direct ? fitLineThroughOrigin(points) : fitLine(points);
  branch.velocity = branch.fit.determined ? Estimate::fromSlowness(branch.fit.slope, std::sqrt(branch.fit.varSlope))
                                          : Estimate::none(branch.fit.reason);
}

}  // namespace

std::vector<Branch> findBranches(const TravelTimes& times) {
  std::map<std::tuple<int, int, int>, Branch> found;
  for (std::size_t i = 0; i < times.arrivals.size(); ++i) {
    const Arrival& a = times.arrivals[i];
    const double offset = times.signedOffset(a);
    if (a.layer < 1 || offset == 0.0) {
      continue;
    }
    const int side = offset > 0.0 ? 1 : -1;
    Branch& branch = found[{a.shot, -side, a.layer}];
    branch.shot = a.shot;
    branch.side = side;
    branch.layer = a.layer;
    branch.arrivals.push_back(static_cast<int>(i));
  }
  std::vector<Branch> branches;
  for (auto& [key, branch] : found) {
    fitBranch(times, branch);
    branches.push_back(std::move(branch));
  }
  return branches;
}

const Branch* findBranch(const std::vector<Branch>& branches, int shot, int side, int layer) {
  const auto found = std::find_if(branches.begin(), branches.end(), [=](const Branch& b) {
    return b.shot == shot && b.side == side && b.layer == layer;
  });
  return found == branches.end() ? nullptr : &*found;
}

Crossover crossover(const LineFit& nearer, const LineFit& farther) {
  Crossover result;
  const double slopes = nearer.slope - farther.slope;
  if (!nearer.determined || !farther.determined || !(slopes > 0.0)) {
    result.offset = Estimate::none("the farther branch is not the flatter one");
    return result;
  }
  const double x = (farther.intercept - nearer.intercept) / slopes;
  if (!(x > 0.0)) {
    result.offset = Estimate::none("the branches cross behind the shot");
    return result;
  }
  // dx/da2 = 1/slopes, dx/db2 = x/slopes, and the opposite for the nearer line: the variance of the time difference
  // at x.
  const double variance = (varianceAt(nearer, x) + varianceAt(farther, x)) / (slopes * slopes);
  result.offset = Estimate::normal(x, std::sqrt(variance));
  result.time = nearer.at(x);
  return result;
}

}  // namespace strikeplate
