#include "core/line/line_on_map.h"

#include <algorithm>
#include <cmath>
#include <numbers>

#include "core/base/numbers.h"

namespace strikeplate {
namespace {

constexpr double kEquator = 6378137.0;  // m, half the major axis of WGS 84
constexpr double kFlattening = 1.0 / 298.257223563;
constexpr double kDegree = std::numbers::pi / 180.0;
constexpr double kTolerance = 0.02;      // of the distance along the line
constexpr double kLeastTolerance = 2.0;  // m: what a hand-held receiver is off by

// The short way round.
double eastward(double fromLongitude, double toLongitude) {
  return std::remainder(toLongitude - fromLongitude, 360.0);
}

}  // namespace

bool isPlace(const MapPoint& point) {
  return std::isfinite(point.x) && std::abs(point.longitude) <= 180.0 && std::abs(point.latitude) <= 90.0;
}

MapPoint placeAt(const LineOnMap& line, double x) {
  const double part = (x - line.first.x) / (line.second.x - line.first.x);
  const double east = line.first.longitude + part * eastward(line.first.longitude, line.second.longitude);
  return {x, std::remainder(east, 360.0), line.first.latitude + part * (line.second.latitude - line.first.latitude)};
}

double mapDistance(const MapPoint& a, const MapPoint& b) {
  const double latitude = 0.5 * (a.latitude + b.latitude) * kDegree;
  const double e2 = kFlattening * (2.0 - kFlattening);
  const double w = 1.0 - e2 * std::sin(latitude) * std::sin(latitude);
  const double north = kEquator * (1.0 - e2) / (w * std::sqrt(w)) * (b.latitude - a.latitude) * kDegree;
  const double east = kEquator / std::sqrt(w) * std::cos(latitude) * eastward(a.longitude, b.longitude) * kDegree;
  return std::hypot(north, east);
}

std::string faultOf(const LineOnMap& line) {
  if (!isPlace(line.first) || !isPlace(line.second)) {
    return "A point on the map needs a longitude from -180 to 180 and a latitude from -90 to 90 degrees.";
  }
  const double along = std::abs(line.second.x - line.first.x);
  if (along == 0.0) {
    return "The two points on the map stand at the same distance along the line; give two that are apart.";
  }
  const double onMap = mapDistance(line.first, line.second);
  if (std::abs(onMap - along) > std::max(kTolerance * along, kLeastTolerance)) {
    return "The two points are " + fixed(onMap, 1) + " m apart on the map but " + fixed(along, 1) +
           " m along the line; one of them is not right.";
  }
  return "";
}

}  // namespace strikeplate
