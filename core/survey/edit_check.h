#pragma once

#include "core/survey/edit.h"

namespace strikeplate {

/// Whether every index of the survey points at something, every number is finite and every sigma positive. What comes
/// from a file is checked with it before anything else looks at it.
[[nodiscard]] bool surveyIsSound(const Survey& survey);

/// Whether the edit can be carried out on the survey, and taken back: every index valid, counts equal, numbers
/// finite.
[[nodiscard]] bool editFits(const Survey& survey, const Edit& edit);

}  // namespace strikeplate
