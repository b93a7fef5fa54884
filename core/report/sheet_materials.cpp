// Materials with a published velocity like the layers': a hint that has to look like one.
#include <algorithm>
#include <set>

#include "core/methods/material_hint.h"
#include "core/report/sheet_parts.h"

namespace strikeplate {
namespace {

// "300 to 700", without its unit: that stands once in front.
std::string rangeOf(const SheetSource& source, const MaterialRange& range) {
  std::string low = source.words.units.velocity(range.low);
  std::string high = source.words.units.velocity(range.high);
  low.erase(low.find(' '));
  high.erase(high.find(' '));
  return low + " to " + high;
}

std::string layerClause(const SheetSource& source, std::size_t index, std::set<std::string>& sources) {
  const Estimate& velocity = source.interpretation.section.velocities[index];
  std::string text = "layer " + std::to_string(index + 1) + ": ";
  if (!velocity.determined) {
    return text + kNotDetermined;
  }
  const std::vector<MaterialRange> ranges = materialHint(velocity);
  if (ranges.empty()) {
    return text + "no range published there";
  }
  for (std::size_t i = 0; i < ranges.size(); ++i) {
    sources.insert(ranges[i].source);
    text += (i > 0 ? ", " : "") + ranges[i].material + " (" + rangeOf(source, ranges[i]) + ")";
  }
  return text;
}

}  // namespace

std::string sheetMaterials(const SheetSource& source) {
  const Section& section = source.interpretation.section;
  if (!section.determined || section.velocities.empty()) {
    return "";
  }
  std::set<std::string> sources;
  std::string text =
      "Materials with a like velocity, a hint and not a finding (published ranges that touch the 95 % "
      "interval or come nearest, " +
      source.words.units.velocityUnit() + "): ";
  for (std::size_t i = 0; i < section.velocities.size(); ++i) {
    text += (i > 0 ? "; " : "") + layerClause(source, i, sources);
  }
  text += ". Many materials share a velocity; only drilling names the ground.";
  for (const std::string& name : sources) {
    text += " Source: " + name + ".";
  }
  return text;
}

}  // namespace strikeplate
