#include "core/methods/material_hint.h"

#include <algorithm>

namespace strikeplate {

const std::vector<MaterialRange>& publishedRanges() {
  constexpr const char* kSource = "GeoSci.xyz, Geophysics for Practicing Geoscientists";
  static const std::vector<MaterialRange> ranges = {
      {"vegetal soil", 300, 700, kSource},
      {"dry sand", 400, 1200, kSource},
      {"saturated shale and clay", 1100, 2500, kSource},
      {"water", 1450, 1500, kSource},
      {"wet sand", 1500, 2000, kSource},
      {"porous saturated sandstone", 2000, 3500, kSource},
      {"marl", 2000, 3000, kSource},
      {"coal", 2200, 2700, kSource},
      {"chalk", 2300, 2600, kSource},
      {"ice", 3400, 3800, kSource},
      {"limestone", 3500, 6000, kSource},
      {"dolomite", 3500, 6500, kSource},
      {"anhydrite", 4000, 5500, kSource},
      {"gneiss", 4400, 5200, kSource},
      {"salt", 4500, 5500, kSource},
      {"granite", 4500, 6000, kSource},
      {"basalt", 5000, 6000, kSource},
  };
  return ranges;
}

std::vector<MaterialRange> materialHint(const Estimate& velocity) {
  std::vector<MaterialRange> touched;
  if (!velocity.determined) {
    return touched;
  }
  for (const MaterialRange& range : publishedRanges()) {
    if (range.high >= velocity.low95 && range.low <= velocity.high95) {
      touched.push_back(range);
    }
  }
  if (touched.size() == 1) {
    const MaterialRange only = touched.front();
    const MaterialRange* nearest = nullptr;
    const auto gap = [&velocity](const MaterialRange& r) {
      return std::max(r.low - velocity.high95, velocity.low95 - r.high);
    };
    for (const MaterialRange& range : publishedRanges()) {
      if (range.material != only.material && (nearest == nullptr || gap(range) < gap(*nearest))) {
        nearest = &range;
      }
    }
    touched.insert(nearest->low < only.low ? touched.begin() : touched.end(), *nearest);
  }
  return touched;
}

}  // namespace strikeplate
