#pragma once

#include <string>
#include <vector>

#include "core/base/estimate.h"

namespace strikeplate {

/// A straight line t = intercept + slope * offset, weighted by the picks' sigmas, with its covariance.
struct LineFit {
  int count = 0;               ///< picks in the fit
  bool throughOrigin = false;  ///< the direct branch is held to t = 0 at the shot
  bool determined = false;     ///< false when the picks do not fix the line; `reason` says why
  std::string reason;
  double intercept = 0.0;     ///< s
  double slope = 0.0;         ///< s/m
  double varIntercept = 0.0;  ///< s^2
  double varSlope = 0.0;      ///< (s/m)^2
  double covariance = 0.0;    ///< s * s/m, between intercept and slope
  double rms = 0.0;           ///< s, of the residuals

  [[nodiscard]] double at(double offset) const { return intercept + slope * offset; }
};

/// The arrivals of one shot, on one side, through one layer.
struct Branch {
  int shot = 0;  ///< index into TravelTimes::shots
  int side = 1;  ///< +1 geophones at larger x than the shot, -1 at smaller x
  int layer = 1;
  std::vector<int> arrivals;  ///< indices into TravelTimes::arrivals, rising offset
  LineFit fit;
  Estimate velocity;  ///< apparent velocity, m/s
};

}  // namespace strikeplate
