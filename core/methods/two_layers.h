#pragma once

#include "core/base/estimate.h"

namespace strikeplate {

/// A datum with one standard deviation, in its own unit.
struct Datum {
  double value = 0.0;
  double sigma = 0.0;
};

/// Depth (m) of a plane level interface between v1 and v2 (m/s) from the intercept time (s), the crossover distance
/// (m), the critical distance (m), or the two-way reflection time at zero offset (s):
///
///   h = ti v1 v2 / (2 sqrt(v2^2 - v1^2));  h = (xc/2) sqrt((v2 - v1)/(v2 + v1));
///   h = (xcrit/2) sqrt(v2^2 - v1^2) / v1;  h = v1 t0 / 2
///
/// sigma to first order from independent data. Not determined unless v2 > v1 > 0 and the datum is positive.
/// Source: Sheriff and Geldart, Exploration Seismology (1995); Redpath (1973); derivatives own.
Estimate depthFromIntercept(const Datum& time, const Datum& v1, const Datum& v2);
Estimate depthFromCrossover(const Datum& distance, const Datum& v1, const Datum& v2);
Estimate depthFromCriticalDistance(const Datum& distance, const Datum& v1, const Datum& v2);
Estimate depthFromReflection(const Datum& time, const Datum& v1);

/// Two layers under a plane dip from reversed apparent velocities (m/s).
struct DippingPair {
  bool determined = false;
  double v2 = 0.0;        ///< m/s
  double dip = 0.0;       ///< rad, positive when it deepens in the direction of the down-dip shot's waves
  double critical = 0.0;  ///< rad
};

/// theta = (a + b)/2, dip = (a - b)/2 with a = asin(v1/vDown), b = asin(v1/vUp); v2 = v1 / sin theta.
/// Not determined when |v1 / v| > 1. Source: Adachi, Kumamoto J. Sci. A 2 (1954) 18; Slotnick (1959).
DippingPair dippingPair(double v1, double vDown, double vUp);

}  // namespace strikeplate
