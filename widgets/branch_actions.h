#pragma once

#include <vector>

#include "core/survey/edit.h"
#include "core/survey/interpretation.h"

namespace strikeplate {

/// The branch that an arrival belongs to, or nullptr.
const Branch* branchOf(const Interpretation& interpretation, int arrival);

/// From this arrival outwards its branch becomes one of its own in the next layer, and the branches beyond move one
/// layer out; on this shot and side only. No changes where the arrival is the first of its branch or has none, or
/// where there is no seventh layer to move to.
Edit splitBranch(const Survey& survey, const Interpretation& interpretation, int arrival);

/// The next branch outwards joins this arrival's, and those beyond move one layer in. No changes where there is none.
Edit mergeBranch(const Survey& survey, const Interpretation& interpretation, int arrival);

/// The whole branch of this arrival is the program's to assign again. No changes where nothing in it is by hand.
Edit dissolveBranch(const Survey& survey, const Interpretation& interpretation, int arrival);

}  // namespace strikeplate
