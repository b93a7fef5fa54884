#pragma once

#include <span>
#include <vector>

#include "core/base/estimate.h"
#include "core/methods/two_layers.h"
#include "core/traveltime/line_fit.h"

namespace strikeplate {

/// A reflection read by its times at several offsets.
struct ReflectionFit {
  Estimate zeroOffsetTime;  ///< s, two-way
  Estimate velocity;        ///< m/s, above the reflector (root mean square under several layers)
  Estimate depth;           ///< m, v t0 / 2
};

/// Straight line through t^2 over x^2: t^2 = t0^2 + x^2/v^2, each t^2 with sigma 2 t sigma. sigmas to first order
/// with the covariance of both. Not determined, with a reason, with fewer than two offsets, or t0^2 or 1/v^2 not
/// positive. Source: Green, Geophysics 3 (1938) 295-305, from memory; derivatives own.
ReflectionFit fitReflection(std::span<const FitPoint> picks);

/// Thicknesses (m) of N level layers over reflectors from zero-offset times (s) and layer velocities (m/s), from the
/// top: h(k) = v(k) (t0(k) - t0(k-1)) / 2. One estimate for each; not determined where the time does not grow or a
/// datum is not positive. sigma from independent data.
std::vector<Estimate> thicknessesFromReflections(std::span<const Datum> times, std::span<const Datum> velocities);

/// What is added to a time (s) to bring shot and geophone, standing hShot and hGeophone (m) above a datum, down to
/// it:
/// -(hShot + hGeophone) sqrt(1/v1^2 - 1/vn^2). NaN unless vn > v1 > 0.
/// Source: Sheriff and Geldart, Exploration Seismology (1995).
double elevationCorrection(double hShot, double hGeophone, double v1, double vn);

}  // namespace strikeplate
