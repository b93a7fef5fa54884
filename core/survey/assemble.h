#pragma once

#include <optional>
#include <vector>

#include "core/base/progress.h"
#include "core/survey/survey.h"

namespace strikeplate {

/// Puts records together into one line: geophones that stand at one place become one, records of one shot point on
/// the same geophones become blows of one shot. Positions come from the records' headers (m).
///
/// A record whose headers hold no geophone positions gets geophones every metre from 0 m, and one without a shot
/// position a shot one metre before its first geophone; both are said in Survey::remarks, for they have to be
/// corrected. Lags between blows are not yet found (see alignBlows), no trace is picked. Records without traces are
/// passed over.
Survey assemble(std::vector<RecordPtr> records);

/// Finds the lag and the similarity of every blow of every shot by cross-correlation, and the states of the traces.
/// Nothing when `progress` asked to stop early.
std::optional<Survey> withBlowsAligned(Survey survey, const Progress& progress = {});

/// Positions closer than this are one place, m.
inline constexpr double kSamePlace = 0.01;

}  // namespace strikeplate
