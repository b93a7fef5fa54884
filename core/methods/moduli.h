#pragma once

#include <string>

namespace strikeplate {

/// Elastic moduli at the very small strains of a seismic wave (about 1e-6), NOT those of a loaded foundation, which
/// are several times lower. In Pa.
struct SmallStrainModuli {
  bool determined = false;
  std::string reason;   ///< why not
  std::string caution;  ///< what is unlikely about the input, empty when nothing is
  double poisson = 0.0;
  double shear = 0.0, young = 0.0, bulk = 0.0, constrained = 0.0;
};

/// G = rho vs^2; nu = (vp^2 - 2 vs^2) / (2 (vp^2 - vs^2)); E = 2 G (1 + nu); K = rho (vp^2 - 4 vs^2/3); M = rho vp^2.
/// Velocities in m/s, density in kg/m3. Not determined when a number is not positive or vs >= sqrt(3)/2 vp (K <= 0).
/// Source: Sheriff and Geldart, Exploration Seismology (1995), chapter 2.
SmallStrainModuli smallStrainModuli(double vp, double vs, double density);

}  // namespace strikeplate
