#pragma once

#include <string>

#include "core/base/result.h"
#include "core/survey/interpretation.h"

namespace strikeplate {

/// The line on the map as GeoJSON (RFC 7946: WGS 84, longitude before latitude, degrees): a FeatureCollection of the
/// line, its geophones, shots and boreholes. A geophone carries the depth to the top of every layer below it with its
/// 95 % interval, in m, null where it is not determined: layer_2_depth_m, layer_2_low95_m, layer_2_high95_m, ...
/// Elevations are properties and not coordinates, since RFC 7946 counts those from the ellipsoid.
///
/// Fails with one sentence when the line has no place on the map, or one that cannot be right (see faultOf()).
Result<std::string> geoJson(const Survey& survey, const Interpretation& interpretation);

}  // namespace strikeplate
