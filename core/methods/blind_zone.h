#pragma once

#include <optional>

namespace strikeplate {

/// The layer that could hide between two others without ever arriving first.
struct HiddenLayer {
  double velocity = 0.0;   ///< m/s, of the hidden layer
  double thickness = 0.0;  ///< m, the greatest that stays hidden
  double deepest = 0.0;    ///< m, how deep the top of the layer below then lies
};

/// Greatest thickness of a layer of v2 that stays hidden, as a ratio to the thickness of the layer above it:
///
///   r = v2 [(v3 - v1) sqrt((v2 + v1)/(v2 - v1)) - sqrt(v3^2 - v1^2)] / [v1 sqrt(v3^2 - v2^2)]
///
/// Velocities in m/s, 0 < v1 < v2 < v3, else nothing. Source: the condition that the three branches meet in one
/// point, as in Soske, Geophysics 24 (1959) 359-365 and Green, Geophys. Prosp. 10 (1962) 166-170; own derivation.
std::optional<double> hiddenThicknessRatio(double v1, double v2, double v3);

/// The worst case over hidden velocities between v1 and v3 (m/s) for an apparent depth (m) read as two layers: with
/// k = v1 sqrt(1 - v2^2/v3^2) / (v2 sqrt(1 - v1^2/v3^2)) the layer above is h1 = depth / (1 + r k) thick and the top
/// of v3 lies at h1 (1 + r). Nothing unless 0 < v1 < v3 and depth > 0.
std::optional<HiddenLayer> worstHiddenLayer(double v1, double v3, double apparentDepth);

}  // namespace strikeplate
