#pragma once

#include <vector>

#include "core/survey/interpretation.h"

namespace strikeplate {

/// Depths to the top of layer 2 under the shots from what the user marked by hand: the critical distance and the
/// reflection time at zero offset. The velocities are those of the shot's own branches: layer 1 from its direct
/// branches and layer 2 from its head waves, each the mean of both sides' slownesses; a mark whose shot has no such
/// branch gets an opinion without a depth and the reason. Formulas and sources: core/methods/two_layers.h.
std::vector<Opinion> markedOpinions(const Survey& survey, const std::vector<Branch>& branches);

}  // namespace strikeplate
