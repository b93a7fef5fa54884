#include <algorithm>
#include <cmath>
#include <map>
#include <utility>

#include "core/base/numbers.h"
#include "core/report/sheet_parts.h"

namespace strikeplate {
namespace {

// Count, mean and standard deviation of numbers that come one by one (Welford, Technometrics 4 (1962) 419-420).
struct Tally {
  int count = 0;
  double mean = 0.0;
  double squares = 0.0;

  void take(double value) {
    ++count;
    const double before = value - mean;
    mean += before / count;
    squares += before * (value - mean);
  }
  [[nodiscard]] double deviation() const { return count > 1 ? std::sqrt(squares / (count - 1)) : Estimate::kNaN; }
  [[nodiscard]] double rms() const { return count > 0 ? std::sqrt(squares / count + mean * mean) : Estimate::kNaN; }
};

struct Route {
  int all = 0;
  int compared = 0;
  int agree = 0;
  Tally depth, difference;
  std::string reason;
};

bool overlap(const Estimate& a, const Estimate& b) {
  return a.low95 <= b.high95 && b.low95 <= a.high95;
}

void take(Route& route, const Opinion& opinion, const Section& section) {
  ++route.all;
  if (!opinion.depth.determined) {
    route.reason = route.reason.empty() ? opinion.depth.reason : route.reason;
    return;
  }
  route.depth.take(opinion.depth.value);
  const Estimate there = section.depthAt(opinion.layer, opinion.x);
  if (there.determined) {
    ++route.compared;
    route.difference.take(opinion.depth.value - there.value);
    route.agree += overlap(opinion.depth, there) ? 1 : 0;
  }
}

std::string shotName(const SheetSource& source, int shot) {
  return std::to_string(shot + 1) + " at " +
         source.words.place(source.survey.shots[static_cast<std::size_t>(shot)].point.x);
}

std::string ms(double seconds, int decimals) {
  return std::isfinite(seconds) ? milliseconds(seconds, decimals) : kNotDetermined;
}

// Residuals of one shot's used picks, or of all shots for -1, s.
Tally residuals(const Interpretation& interpretation, int shot) {
  Tally tally;
  const std::vector<Arrival>& arrivals = interpretation.times.arrivals;
  const std::vector<double>& predicted = interpretation.section.predicted;
  for (std::size_t i = 0; i < arrivals.size() && i < predicted.size(); ++i) {
    if ((shot < 0 || arrivals[i].shot == shot) && std::isfinite(predicted[i])) {
      tally.take(arrivals[i].time - predicted[i]);
    }
  }
  return tally;
}

struct Origins {
  int automatic = 0, hand = 0, imported = 0, byHandAssigned = 0, traces = 0;

