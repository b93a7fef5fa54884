#include "core/methods/blind_zone.h"

#include <cmath>

namespace strikeplate {

std::optional<double> hiddenThicknessRatio(double v1, double v2, double v3) {
  if (!(v1 > 0.0) || !(v2 > v1) || !(v3 > v2) || !std::isfinite(v3)) {
    return std::nullopt;
  }
  const double numerator = (v3 - v1) * std::sqrt((v2 + v1) / (v2 - v1)) - std::sqrt(v3 * v3 - v1 * v1);
  return v2 * numerator / (v1 * std::sqrt(v3 * v3 - v2 * v2));
}

std::optional<HiddenLayer> worstHiddenLayer(double v1, double v3, double apparentDepth) {
  if (!(v1 > 0.0) || !(v3 > v1) || !std::isfinite(v3) || !(apparentDepth > 0.0) || !std::isfinite(apparentDepth)) {
    return std::nullopt;
  }
  constexpr int kTries = 200;
  std::optional<HiddenLayer> worst;
  for (int i = 1; i < kTries; ++i) {
    const double v2 = v1 * std::pow(v3 / v1, static_cast<double>(i) / kTries);
    const auto r = hiddenThicknessRatio(v1, v2, v3);
    if (!r || !(*r > 0.0)) {
      continue;
    }
    const double k = v1 * std::sqrt(1.0 - v2 * v2 / (v3 * v3)) / (v2 * std::sqrt(1.0 - v1 * v1 / (v3 * v3)));
    const double above = apparentDepth / (1.0 + *r * k);
    const HiddenLayer layer{v2, above * *r, above * (1.0 + *r)};
    if (!worst || layer.deepest > worst->deepest) {
      worst = layer;
    }
  }
  return worst;
}

}  // namespace strikeplate
