#pragma once

#include <optional>
#include <span>
#include <string>
#include <vector>

namespace strikeplate {

/// Ground whose velocity grows with depth as v0 + gradient z (m/s, 1/s); both above 0.
struct LinearGradient {
  double v0 = 0.0;
  double gradient = 0.0;
};

/// A diving wave that comes up again at an offset.
struct DivingWave {
  double time = 0.0;      ///< s, (2/k) asinh(k X / (2 v0))
  double deepest = 0.0;   ///< m, (v0/k) (sqrt(1 + (k X / (2 v0))^2) - 1)
  double velocity = 0.0;  ///< m/s, the apparent one, that at the deepest point: sqrt(v0^2 + (k X/2)^2)
};

/// Nothing unless v0, gradient and offset (m) are positive and finite.
/// Source: Slotnick, Lessons in Seismic Computing (SEG 1959).
std::optional<DivingWave> divingWave(const LinearGradient& ground, double offset);

/// Offset (m) at which a diving wave comes up after a time (s): (2 v0/k) sinh(k T/2).
std::optional<double> divingWaveOffset(const LinearGradient& ground, double time);

/// A point of a velocity-depth curve.
struct VelocityAt {
  double depth = 0.0;     ///< m
  double velocity = 0.0;  ///< m/s
};

/// A velocity-depth curve from first arrivals, or the reason why there is none.
struct VelocityCurve {
  bool determined = false;
  std::string reason;
  std::vector<VelocityAt> points;
};

/// Wiechert-Herglotz: z(X) = (1/pi) integral from 0 to X of arccosh(p(x)/p(X)) dx with v(z) = 1/p(X), for every
/// offset given after the first. `offset` (m) begins at 0 and rises, `slowness` p = dT/dx (s/m) must fall; p is taken
/// as straight between the points. Not determined, with a reason, otherwise. Source: Herglotz (1907); Wiechert
/// (1910); Slichter, Physics 3 (1932) 273.
VelocityCurve wiechertHerglotz(std::span<const double> offset, std::span<const double> slowness);

}  // namespace strikeplate
