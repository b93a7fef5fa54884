#pragma once

#include <string>

#include "core/section/solve.h"

namespace strikeplate {

/// Why these times cannot be made into a section, in one sentence; empty when nothing speaks against trying.
std::string whyNoSection(const TravelTimes& times, const SectionOptions& options);

}  // namespace strikeplate
