#include "core/methods/moduli.h"

#include <cmath>

namespace strikeplate {

SmallStrainModuli smallStrainModuli(double vp, double vs, double density) {
  SmallStrainModuli m;
  if (!(vp > 0.0) || !(vs > 0.0) || !(density > 0.0) || !std::isfinite(vp * vs * density)) {
    m.reason = "both velocities and the density must be positive numbers";
    return m;
  }
  m.bulk = density * (vp * vp - 4.0 * vs * vs / 3.0);
  if (!(m.bulk > 0.0)) {
    m.reason = "the S velocity is too near the P velocity: no solid has it at or above 0.866 of it";
    return m;
  }
  m.poisson = (vp * vp - 2.0 * vs * vs) / (2.0 * (vp * vp - vs * vs));
  m.shear = density * vs * vs;
  m.young = 2.0 * m.shear * (1.0 + m.poisson);
  m.constrained = density * vp * vp;
  m.caution = m.poisson < 0.0 ? "Poisson's ratio is negative; check the S velocity." : "";
  m.determined = true;
  return m;
}

}  // namespace strikeplate
