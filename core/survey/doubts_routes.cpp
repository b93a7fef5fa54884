// Doubts from the other routes to the same depth, and from what no route can see.
#include <algorithm>
#include <cmath>
#include <map>

#include "core/base/numbers.h"
#include "core/base/units.h"
#include "core/methods/blind_zone.h"
#include "core/survey/doubts.h"

namespace strikeplate::doubt_rules {
namespace {

/// How one route compares with the section on one interface.
struct Comparison {
  int count = 0, outside = 0;
  double sum = 0.0;    ///< of (route - section), m
  double worst = 0.0;  ///< largest absolute difference, m
  double worstX = 0.0;
};

/// Share of the depth to which refraction by hand is commonly held to be good; common practice, no source.
constexpr double kRouteAccuracy = 0.1;

std::string likelyCause(const std::string& route) {
  if (route.find("plus-minus") != std::string::npos || route.find("reciprocal") != std::string::npos) {
    return "A wrong reciprocal time shifts every depth of this route; relief or dip beyond its assumptions does too.";
  }
  if (route.find("dipping") == std::string::npos) {
    return "It assumes flat layers under the shot; dip, relief or a lateral change of velocity would do it.";
  }
  return "It assumes plane layers between the two shots; relief or a wrong assignment would do it.";
}

}  // namespace

void opinions(const Survey& survey, const Interpretation& interpretation, std::vector<Doubt>& doubts) {
  const Units units{survey.settings.feet};
  std::map<std::pair<int, std::string>, Comparison> comparisons;
  for (const Opinion& opinion : interpretation.opinions) {
    const Estimate section = interpretation.section.depthAt(opinion.layer, opinion.x);
    if (!opinion.depth.determined || !section.determined) {
      continue;
    }
    Comparison& c = comparisons[{opinion.layer, opinion.route}];
    const double difference = opinion.depth.value - section.value;
    // The bars of a route hold its picks' errors, not what its assumptions cost.
    const double allowed =
        std::hypot(kNormal95 * std::hypot(opinion.depth.sigma, section.sigma), kRouteAccuracy * section.value);
    ++c.count;
    c.outside += std::abs(difference) > allowed ? 1 : 0;
    c.sum += difference;
    if (std::abs(difference) > std::abs(c.worst)) {
      c.worst = difference;
      c.worstX = opinion.x;
    }
  }
  for (const auto& [key, c] : comparisons) {
    // One in five beyond the bars is more than the bars' own one in twenty by chance.
    if (c.outside * 5 <= c.count) {
      continue;
    }
    Doubt doubt;
    doubt.kind = "second opinion";
    doubt.layer = key.first;
    doubt.x = c.worstX;
    doubt.where = "layer " + std::to_string(key.first) + ", " + key.second;
    doubt.says = "The depth to layer " + std::to_string(key.first) + " by " + key.second +
                 " differs from the section beyond both error bars and a tenth of the depth at " + std::to_string(c.outside) + " of " +
                 std::to_string(c.count) + " places.";
    doubt.restsOn = "Mean difference " + units.length(c.sum / c.count, 2) + ", largest " + units.length(c.worst, 2) +
                    " at " + units.length(c.worstX) + ".";
    doubt.wouldSettle = likelyCause(key.second);
    doubts.push_back(std::move(doubt));
  }
}

void hiddenLayers(const Survey& survey, const Interpretation& interpretation, std::vector<Doubt>& doubts) {
  const Units units{survey.settings.feet};
  const Section& section = interpretation.section;
  if (!section.determined || survey.geophones.empty()) {
    return;
  }
  const double middle = survey.geophones[survey.geophones.size() / 2].x;
  for (const SectionInterface& interface : section.interfaces) {
    const auto below = static_cast<std::size_t>(interface.layer - 1);
    const Estimate top =
        interface.layer > 2 ? section.depthAt(interface.layer - 1, middle) : Estimate::normal(0.0, 0.0);
    const Estimate depth = section.depthAt(interface.layer, middle);
    if (!top.determined || !depth.determined) {
      continue;
    }
    const auto worst = worstHiddenLayer(section.velocities[below - 1].value, section.velocities[below].value,
                                        depth.value - top.value);
    if (!worst || worst->deepest - (depth.value - top.value) < 0.1 * depth.value) {
      continue;
    }
    Doubt doubt;
    doubt.kind = "hidden layer";
    doubt.layer = interface.layer;
    doubt.x = middle;
    doubt.where = "above layer " + std::to_string(interface.layer);
    doubt.says = "A layer that never arrives first could hide above layer " + std::to_string(interface.layer) +
                 "; its top could then lie as deep as " + units.length(top.value + worst->deepest) + " instead of " +
                 units.length(depth.value) + " at " + units.length(middle, 0) + ".";
    doubt.restsOn = "Worst case over hidden velocities: " + units.length(worst->thickness) + " of ground at " +
                    units.velocity(worst->velocity) + ".";
    doubt.wouldSettle = "A borehole; no first arrival can show such a layer.";
    doubts.push_back(std::move(doubt));
  }
}

}  // namespace strikeplate::doubt_rules
