#pragma once

#include <string>
#include <string_view>

#include "core/record/record.h"

namespace strikeplate {

/// All samples of a record as the survey file holds them: float32, little endian, trace after trace.
std::string samplesToBytes(const ShotRecord& record);

/// Fills the samples of a record whose traces have their lengths. False when the number of bytes is another.
bool samplesFromBytes(std::string_view bytes, ShotRecord& record);

}  // namespace strikeplate
