#include "core/report/sheet_reach.h"

#include <algorithm>
#include <cmath>
#include <numeric>

#include "core/methods/blind_zone.h"
#include "core/report/sheet_parts.h"

namespace strikeplate {
namespace {

constexpr double kFaster = 1.5;  // times the last layer's velocity: what is looked for below the line's reach

double verticalSlowness(double v, double refractor) {
  return std::sqrt(1.0 / (v * v) - 1.0 / (refractor * refractor));
}

double longestOffset(const TravelTimes& times) {
  double most = 0.0;
  for (const Arrival& a : times.arrivals) {
    most = std::max(most, times.offset(a));
  }
  return most;
}

std::string hiddenLine(const SheetSource& source, int layer, double x) {
  const Section& section = source.interpretation.section;
  const Estimate top = layer > 2 ? section.depthAt(layer - 1, x) : Estimate::normal(0.0, 0.0);
  const Estimate depth = section.depthAt(layer, x);
  if (!top.determined || !depth.determined) {
    return "";
  }
  const auto below = static_cast<std::size_t>(layer) - 1;
  const auto worst =
      worstHiddenLayer(section.velocities[below - 1].value, section.velocities[below].value, depth.value - top.value);
  if (!worst) {
    return "";
  }
  return "Hidden-layer allowance at " + source.words.place(x) + ": up to " + source.words.depth(worst->thickness) +
         " of ground at " + source.words.units.velocity(worst->velocity) + " above layer " + std::to_string(layer) +
         " would never arrive first; the top of layer " + std::to_string(layer) + " would then lie " +
         source.words.depth(top.value + worst->deepest) + " deep instead of " + source.words.depth(depth.value) + ".";
}

std::string reachLine(const SheetSource& source) {
  const Section& section = source.interpretation.section;
  std::vector<double> velocities, thicknesses;
  double above = 0.0;
  for (std::size_t i = 0; i < section.velocities.size(); ++i) {
    velocities.push_back(section.velocities[i].value);
    if (i > 0) {
      const auto along = depthAlongLine(source.survey, section, static_cast<int>(i) + 1);
      if (!along) {
        return "";
      }
      thicknesses.push_back(along->mean.value - above);
      above = along->mean.value;
    }
  }
  const double offset = longestOffset(source.interpretation.times);
  if (velocities.empty()) {
    return "";
  }
  const double faster = kFaster * velocities.back();
  const auto depth = unseenBelow(velocities, thicknesses, offset, faster);
  if (!depth) {
    return "";
  }
  return "Reach: the longest offset with a used pick is " + source.words.place(offset) +
         ". With the mean depths of the table, ground of " + source.words.units.velocity(faster) + " (" +
         "half as fast again as layer " + std::to_string(velocities.size()) + ") deeper than about " +
         source.words.units.length(*depth, 0) + " would arrive first nowhere, and nothing is said about it.";
}

}  // namespace

std::optional<double> unseenBelow(const std::vector<double>& velocities, const std::vector<double>& thicknesses,
                                  double offset, double faster) {
  if (velocities.empty() || thicknesses.size() + 1 != velocities.size() || !(offset > 0.0)) {
    return std::nullopt;
  }
  std::vector<double> rising = velocities;
  rising.push_back(faster);
  if (!(rising.front() > 0.0) ||
      std::adjacent_find(rising.begin(), rising.end(), [](double a, double b) { return !(b > a); }) != rising.end()) {
    return std::nullopt;
  }
  const double last = velocities.back();
  double lead = offset * (1.0 / last - 1.0 / faster);
  for (std::size_t i = 0; i < thicknesses.size(); ++i) {
    lead += 2.0 * thicknesses[i] * (verticalSlowness(velocities[i], last) - verticalSlowness(velocities[i], faster));
  }
  const double known = std::accumulate(thicknesses.begin(), thicknesses.end(), 0.0);
  return known + std::max(0.0, lead / (2.0 * verticalSlowness(last, faster)));
}

std::vector<std::string> sheetReach(const SheetSource& source) {
  const Section& section = source.interpretation.section;
  std::vector<std::string> lines;
  if (!section.determined || source.survey.geophones.empty()) {
    return lines;
  }
  const double middle = source.survey.geophones[source.survey.geophones.size() / 2].x;
  for (const SectionInterface& interface : section.interfaces) {
    lines.push_back(hiddenLine(source, interface.layer, middle));
  }
  lines.push_back(reachLine(source));
  std::erase(lines, "");
  return lines;
}

}  // namespace strikeplate
