// Second opinions: one line for each route and interface, however many depths it gave.
#include <algorithm>
#include <map>
#include <utility>

#include "core/report/sheet_parts.h"

namespace strikeplate {
namespace {

struct Route {
  int all = 0;
  int agree = 0;
  std::vector<double> depths;       // m
  std::vector<double> differences;  // m, minus the section at the same place
};

bool overlap(const Estimate& a, const Estimate& b) {
  return a.low95 <= b.high95 && b.low95 <= a.high95;
}

void take(Route& route, const Opinion& opinion, const Section& section) {
  ++route.all;
  if (!opinion.depth.determined) {
    return;
  }
  route.depths.push_back(opinion.depth.value);
  const Estimate there = section.depthAt(opinion.layer, opinion.x);
  if (there.determined) {
    route.differences.push_back(opinion.depth.value - there.value);
    route.agree += overlap(opinion.depth, there) ? 1 : 0;
  }
}

double median(std::vector<double> values) {
  if (values.empty()) {
    return Estimate::kNaN;
  }
  std::sort(values.begin(), values.end());
  const std::size_t half = values.size() / 2;
  return values.size() % 2 == 1 ? values[half] : 0.5 * (values[half - 1] + values[half]);
}

std::string rangeOf(const SheetSource& source, const std::vector<double>& depths) {
  if (depths.empty()) {
    return kNotDetermined;
  }
  const auto [least, most] = std::minmax_element(depths.begin(), depths.end());
  return depths.size() == 1 ? source.words.depth(*least)
                            : source.words.units.lengthRange(*least, *most, source.words.depthDecimals);
}

}  // namespace

SheetTable sheetOpinions(const SheetSource& source) {
  std::map<std::pair<std::string, int>, Route> routes;
  for (const Opinion& opinion : source.interpretation.opinions) {
    take(routes[{opinion.route, opinion.layer}], opinion, source.interpretation.section);
  }
  SheetTable table;
  table.title = "Second opinions";
  table.columns = {"Route", "Layer", "Depths", "Range", "Median", "Minus section", "Agree"};
  for (const auto& [key, route] : routes) {
    const int compared = static_cast<int>(route.differences.size());
    table.rows.push_back({key.first, std::to_string(key.second),
                          std::to_string(route.depths.size()) + " of " + std::to_string(route.all),
                          rangeOf(source, route.depths),
                          route.depths.empty() ? "" : source.words.depth(median(route.depths)),
                          compared > 0 ? source.words.depth(median(route.differences)) : "",
                          compared > 0 ? std::to_string(route.agree) + " of " + std::to_string(compared) : ""});
  }
  table.note =
      "Depth to the top of the layer by other published methods. Minus section is the median difference at the same "
      "places; agree counts those whose 95 % interval meets the section's.";
  table.summary = table.rows.empty() ? "No other method has the picks it needs." : "";
  return table;
}

}  // namespace strikeplate
