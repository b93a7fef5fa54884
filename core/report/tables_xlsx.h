#pragma once

#include <string>

#include "core/base/result.h"
#include "core/survey/interpretation.h"

namespace strikeplate {

/// Writes the tables of csv_out.h as one spreadsheet (Office Open XML, .xlsx), a worksheet each: picks, depths,
/// layers, opinions, doubts, boreholes. Same columns, same rows, SI units; numbers are numbers, an empty cell is not
/// determined. A file of that name is replaced when the new one is complete. Fails with one sentence.
Outcome writeTablesXlsx(const std::string& path, const Survey& survey, const Interpretation& interpretation);

}  // namespace strikeplate
