#include <algorithm>
#include <cmath>
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

std::vector<std::string> sheetPicks(const SheetSource& source) {
  Origins origins;
  for (const Shot& shot : source.survey.shots) {
    origins.take(shot);
  }
  std::vector<std::string> lines = {counted(origins.all(), "first break was", "first breaks were") + " picked on " +
                                    counted(origins.traces, "trace", "traces") + ": " + std::to_string(origins.hand) +
                                    " by hand, " + std::to_string(origins.automatic) + " automatically, " +
                                    std::to_string(origins.imported) + " imported."};
  if (origins.all() > 0) {
    lines.push_back(origins.byHandAssigned == 0 ? "The program assigned every pick to its layer."
                                                : counted(origins.byHandAssigned, "pick was", "picks were") +
                                                      " assigned to a layer by hand, the others by the program.");
  }
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
    lines.emplace_back("The inversion has not settled; its intervals are not to be relied on.");
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
