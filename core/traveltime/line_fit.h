#pragma once

#include <span>

#include "core/traveltime/branch.h"

namespace strikeplate {

/// One point of a straight line fit: offset in m, time in s, sigma of the time in s (> 0).
struct FitPoint {
  double offset = 0.0;
  double time = 0.0;
  double sigma = 0.0;
};

/// Weighted least squares line t = a + b x with its full covariance, from the stated sigmas alone:
///
///   S = sum w, w = 1/sigma^2;  xm = sum w x / S;  Sxx = sum w (x - xm)^2
///   b = sum w (x - xm) t / Sxx;  a = sum w t / S - b xm
///   var b = 1/Sxx;  var a = 1/S + xm^2/Sxx;  cov(a, b) = -xm/Sxx
///
/// Not determined with fewer than two different offsets, or when a number is not finite or a sigma not positive.
/// Source: standard weighted regression, checked against the GNU Scientific Library in the tests.
LineFit fitLine(std::span<const FitPoint> points);

/// The same held to t = 0 at x = 0: b = sum w x t / sum w x^2, var b = 1 / sum w x^2. Not determined without a point
/// at a positive offset.
LineFit fitLineThroughOrigin(std::span<const FitPoint> points);

/// Variance in s^2 of the fitted time at an offset in m.
double varianceAt(const LineFit& fit, double offset);

}  // namespace strikeplate
