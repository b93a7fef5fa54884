#pragma once

#include <string>

#include "core/base/result.h"
#include "core/survey/edit.h"

namespace strikeplate {

/// The edit that lays a geometry table (CSV) over the records' headers: shots and geophones move, picks, trace states
/// and trigger corrections stay with their traces. Fails, in one sentence, when the table cannot be read or speaks of
/// none of the records.
Result<Edit> geometryEdit(const Survey& survey, const std::string& tablePath);

}  // namespace strikeplate
