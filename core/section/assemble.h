#pragma once

#include <vector>

#include "core/section/mode.h"
#include "core/section/section.h"
#include "core/section/solve.h"

namespace strikeplate {

/// Turns what the inversion found into the section that the rest of the program sees. Needs candidate.stands().
Section assembleSection(const SectionProblem& problem, const TravelTimes& times, const SectionOptions& options,
                        const SectionCandidate& candidate);

/// A section without numbers, and why.
Section undeterminedSection(const TravelTimes& times, std::string reason);

}  // namespace strikeplate
