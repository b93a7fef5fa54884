#pragma once

#include <vector>

#include "core/line/line.h"

namespace strikeplate {

/// A first-arrival time ready for interpretation.
struct Arrival {
  int shot = 0;              ///< index into TravelTimes::shots
  int trace = 0;             ///< trace of that shot, from 0, in the survey it came from
  int geophone = 0;          ///< index into TravelTimes::geophones
  double time = 0.0;         ///< s after the blow, trigger correction applied
  double sigma = 0.0;        ///< s, > 0
  int layer = 0;             ///< layer it travelled through, 1 = direct; 0 = not assigned
  bool layerByHand = false;  ///< the assignment is the user's and is not to be changed
};

/// All first-arrival times of a line, with the places they belong to. What hand methods and section work on.
struct TravelTimes {
  std::vector<Geophone> geophones;  ///< rising x, each position once
  std::vector<ShotPoint> shots;     ///< in the survey's order
  std::vector<Arrival> arrivals;    ///< by shot, then rising geophone x
  Ground ground;

  /// Signed distance from shot to geophone along the line, m.
  [[nodiscard]] double signedOffset(const Arrival& a) const {
    return geophones[static_cast<std::size_t>(a.geophone)].x - shots[static_cast<std::size_t>(a.shot)].x;
  }
  [[nodiscard]] double offset(const Arrival& a) const {
    const double d = signedOffset(a);
    return d < 0.0 ? -d : d;
  }
};

}  // namespace strikeplate
