#include "core/base/units.h"

#include <cmath>

#include "core/base/numbers.h"

namespace strikeplate {

std::string Units::length(double metres, int decimals) const {
  return fixed(fromMetres(metres), decimals) + " " + lengthUnit();
}

std::string Units::lengthRange(double low, double high, int decimals) const {
  return fixed(fromMetres(low), decimals) + " to " + length(high, decimals);
}

std::string Units::velocity(double metresPerSecond) const {
  const double value = fromMetres(metresPerSecond);
  const double step = value >= 1000.0 ? 10.0 : 1.0;
  return fixed(std::round(value / step) * step, 0) + " " + velocityUnit();
}

std::string milliseconds(double seconds, int decimals) {
  return fixed(seconds * 1e3, decimals) + " ms";
}

}  // namespace strikeplate
