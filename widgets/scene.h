#pragma once

#include <memory>
#include <vector>

#include "core/line/gather.h"
#include "core/survey/interpretation.h"
#include "core/survey/survey.h"

namespace strikeplate {

/// What is selected, everywhere at once. Indices into the survey; -1 and 0 where nothing is.
struct Selection {
  int shot = -1;
  int trace = -1;
  int layer = 0;
  bool operator==(const Selection&) const = default;
};

/// What every view is shown. Views read it and never change it.
struct Scene {
  std::shared_ptr<const Survey> survey;                  ///< never null
  std::shared_ptr<const Interpretation> interpretation;  ///< null until there is one; may lag by one step of a drag
  std::shared_ptr<const std::vector<Gather>>
      gathers;  ///< one for each shot, never null; empty traces where no record
  Selection selection;
};

/// Where a gesture stands. While it lasts a view proposes Live edits, each made from the survey as it was at the
/// press and replacing the one before; it ends with one Commit, or with Abandon, which leaves no trace.
enum class Phase { Live, Commit, Abandon };

}  // namespace strikeplate
