#include <algorithm>
#include <cmath>

#include "core/base/units.h"
#include "core/survey/interpretation.h"

namespace strikeplate {
namespace {

std::string counted(std::size_t n, const std::string& one) {
  return n == 0 ? "no " + one + "s" : std::to_string(n) + " " + one + (n == 1 ? "" : "s");
}

int pickCount(const Survey& survey) {
  int count = 0;
  for (const Shot& shot : survey.shots) {
    count += static_cast<int>(
        std::count_if(shot.traces.begin(), shot.traces.end(), [](const ShotTrace& t) { return t.pick.has_value(); }));
  }
  return count;
}

}  // namespace

std::string answerLine(const Survey& survey, const Interpretation& interpretation, double x) {
  const Section& section = interpretation.section;
  const std::string doubts = counted(interpretation.doubts.size(), "doubt");
  if (pickCount(survey) == 0) {
    return "No first breaks yet: pick them in the record, or let the program pick the line.";
  }
  if (!section.determined) {
    return "No depth is determined: " + section.reason;
  }
  if (!std::isfinite(x) || section.x.empty()) {
    return counted(section.interfaces.size(), "interface") + ", " + doubts + ".";
  }
  const double at = std::clamp(x, section.x.front(), section.x.back());
  const Units units{survey.settings.feet};
  std::string text;
  for (const SectionInterface& interface : section.interfaces) {
    const Estimate depth = section.depthAt(interface.layer, at);
    text += (text.empty() ? "" : "; ") + std::string("Layer ") + std::to_string(interface.layer);
    text += text.find("under") == std::string::npos ? " under " + units.length(at, 0) : "";
    text += depth.determined
                ? ": " + units.length(depth.value) + " (" + units.lengthRange(depth.low95, depth.high95) + ")"
                : ": not determined";
  }
  return text + ", " + doubts + ".";
}

}  // namespace strikeplate
