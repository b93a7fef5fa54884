#pragma once

#include <string>

#include "core/base/result.h"
#include "core/line/geometry_table.h"
#include "core/survey/edit.h"

namespace strikeplate {

/// Where the survey's traces stand now, as a table to be laid over the same records: one row for each trace of each
/// record. Fails, in one sentence, when no shot has a record (its places are then in the table of its times).
Result<GeometryTable> geometryTableOf(const Survey& survey);

/// The edit that lays a geometry table (CSV) over the records' headers: shots and geophones move; picks, trace states
/// and trigger corrections stay with their traces, blows left out stay out, and shots without records stay as they
/// are. Fails, in one sentence, when the table cannot be read or speaks of none of the records.
Result<Edit> geometryEdit(const Survey& survey, const std::string& tablePath);

}  // namespace strikeplate
