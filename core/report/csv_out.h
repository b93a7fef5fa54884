#pragma once

#include <string>

#include "core/base/result.h"
#include "core/survey/interpretation.h"

namespace strikeplate {

/// The tables that leave the program as CSV: RFC 4180 with a header row, SI units, full precision, whatever
/// units the user sees. A number that is not determined is an empty cell.

/// file,trace,shot_x_m,geophone_x_m,time_s,sigma_s,layer,origin,trigger_correction_s
///
/// One row for each trace of each blow: `trace` counts from 1 within the file, `time_s` is on the recorder's clock
/// (the stack's pick moved by the blow's lag) with the trigger correction beside it and not in it. A trace without a
/// usable first break has an empty time, sigma, layer and origin. The layer is the one that the interpretation
/// settled on. A shot without records has one row for each trace and an empty file.
std::string picksCsv(const Survey& survey, const Interpretation& interpretation);

/// x_m,layer,depth_m,depth_sigma_m,depth_low95_m,depth_high95_m,elevation_m: depth below the ground to the top of
/// layer 2, 3, ... at every geophone.
std::string depthsCsv(const Survey& survey, const Interpretation& interpretation);

/// layer,velocity_m_s,velocity_sigma_m_s,velocity_low95_m_s,velocity_high95_m_s
std::string layersCsv(const Interpretation& interpretation);

/// route,layer,shot,x_m,depth_m,depth_sigma_m,assumes: shot counts from 1, empty where the opinion belongs to none.
std::string opinionsCsv(const Interpretation& interpretation);

/// kind,where,says,rests_on,would_settle
std::string doubtsCsv(const Interpretation& interpretation);
/// Each depth met in a borehole beside the section's there: borehole, x_m, layer, drilled_depth_m, drilled_sigma_m,
/// in_section ("used" as a datum or only "compared"), section_depth_m, section_low95_m, section_high95_m,
/// difference_m (section minus drilled).
std::string boreholesCsv(const Survey& survey, const Interpretation& interpretation);

/// Writes a text to a file as it is; fails with one sentence when it cannot be written whole.
Outcome writeTextFile(const std::string& path, const std::string& text);

}  // namespace strikeplate
