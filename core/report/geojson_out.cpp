#include "core/report/geojson_out.h"

#include <cmath>

#include <nlohmann/json.hpp>

namespace strikeplate {
namespace {

using nlohmann::ordered_json;

// Degrees to 1e-8, a millimetre: more digits would say more than anybody knows.
ordered_json position(const LineOnMap& map, double x) {
  const MapPoint place = placeAt(map, x);
  const auto rounded = [](double degrees) { return std::round(degrees * 1e8) / 1e8; };
  return {rounded(place.longitude), rounded(place.latitude)};
}

ordered_json feature(const ordered_json& geometry, const ordered_json& properties) {
  return {{"type", "Feature"}, {"geometry", geometry}, {"properties", properties}};
}

ordered_json point(const LineOnMap& map, double x) {
  return {{"type", "Point"}, {"coordinates", position(map, x)}};
}

ordered_json number(bool determined, double value) {
  return determined ? ordered_json(value) : ordered_json();
}

ordered_json geophoneProperties(const Section& section, const Geophone& geophone, std::size_t index) {
  ordered_json properties = {
      {"kind", "geophone"}, {"number", index + 1}, {"x_m", geophone.x}, {"elevation_m", geophone.elevation}};
  for (const SectionInterface& interface : section.interfaces) {
    const Estimate depth = section.depthAt(interface.layer, geophone.x);
    const std::string layer = "layer_" + std::to_string(interface.layer);
    properties[layer + "_depth_m"] = number(depth.determined, depth.value);
    properties[layer + "_low95_m"] = number(depth.determined, depth.low95);
    properties[layer + "_high95_m"] = number(depth.determined, depth.high95);
  }
  return properties;
}

ordered_json boreholeProperties(const Borehole& hole) {
  return {{"kind", "borehole"},
          {"name", hole.name},
          {"x_m", hole.x},
          {"layer", hole.layer},
          {"drilled_depth_m", hole.depth},
          {"drilled_sigma_m", hole.sigma},
          {"in_section", hole.used ? "used" : "compared"}};
}

ordered_json lineFeature(const Survey& survey, const LineOnMap& map) {
  double first = map.first.x, last = map.second.x;
  if (!survey.geophones.empty()) {
    first = survey.geophones.front().x;
    last = survey.geophones.back().x;
  }
  return feature({{"type", "LineString"}, {"coordinates", {position(map, first), position(map, last)}}},
                 {{"kind", "line"},
                  {"title", survey.info.title},
                  {"line", survey.info.line},
                  {"date", survey.info.date},
                  {"intervals", "95 %"},
                  {"caution", "An interpretation, not a measurement of depth; confirm it by drilling before design."},
                  {"program", "Strikeplate " STRIKEPLATE_VERSION}});
}

}  // namespace

Result<std::string> geoJson(const Survey& survey, const Interpretation& interpretation) {
  if (!survey.info.map) {
    return Failure{
        "The line has no place on the map, so no GeoJSON was written; give two of its points in WGS 84 (Edit, Job, "
        "client and crew)."};
  }
  const LineOnMap& map = *survey.info.map;
  if (const std::string fault = faultOf(map); !fault.empty()) {
    return Failure{"No GeoJSON was written. " + fault};
  }
  ordered_json features = ordered_json::array({lineFeature(survey, map)});
  for (std::size_t g = 0; g < survey.geophones.size(); ++g) {
    features.push_back(feature(point(map, survey.geophones[g].x),
                               geophoneProperties(interpretation.section, survey.geophones[g], g)));
  }
  for (std::size_t s = 0; s < survey.shots.size(); ++s) {
    const ShotPoint& at = survey.shots[s].point;
    features.push_back(feature(
        point(map, at.x),
        {{"kind", "shot"}, {"number", s + 1}, {"x_m", at.x}, {"elevation_m", at.elevation}, {"depth_m", at.depth}}));
  }
  for (const Borehole& hole : survey.boreholes) {
    features.push_back(feature(point(map, hole.x), boreholeProperties(hole)));
  }
  // A header's text may hold any bytes; what is no UTF-8 becomes the replacement character.
  return ordered_json{{"type", "FeatureCollection"}, {"features", features}}.dump(
             1, ' ', false, ordered_json::error_handler_t::replace) +
         "\n";
}

}  // namespace strikeplate
