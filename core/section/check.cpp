#include "core/section/check.h"

#include <algorithm>
#include <cmath>
#include <set>

#include "core/section/model.h"

namespace strikeplate {
namespace {

constexpr std::size_t kLeastStations = 3;
constexpr std::size_t kLeastPicks = 5;

std::string nameOf(const Arrival& a) {
  return "shot " + std::to_string(a.shot + 1) + ", trace " + std::to_string(a.trace + 1);
}

std::string whyNotPlace(const TravelTimes& times) {
  for (const Geophone& g : times.geophones) {
    if (!std::isfinite(g.x) || !std::isfinite(g.elevation)) {
      return "A geophone's position or elevation is not a number; put the geometry right.";
    }
  }
  for (const ShotPoint& s : times.shots) {
    if (!std::isfinite(s.x) || !std::isfinite(s.elevation) || !std::isfinite(s.depth)) {
      return "A shot's position, elevation or depth is not a number; put the geometry right.";
    }
  }
  return {};
}

std::string whyNotArrival(const TravelTimes& times, const Arrival& a) {
  const auto within = [](int i, std::size_t n) { return i >= 0 && static_cast<std::size_t>(i) < n; };
  if (!within(a.shot, times.shots.size()) || !within(a.geophone, times.geophones.size())) {
    return "The arrival of " + nameOf(a) + " belongs to no known place; put the geometry right.";
  }
  if (!std::isfinite(a.time)) {
    return "The time of " + nameOf(a) + " is not a number; pick it again or leave it out.";
  }
  if (!(a.sigma > 0.0) || !std::isfinite(a.sigma)) {
    return "The sigma of " + nameOf(a) + " is not a positive number; give the pick an uncertainty.";
  }
  return {};
}

}  // namespace

std::string whyNoSection(const TravelTimes& times, const SectionOptions& options) {
  if (options.layers != 0 && (options.layers < 2 || options.layers > kMostLayers)) {
    return "A section has 2 to " + std::to_string(kMostLayers) + " layers; choose a number in between.";
  }
  if (times.arrivals.empty()) {
    return "There are no first-break picks; pick the records first.";
  }
  std::string why = whyNotPlace(times);
  std::set<double> stations;
  bool allHeldInFirst = true;
  for (std::size_t i = 0; i < times.arrivals.size() && why.empty(); ++i) {
    const Arrival& a = times.arrivals[i];
    why = whyNotArrival(times, a);
    if (why.empty()) {
      stations.insert(times.geophones[a.geophone].x);
      allHeldInFirst = allHeldInFirst && a.layerByHand && a.layer == 1;
    }
  }
  if (!why.empty()) {
    return why;
  }
  if (allHeldInFirst) {
    return "Every arrival is assigned to layer 1, so no refractor was met; assign the far ones to layer 2 or use a "
           "longer line.";
  }
  if (stations.size() < kLeastStations || times.arrivals.size() < kLeastPicks) {
    return "Picks at " + std::to_string(stations.size()) + " stations (" + std::to_string(times.arrivals.size()) +
           " picks) are too few to tell two layers apart; pick more traces.";
  }
  return {};
}

}  // namespace strikeplate
