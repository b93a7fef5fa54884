#include "widgets/opinion_summary.h"

#include <algorithm>
#include <cmath>

namespace strikeplate {
namespace {

constexpr double kSamePlace = 0.01;  // m

void addMeans(OpinionSummary& summary) {
  double weights = 0.0, weighted = 0.0, sum = 0.0, squares = 0.0;
  for (const OpinionRow& row : summary.rows) {
    const Estimate& depth = row.opinion->depth;
    const double weight = depth.sigma > 0.0 ? 1.0 / (depth.sigma * depth.sigma) : 0.0;
    weights += weight;
    weighted += weight * depth.value;
    sum += depth.value;
    ++summary.count;
  }
  if (summary.count == 0) {
    return;
  }
  summary.mean = sum / summary.count;
  summary.weightedMean = weights > 0.0 ? weighted / weights : Estimate::kNaN;
  for (const OpinionRow& row : summary.rows) {
    squares += std::pow(row.opinion->depth.value - summary.mean, 2);
  }
  summary.deviation = summary.count > 1 ? std::sqrt(squares / (summary.count - 1)) : Estimate::kNaN;
}

}  // namespace

OpinionSummary opinionsAt(const Interpretation& interpretation, int layer, double x) {
  OpinionSummary summary;
  summary.layer = layer;
  summary.x = x;
  summary.section = interpretation.section.depthAt(layer, x);
  std::vector<std::string> routes;
  for (const Opinion& opinion : interpretation.opinions) {
    if (opinion.layer == layer && std::find(routes.begin(), routes.end(), opinion.route) == routes.end()) {
      routes.push_back(opinion.route);
    }
  }
  for (const std::string& route : routes) {
    std::vector<const Opinion*> all;
    for (const Opinion& opinion : interpretation.opinions) {
      if (opinion.layer == layer && opinion.route == route) {
        all.push_back(&opinion);
      }
    }
    const Opinion* without = all.front();
    std::erase_if(all, [](const Opinion* o) { return !o->depth.determined; });
    if (all.empty()) {
      summary.undetermined.push_back(without);
      continue;
    }
    const auto away = [x](const Opinion* o) { return std::abs(o->x - x); };
    const Opinion* nearest =
        *std::min_element(all.begin(), all.end(), [&](auto* a, auto* b) { return away(a) < away(b); });
    for (const Opinion* opinion : all) {
      if (std::abs(opinion->x - nearest->x) <= kSamePlace) {
        const Estimate section = interpretation.section.depthAt(layer, opinion->x);
        const double allowed = kNormal95 * std::hypot(opinion->depth.sigma, section.sigma);
        summary.rows.push_back(
            {opinion, section, section.determined && std::abs(opinion->depth.value - section.value) > allowed});
      }
    }
  }
  addMeans(summary);
  return summary;
}

}  // namespace strikeplate
