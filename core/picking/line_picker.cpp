#include "core/picking/line_picker.h"

#include "core/picking/trace_picker.h"

namespace strikeplate {

LinePicks pickLine(const std::vector<Gather>& gathers, const LinePickOptions& options, const Progress& progress) {
  LinePicks picks;
  for (std::size_t g = 0; g < gathers.size(); ++g) {
    picks.onsets.push_back(pickGather(gathers[g]));
    picks.reversed.emplace_back(gathers[g].traces.size(), false);
    picks.dead.emplace_back(gathers[g].traces.size(), false);
    for (std::size_t i = 0; i < picks.onsets[g].size(); ++i) {
      if (g < options.trusted.size() && options.trusted[g][i])
        picks.onsets[g][i] = options.trusted[g][i];
    }
  }
  picks.finished = goOn(progress, 1.0);
  return picks;
}

}  // namespace strikeplate
