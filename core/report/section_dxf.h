#pragma once

#include <string>

#include "core/base/result.h"
#include "core/survey/interpretation.h"

namespace strikeplate {

/// Writes the section as a DXF drawing (AutoCAD 2000 text form) at true scale: x is the position along the line in m,
/// y the elevation in m. DXF layers: GROUND, LAYER_n_TOP with LAYER_n_TOP_LOW95 and LAYER_n_TOP_HIGH95 (deeper and
/// shallower bound of the 95 % band), GEOPHONES, SHOTS, BOREHOLES, TEXT. A section that is not determined writes the
/// ground and places only. Fails when the file cannot be written.
Outcome writeSectionDxf(const std::string& path, const Survey& survey, const Interpretation& interpretation);

}  // namespace strikeplate