  void take(const Shot& shot) {
    traces += static_cast<int>(shot.traces.size());
    for (const ShotTrace& trace : shot.traces) {
      if (trace.pick) {
        automatic += trace.pick->origin == PickOrigin::Automatic ? 1 : 0;
        hand += trace.pick->origin == PickOrigin::Hand ? 1 : 0;
        imported += trace.pick->origin == PickOrigin::Imported ? 1 : 0;
        byHandAssigned += trace.pick->layer > 0 ? 1 : 0;
      }
    }
  }
  [[nodiscard]] int all() const { return automatic + hand + imported; }
};

double excess(const ReciprocalPair& pair) {
  return std::abs(pair.difference()) - pair.tolerance;
}

}  // namespace

SheetTable sheetOpinions(const SheetSource& source) {
  std::map<std::pair<std::string, int>, Route> routes;
  for (const Opinion& opinion : source.interpretation.opinions) {
    take(routes[{opinion.route, opinion.layer}], opinion, source.interpretation.section);
  }
  SheetTable table;
  table.title = "Second opinions";
  table.columns = {"Route", "Layer", "Depths", "Mean depth", "Spread", "Minus section", "Agree"};
  for (const auto& [key, route] : routes) {
    std::vector<std::string> row = {key.first, std::to_string(key.second),
                                    std::to_string(route.depth.count) + " of " + std::to_string(route.all)};
    row.push_back(source.words.depth(route.depth.count > 0 ? route.depth.mean : Estimate::kNaN));
    row.push_back(route.depth.count > 1 ? source.words.depth(route.depth.deviation()) : "");
    row.push_back(route.compared > 0 ? source.words.depth(route.difference.mean) : "");
    row.push_back(route.compared > 0 ? std::to_string(route.agree) + " of " + std::to_string(route.compared) : "");
    table.rows.push_back(std::move(row));
  }
  table.note =
      "The depth to the top of the layer by other published methods. Spread is one standard deviation of the depths; "
      "agree counts those "
      "whose 95 % interval meets the section's at the same place.";
  table.summary = table.rows.empty() ? "No other method has the picks it needs." : "";
  return table;
}

SheetTable sheetReciprocals(const SheetSource& source) {
  std::vector<ReciprocalPair> pairs = source.interpretation.reciprocals;
  std::stable_sort(pairs.begin(), pairs.end(),
                   [](const ReciprocalPair& a, const ReciprocalPair& b) { return excess(a) > excess(b); });
  SheetTable table;
  table.title = "Reciprocal times";
  table.columns = {"Shots", "There", "Back", "Difference", "Tolerance", "Within"};
  int within = 0;
  for (const ReciprocalPair& pair : pairs) {
    const bool good = excess(pair) <= 0.0;
    within += good ? 1 : 0;
    table.rows.push_back({std::to_string(pair.shotA + 1) + " and " + std::to_string(pair.shotB + 1),
                          ms(pair.timeAB, 1), ms(pair.timeBA, 1), ms(pair.difference(), 2), ms(pair.tolerance, 2),
                          good ? "yes" : "no"});
  }
  table.note =
      "There: the first shot read at the second, back: the second at the first; they should be equal. Tolerance is "
      "the 95 % interval from the picks' "
      "sigmas.";
  table.summary = pairs.empty()
                      ? "No two shots could be read at each other's place."
                      : std::to_string(within) + " of " + counted(static_cast<int>(pairs.size()), "pair", "pairs") +
                            " within the tolerance.";
  return table;
}

SheetTable sheetShots(const SheetSource& source) {
  SheetTable table;
  table.title = "Shots";
  table.columns = {"Shot", "Blows", "Picks", "By hand", "Residual rms", "Mean residual", "Trigger correction"};
  for (std::size_t s = 0; s < source.survey.shots.size(); ++s) {
    const Shot& shot = source.survey.shots[s];
    Origins origins;
    origins.take(shot);
    const Tally tally = residuals(source.interpretation, static_cast<int>(s));
    const auto used = std::count_if(shot.blows.begin(), shot.blows.end(), [](const Blow& b) { return b.used; });
    table.rows.push_back({shotName(source, static_cast<int>(s)), shot.blows.empty() ? "none" : std::to_string(used),
                          std::to_string(origins.all()) + " of " + std::to_string(origins.traces),
                          std::to_string(origins.hand), ms(tally.rms(), 2),
                          ms(tally.count > 0 ? tally.mean : Estimate::kNaN, 2), ms(shot.triggerCorrection, 2)});
  }
  table.note = "Residual is picked minus predicted time. The trigger correction is added to the recorder's time.";
  table.summary = table.rows.empty() ? "There is no shot." : "";
  return table;
}

SheetTable sheetDoubts(const SheetSource& source) {
  SheetTable table;
  table.title = "Doubts";
  table.columns = {"Where", "Doubt", "What would settle it"};
  for (const Doubt& doubt : source.interpretation.doubts) {
    table.rows.push_back({doubt.where, sentence(doubt.says), sentence(doubt.wouldSettle)});
  }
  table.summary = table.rows.empty() ? "The program's checks found nothing to doubt." : "";
  return table;
}

std::vector<std::string> sheetPicks(const SheetSource& source) {
  Origins origins;
  for (const Shot& shot : source.survey.shots) {
    origins.take(shot);
  }
  std::vector<std::string> lines = {counted(origins.all(), "first break was", "first breaks were") + " picked on " +
                                    counted(origins.traces, "trace", "traces") + ": " + std::to_string(origins.hand) +
                                    " by hand, " + std::to_string(origins.automatic) + " automatically, " +
                                    std::to_string(origins.imported) + " imported."};
  lines.push_back("The layer of " + counted(origins.byHandAssigned, "pick was", "picks was") +
                  " assigned by hand, of the others by the program.");
  if (source.options.edits >= 0) {
    lines.push_back(counted(source.options.edits, "edit is", "edits are") + " kept in the survey's history.");
  }
  return lines;
}

std::vector<std::string> sheetFit(const SheetSource& source) {
  const Section& section = source.interpretation.section;
  if (!section.determined) {
    return {"There is no section to compare the picks with."};
  }
  const Tally all = residuals(source.interpretation, -1);
  std::vector<std::string> lines = {"Residual rms of all " + counted(all.count, "used pick", "used picks") + ": " +
                                    ms(all.rms(), 2) + "; noise scale " + fixed(section.noiseScale, 2) +
                                    " times the picks' stated sigmas."};
  if (!section.converged) {
    lines.emplace_back("The solution had not settled when it was stopped; its intervals are not to be relied on.");
  }
  for (const LayerCountEvidence& other : section.layerCounts) {
    if (other.determined && other.layers != section.layers) {
      lines.push_back("Log evidence of " + counted(other.layers, "layer", "layers") + " relative to " +
                      std::to_string(section.layers) + ": " + fixed(other.logEvidence, 1) + ".");
    }
  }
  return lines;
}

}  // namespace strikeplate
