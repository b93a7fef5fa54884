#include "core/line/line_on_map.h"

#include <cmath>

#include <gtest/gtest.h>

namespace strikeplate {
namespace {

// Lengths of a degree on WGS 84, common figures (United States Geological Survey and others): 110 574 m of latitude
// at the equator, 111 132 m at 45 degrees, 111 694 m at the pole; 111 320 m of longitude at the equator, 78 847 m
// at 45.
TEST(LineOnMap, ADegreeIsAsLongAsTheEllipsoidHasIt) {
  constexpr double kPart = 0.001;
  EXPECT_NEAR(mapDistance({0, 0, 0}, {0, 0, kPart}), 110574 * kPart, 0.001);
  EXPECT_NEAR(mapDistance({0, 0, 45}, {0, 0, 45 + kPart}), 111132 * kPart, 0.001);
  EXPECT_NEAR(mapDistance({0, 0, 90 - kPart}, {0, 0, 90}), 111694 * kPart, 0.001);
  EXPECT_NEAR(mapDistance({0, 0, 0}, {0, kPart, 0}), 111320 * kPart, 0.001);
  EXPECT_NEAR(mapDistance({0, 0, 45}, {0, kPart, 45}), 78847 * kPart, 0.001);
}

TEST(LineOnMap, PlacesLieStraightThroughBothPointsAndBeyond) {
  const LineOnMap line{{10.0, 8.0, 46.0}, {110.0, 8.001, 46.0005}};
  EXPECT_NEAR(placeAt(line, 60.0).longitude, 8.0005, 1e-12);
  EXPECT_NEAR(placeAt(line, 60.0).latitude, 46.00025, 1e-12);
  EXPECT_NEAR(placeAt(line, 0.0).longitude, 7.9999, 1e-12);
}

TEST(LineOnMap, GoesTheShortWayAcrossTheDateLine) {
  const LineOnMap line{{0.0, 179.9995, 0.0}, {111.32, -179.9995, 0.0}};
  EXPECT_EQ(faultOf(line), "");
  EXPECT_NEAR(std::abs(placeAt(line, 55.66).longitude), 180.0, 1e-9);
  EXPECT_NEAR(placeAt(line, 111.32).longitude, -179.9995, 1e-9);
}

TEST(LineOnMap, TwoPointsThatCannotBeTheLinesAreSaid) {
  const LineOnMap good{{0.0, 8.0, 46.0}, {111.15, 8.0, 46.001}};
  EXPECT_EQ(faultOf(good), "");
  LineOnMap other = good;
  other.second.x = 100.0;
  EXPECT_NE(faultOf(other).find("m apart on the map but 100.0 m along the line"), std::string::npos)
      << faultOf(other);
  other.second.x = 0.0;
  EXPECT_NE(faultOf(other).find("same distance along the line"), std::string::npos);
  other = good;
  other.first.latitude = 460.0;
  EXPECT_NE(faultOf(other).find("latitude from -90 to 90"), std::string::npos);
}

}  // namespace
}  // namespace strikeplate
