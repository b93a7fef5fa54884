#include "widgets/branch_drag.h"

#include <algorithm>
#include <cmath>

namespace strikeplate {
namespace {

constexpr int kMostLayer = 6;

const Arrival& at(const TravelTimes& times, int index) {
  return times.arrivals[static_cast<std::size_t>(index)];
}

/// The arrivals of a shot's side by rising offset.
std::vector<int> curveOf(const TravelTimes& times, int shot, int side) {
  std::vector<int> out;
  for (std::size_t i = 0; i < times.arrivals.size(); ++i) {
    const Arrival& a = times.arrivals[i];
    if (a.shot == shot && times.signedOffset(a) * side > 0.0) {
      out.push_back(static_cast<int>(i));
    }
  }
  std::stable_sort(out.begin(), out.end(),
                   [&](int a, int b) { return times.offset(at(times, a)) < times.offset(at(times, b)); });
  return out;
}

/// The layer that arrivals go to when the branch is drawn back from them; 0 where there is none.
int layerBeyond(const TravelTimes& times, const std::vector<int>& curve, std::ptrdiff_t neighbour, int layer,
                bool outwards) {
  if (neighbour >= 0 && neighbour < std::ssize(curve)) {
    const int there = at(times, curve[static_cast<std::size_t>(neighbour)]).layer;
    if (outwards ? there > layer : there > 0 && there < layer) {
      return there;
    }
  }
  const int next = outwards ? layer + 1 : layer - 1;
  return next <= kMostLayer ? next : 0;
}

}  // namespace

std::vector<BranchEnd> branchEnds(const std::vector<Branch>& branches, int shot) {
  std::vector<BranchEnd> ends;
  for (const Branch& branch : branches) {
    if (branch.shot != shot || branch.arrivals.empty()) {
      continue;
    }
    ends.push_back({shot, branch.side, branch.layer, true, branch.arrivals.back()});
    if (branch.layer > 1) {
      ends.push_back({shot, branch.side, branch.layer, false, branch.arrivals.front()});
    }
  }
  return ends;
}

int arrivalUnder(const TravelTimes& times, const BranchEnd& end, double x) {
  int nearest = end.arrival;
  double least = std::numeric_limits<double>::infinity();
  for (const int i : curveOf(times, end.shot, end.side)) {
    const double distance = std::abs(times.geophones[static_cast<std::size_t>(at(times, i).geophone)].x - x);
    if (distance < least) {
      least = distance;
      nearest = i;
    }
  }
  return nearest;
}

Edit slideBranchEnd(const Survey& survey, const TravelTimes& times, const BranchEnd& end, int to) {
  const std::vector<int> curve = curveOf(times, end.shot, end.side);
  const auto place = [&curve](int arrival) { return std::find(curve.begin(), curve.end(), arrival) - curve.begin(); };
  std::ptrdiff_t first = std::ssize(curve);
  std::ptrdiff_t last = -1;
  for (std::ptrdiff_t i = 0; i < std::ssize(curve); ++i) {
    if (at(times, curve[static_cast<std::size_t>(i)]).layer == end.layer) {
      first = std::min(first, i);
      last = std::max(last, i);
    }
  }
  const std::ptrdiff_t target = place(to);
  if (last < 0 || target == std::ssize(curve)) {
    return {};
  }
  std::ptrdiff_t from = 0, until = 0;  // the arrivals that change, from <= i < until
  int layer = end.layer;
  if (end.far && target > last) {
    from = last + 1;
    until = target + 1;
  } else if (end.far) {
    from = std::max(target, first) + 1;
    until = last + 1;
    layer = layerBeyond(times, curve, last + 1, end.layer, true);
  } else if (target < first) {
    from = target;
    until = first;
  } else {
    from = first;
    until = std::min(target, last);
    layer = layerBeyond(times, curve, first - 1, end.layer, false);
  }
  std::vector<int> traces;
  for (std::ptrdiff_t i = from; i < until && layer > 0; ++i) {
    traces.push_back(at(times, curve[static_cast<std::size_t>(i)]).trace);
  }
  if (traces.empty()) {
    return {};
  }
  Edit edit = edits::assignLayer(survey, end.shot, traces, layer);
  edit.text = "Move " + std::string(end.far ? "far" : "near") + " end of the layer " + std::to_string(end.layer) +
              " branch, shot " + std::to_string(end.shot + 1);
  return edit;
}

Edit assignTraces(const Survey& survey, const std::vector<TraceOfShot>& traces, int layer) {
  Edit edit;
  for (std::size_t i = 0; i < traces.size();) {
    const int shot = traces[i].shot;
    std::vector<int> ofShot;
    for (; i < traces.size() && traces[i].shot == shot; ++i) {
      ofShot.push_back(traces[i].trace);
    }
    Edit part = edits::assignLayer(survey, shot, ofShot, layer);
    edit.changes.insert(edit.changes.end(), part.changes.begin(), part.changes.end());
    edit.text = edit.text.empty()
                    ? part.text
                    : "Assign " + std::to_string(traces.size()) + " picks to layer " + std::to_string(layer);
  }
  return edit;
}

}  // namespace strikeplate
