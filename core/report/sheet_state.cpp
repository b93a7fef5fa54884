// What must be said before anything else is read: how far the inversion came, and what it moved by itself.
#include <algorithm>
#include <cmath>

#include "core/base/units.h"
#include "core/report/sheet_parts.h"

namespace strikeplate {
namespace {

// "under 5 of 48 geophones (between 0.0 m and 8.0 m)", or nothing when there is a depth under every geophone.
std::string whereUndetermined(const SheetSource& source, int layer) {
  int missing = 0;
  double first = 0.0, last = 0.0;
  for (const Geophone& geophone : source.survey.geophones) {
    if (source.interpretation.section.depthAt(layer, geophone.x).determined) {
      continue;
    }
    first = missing == 0 ? geophone.x : first;
    last = geophone.x;
    ++missing;
  }
  const int all = static_cast<int>(source.survey.geophones.size());
  if (missing == 0) {
    return "";
  }
  if (missing == all) {
    return "anywhere under the line";
  }
  return "under " + std::to_string(missing) + " of " + std::to_string(all) + " geophones (between " +
         source.words.place(first) + " and " + source.words.place(last) + ")";
}

std::string delayWords(const SheetSource& source, std::size_t shot) {
  const Estimate& delay = source.interpretation.section.triggerDelays[shot];
  return "shot " + std::to_string(shot + 1) + " at " + source.words.place(source.survey.shots[shot].point.x) + ": " +
         milliseconds(delay.value, 2) + " (" + milliseconds(delay.low95, 2) + " to " + milliseconds(delay.high95, 2) +
         ")";
}

}  // namespace

std::vector<std::string> sheetWarnings(const SheetSource& source) {
  const Section& section = source.interpretation.section;
  std::vector<std::string> lines;
  if (!section.determined) {
    return lines;  // the answer says so
  }
  if (!section.finished) {
    lines.emplace_back(
        "The inversion was stopped before its end: every depth, velocity and interval on this sheet is provisional.");
  } else if (!section.converged) {
    lines.emplace_back(
        "The inversion has not settled: its last step still changed the answer. Depths, velocities and intervals on "
        "this sheet are not to be relied on until it does.");
  }
  for (const SectionInterface& interface : section.interfaces) {
    if (const std::string where = whereUndetermined(source, interface.layer); !where.empty()) {
      lines.push_back("The depth to the top of layer " + std::to_string(interface.layer) + " is not determined " +
                      where + ".");
    }
  }
  return lines;
}

std::vector<std::string> sheetTriggers(const SheetSource& source) {
  const std::vector<Shot>& shots = source.survey.shots;
  const auto corrected =
      std::count_if(shots.begin(), shots.end(), [](const Shot& s) { return s.triggerCorrection != 0; });
  std::vector<std::string> lines;
  lines.push_back(corrected == 0 ? "No shot's times were corrected for its trigger by the user."
                                 : "The times of " + std::to_string(corrected) + " of " +
                                       counted(static_cast<int>(shots.size()), "shot", "shots") +
                                       " were corrected for the trigger; the table of shots says by how much.");
  const std::vector<Estimate>& delays = source.interpretation.section.triggerDelays;
  std::string solved;
  for (std::size_t s = 0; s < std::min(delays.size(), shots.size()); ++s) {
    if (delays[s].determined) {
      solved += (solved.empty() ? "" : "; ") + delayWords(source, s);
    }
  }
  if (!solved.empty()) {
    lines.push_back(
        "The section moved the times of these shots by itself, by what their picks ask for (95 % interval; "
        "positive: they come too late, as after an early trigger; negative: too early): " +
        solved + ".");
  } else if (!delays.empty()) {
    lines.emplace_back("The section looked for trigger delays by itself and solved for none.");
  }
  return lines;
}

}  // namespace strikeplate
