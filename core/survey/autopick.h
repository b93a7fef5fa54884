#pragma once

#include <vector>

#include "core/base/progress.h"
#include "core/line/gather.h"
#include "core/survey/edit.h"

namespace strikeplate {

/// What an automatic picking may touch.
struct AutoPickOptions {
  int shot = -1;                  ///< only this shot's picks are changed; -1 = the whole line
  bool replaceHandPicks = false;  ///< hand and imported picks are otherwise kept, and lead the picker
};

/// Picks the first breaks of a line. `gathers` are those of the survey. Traces without a usable onset lose an
/// automatic pick they had. An edit without changes when nothing was found or it was asked to stop early.
Edit pickAutomatically(const Survey& survey, const std::vector<Gather>& gathers, const AutoPickOptions& options,
                       const Progress& progress = {});

/// `edit` without the pick changes whose pick is no longer as it was when the edit was made, for an edit made in the
/// background while the user went on.
Edit stillFitting(const Survey& survey, const Edit& edit);

}  // namespace strikeplate
