#pragma once

#include "core/survey/survey.h"

namespace strikeplate {

/// `survey` with the records, geophones and shots of `more` added: geophones at one place become one, a shot at a
/// known shot point on the same geophones adds its blows there. Places, picks and settings of `survey` stay as they
/// are.
Survey merged(Survey survey, const Survey& more);

}  // namespace strikeplate
