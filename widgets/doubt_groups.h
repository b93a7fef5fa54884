#pragma once

#include <vector>

#include <QString>

#include "core/survey/interpretation.h"

namespace strikeplate {

/// Doubts of one kind, as indices into Interpretation::doubts, the strongest first.
struct DoubtGroup {
  QString kind;
  std::vector<std::size_t> doubts;  ///< never empty
};

/// The doubts by kind, kinds in the order in which they first come (the gravest first). Doubts about a pick are
/// ordered by its residual in multiples of its sigma, all others stay as they come.
std::vector<DoubtGroup> doubtGroups(const Interpretation& interpretation);

}  // namespace strikeplate
