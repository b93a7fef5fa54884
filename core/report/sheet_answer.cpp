#include <algorithm>
#include <cmath>
#include <limits>

#include "core/base/numbers.h"
#include "core/report/sheet_parts.h"

namespace strikeplate {
namespace {

std::string layerName(int layer) {
  return "layer " + std::to_string(layer);
}

// "the top of layer 2 lies 3.9 to 8.1 m below the ground (95 %: 3.5 to 8.9 m)"
std::string depthClause(const SheetSource& source, int layer) {
  const auto along = depthAlongLine(source.survey, source.interpretation.section, layer);
  if (!along) {
    return "the depth of the top of " + layerName(layer) + " is " + kNotDetermined;
  }
  const int decimals = source.words.depthDecimals;
  Estimate outer = along->least;
  outer.low95 = along->low95;
  outer.high95 = along->high95;
  return "the top of " + layerName(layer) + " lies " +
         source.words.units.lengthRange(along->least.value, along->most.value, decimals) +
         " below the ground (95 % interval over the line " + source.words.depthInterval(outer) + ")";
}

std::string velocityClause(const SheetSource& source, std::size_t index) {
  const Estimate& v = source.interpretation.section.velocities[index];
  return source.words.velocity(v) + " in " + layerName(static_cast<int>(index) + 1);
}

template <class Item, class Clause>
std::string joined(const std::vector<Item>& items, const Clause& clause, const std::string& between) {
  std::string text;
  for (std::size_t i = 0; i < items.size(); ++i) {
    text += (i > 0 ? between : "") + clause(i);
  }
  return text;
}

std::vector<std::string> layerRow(const SheetSource& source, int layer) {
  const Section& section = source.interpretation.section;
  const Estimate& v = section.velocities[static_cast<std::size_t>(layer) - 1];
  std::vector<std::string> row = {std::to_string(layer),
                                  v.determined ? source.words.units.velocity(v.value) : kNotDetermined,
                                  source.words.velocityInterval(v)};
  if (layer == 1) {
    row.insert(row.end(), {"at the ground", "", "", ""});
    return row;
  }
  const auto along = depthAlongLine(source.survey, section, layer);
  if (!along) {
    row.insert(row.end(), 4, kNotDetermined);
    return row;
  }
  row.push_back(source.words.depth(along->least) + " at " + source.words.place(along->leastX));
  row.push_back(source.words.depth(along->mean));
  row.push_back(source.words.depth(along->most) + " at " + source.words.place(along->mostX));
  row.push_back(source.words.angle(section.interfaces[static_cast<std::size_t>(layer) - 2].meanDip));
  return row;
}

}  // namespace

std::optional<DepthAlongLine> depthAlongLine(const Survey& survey, const Section& section, int layer) {
  DepthAlongLine along;
  along.layer = layer;
  along.low95 = std::numeric_limits<double>::infinity();
  along.high95 = -along.low95;
  double value = 0.0, low = 0.0, high = 0.0;
  for (const Geophone& geophone : survey.geophones) {
    const Estimate depth = section.depthAt(layer, geophone.x);
    if (!depth.determined) {
      continue;
    }
    if (along.determined == 0 || depth.value < along.least.value) {
      along.least = depth;
      along.leastX = geophone.x;
    }
    if (along.determined == 0 || depth.value > along.most.value) {
      along.most = depth;
      along.mostX = geophone.x;
    }
    ++along.determined;
    value += depth.value;
    low += depth.low95;
    high += depth.high95;
    along.low95 = std::min(along.low95, depth.low95);
    along.high95 = std::max(along.high95, depth.high95);
  }
  if (along.determined == 0) {
    return std::nullopt;
  }
  along.mean.determined = true;
  along.mean.value = value / along.determined;
  along.mean.low95 = low / along.determined;
  along.mean.high95 = high / along.determined;
  return along;
}

std::string sheetQuestion(const SheetSource& source) {
  const std::vector<Geophone>& geophones = source.survey.geophones;
  const std::string where = geophones.empty() ? ""
                                              : " between " + source.words.place(geophones.front().x) + " and " +
                                                    source.words.place(geophones.back().x) + " along the line";
  return "How deep do the layers of the ground lie" + where + ", and how fast do waves travel in them?";
}

std::string sheetAnswer(const SheetSource& source) {
  const Section& section = source.interpretation.section;
  if (!section.determined) {
    return "The depth is " + std::string(kNotDetermined) + ": " + sentence(section.reason);
  }
  const std::vector<Geophone>& geophones = source.survey.geophones;
  std::string text = "Between " + source.words.place(geophones.front().x) + " and " +
                     source.words.place(geophones.back().x) + " along the line ";
  text += joined(
      section.interfaces, [&](std::size_t i) { return depthClause(source, section.interfaces[i].layer); }, "; ");
  text += ". The wave velocity is " +
          joined(
              section.velocities, [&](std::size_t i) { return velocityClause(source, i); }, "; ") +
          ".";
  return text;
}

SheetTable sheetLayers(const SheetSource& source) {
  const Section& section = source.interpretation.section;
  SheetTable table;
  table.title = "Layers";
  table.columns = {"Layer", "Velocity", "95 % interval", "Depth to top, least", "mean", "most", "Dip"};
  for (int layer = 1; section.determined && layer <= static_cast<int>(section.velocities.size()); ++layer) {
    table.rows.push_back(layerRow(source, layer));
  }
  table.note =
      "Depths below the ground, under the geophones, with 95 % intervals. The interval of the mean is the mean of "
      "the "
      "intervals. Dip is positive where the interface deepens towards larger distance.";
  table.summary =
      section.determined ? "" : "The section is " + std::string(kNotDetermined) + ": " + sentence(section.reason);
  return table;
}

// A name that has no room above the section is stood for by a number.
std::vector<std::string> sheetBoreholeMarks(const SheetSource& source) {
  constexpr std::size_t kLongest = 14;
  std::vector<std::string> marks;
  for (const Borehole& hole : source.survey.boreholes) {
    const bool fits = !hole.name.empty() && hole.name.size() <= kLongest;
    marks.push_back(fits ? hole.name : "No. " + std::to_string(marks.size() + 1));
  }
  return marks;
}

SheetTable sheetBoreholes(const SheetSource& source) {
  SheetTable table;
  table.title = "Boreholes";
  table.columns = {"Borehole", "At", "Top of layer", "Drilled depth", "Section", "Difference", "In the section"};
  const std::vector<std::string> marks = sheetBoreholeMarks(source);
  for (std::size_t i = 0; i < marks.size(); ++i) {
    const Borehole& hole = source.survey.boreholes[i];
    const std::string name = hole.name.empty() ? kNotGiven : hole.name;
    const Estimate depth = source.interpretation.section.depthAt(hole.layer, hole.x);
    const double difference = depth.determined ? depth.value - hole.depth : Estimate::kNaN;
    table.rows.push_back(
        {marks[i] == name ? name : marks[i] + ": " + name, source.words.place(hole.x), std::to_string(hole.layer),
         source.words.depth(hole.depth) + " ± " + source.words.depth(kNormal95 * hole.sigma),
         source.words.depth(depth), source.words.depth(difference), hole.used ? "used as a datum" : "compared only"});
  }
  table.note = "± is the 95 % interval of the drilled depth. Difference is section minus drilled.";
  table.summary = table.rows.empty() ? "No borehole was given." : "";
  return table;
}

}  // namespace strikeplate
