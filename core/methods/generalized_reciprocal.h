#pragma once

#include <optional>
#include <span>
#include <string>
#include <vector>

#include "core/base/estimate.h"
#include "core/methods/reversed_pair.h"

namespace strikeplate {

/// The generalized reciprocal method for one distance XY between the two geophones of each reading.
struct XyReading {
  double xy = 0.0;                    ///< m
  std::vector<double> x;              ///< m, of each point G midway between the two
  std::vector<double> velocityTimes;  ///< s, T_V = (t_AY - t_BX + t_AB)/2
  std::vector<double> timeDepths;     ///< s, T_G = (t_AY + t_BX - t_AB - XY/V')/2
  Estimate velocity;                  ///< m/s, V' = 1 / slope of T_V
  double roughness = 0.0;             ///< s, rms of T_V about its line
};

/// Readings over a range of XY, and the XY whose velocity times lie straightest.
struct XyAnalysis {
  bool determined = false;
  std::string reason;               ///< why not
  std::vector<XyReading> readings;  ///< rising XY
  std::size_t best = 0;             ///< index of the straightest
};

/// Reads the pair at each XY (m); times between geophones are interpolated linearly. Readings with fewer than five
/// points are left out; XY are compared on the points that all of them have. Not determined when no XY is left. The
/// optimum is good to about half a geophone spacing on an uneven refractor, and means nothing on a plane one, where
/// every XY lies straight.
/// Source: Palmer, The generalized reciprocal method (SEG 1980); Palmer, Geophysics 46 (1981) 1508-1518.
XyAnalysis xyAnalysis(const TravelTimes& times, const ReversedPair& pair, std::span<const double> xy);

/// Depth (m) from a time-depth (s) through one layer of v1 over V' (m/s): T_G v1 V' / sqrt(V'^2 - v1^2). Nothing
/// unless V' > v1 > 0. Source: Palmer (1980).
std::optional<double> depthFromTimeDepth(double timeDepth, double v1, double refractor);

/// The XY (m) at which both rays leave one point of the refractor: 2 z tan i, sin i = v1/V'. Source: Palmer (1980).
std::optional<double> optimumXy(double depth, double v1, double refractor);

/// Average velocity (m/s) above the refractor from the optimum XY (m) and the time-depth (s) there:
/// sqrt(V'^2 XY / (XY + 2 T_G V')). Exact for one layer above the refractor; for more it errs, and errors of XY weigh
/// heavily in it. Source: Palmer (1980).
std::optional<double> averageVelocity(double xy, double timeDepth, double refractor);

}  // namespace strikeplate
