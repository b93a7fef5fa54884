#pragma once

#include <span>
#include <string>
#include <vector>

#include "core/base/estimate.h"
#include "core/methods/two_layers.h"
#include "core/traveltime/branch.h"

namespace strikeplate {

/// The head wave of one refractor, seen from both ends of a profile.
struct ReversedLines {
  LineFit a;  ///< from the shot at x = 0, offsets growing with x
  LineFit b;  ///< from the shot at x = length, offsets growing against x
};

/// Plane dipping layers between two shots of a reversed profile. Layer and interface numbers as in FlatLayers.
struct DippingLayers {
  bool determined = false;
  std::string reason;                  ///< when not determined
  std::vector<Estimate> velocities;    ///< m/s
  std::vector<Estimate> dips;          ///< rad, of the tops of layers 2, 3, ...; positive deeper towards +x
  std::vector<Estimate> thicknessesA;  ///< m, vertical, under shot A
  std::vector<Estimate> thicknessesB;  ///< m, vertical, under shot B
  std::vector<Estimate> depthsA;       ///< m, vertical, to the tops of layers 2, 3, ...
  std::vector<Estimate> depthsB;
};

/// Strips dipping plane interfaces one after the other: the angles at which the wave leaves A and comes up under B
/// are carried down through the known interfaces by Snell's law, theta = (d + e)/2 and dip = (e - d)/2 at the
/// refractor, V_n = V_(n-1) / sin theta, and intercept time = sum over layers of (h_i / V_i)(cos d_i + cos e_i).
///
/// `direct` is the slowness (s/m) of the first layer. One entry of `refractors` for each of layers 2, 3, ...
/// sigma to first order with each line's slope-intercept covariance. The same strike is assumed for all interfaces.
/// Not determined, with the reason, where |V p| > 1, a thickness is not positive at an end, or a velocity does not
/// grow with depth. Source: Ewing, Woollard & Vine, GSA Bull. 50 (1939); Adachi, Kumamoto J. Sci. A 2 (1954) 18;
/// Johnson, Geophysics 41 (1976) 418-424; derivation in that form own.
DippingLayers layersFromReversed(const Datum& direct, std::span<const ReversedLines> refractors);

/// s by which the times of one refractor at the two shots differ: (tiA + pA L) - (tiB + pB L), 0 by reciprocity, with
/// its sigma. L in m.
Estimate reciprocityOf(const ReversedLines& lines, double length);

}  // namespace strikeplate
