#pragma once

#include <string>

namespace strikeplate {

/// A point of the line with its place on the map: x along the line in m, longitude and latitude in degrees, WGS 84.
struct MapPoint {
  double x = 0.0;
  double longitude = 0.0;
  double latitude = 0.0;
  bool operator==(const MapPoint&) const = default;
};

/// A straight line on the map, known by two of its points.
struct LineOnMap {
  MapPoint first, second;
  bool operator==(const LineOnMap&) const = default;
};

/// Whether every number is finite, the longitude within ±180 and the latitude within ±90 degrees.
[[nodiscard]] bool isPlace(const MapPoint& point);

/// The place at x m along the line, straight through the two points in degrees and beyond them. The error of that
/// against the shortest path on the ellipsoid is below 1 cm for 1 km of line up to 70 degrees of latitude. Needs two
/// points of different x.
[[nodiscard]] MapPoint placeAt(const LineOnMap& line, double x);

/// Distance in m between two points up to a few km apart, by the radii of curvature of the WGS 84 ellipsoid at their
/// mean latitude: M = a (1 - e²) / (1 - e² sin² φ)^1.5 along the meridian, N = a / sqrt(1 - e² sin² φ) across it.
/// Source: Snyder (1987) Map Projections, USGS Professional Paper 1395, chapter 4.
[[nodiscard]] double mapDistance(const MapPoint& a, const MapPoint& b);

/// One sentence that says why the two points cannot be those of a line, or an empty text: no place on earth, the same
/// distance along the line, or a distance on the map that differs from that along the line by more than 2 % and 2 m.
[[nodiscard]] std::string faultOf(const LineOnMap& line);

}  // namespace strikeplate
