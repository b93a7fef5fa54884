#pragma once

#include <string>
#include <vector>

#include "core/base/estimate.h"

namespace strikeplate {

/// A range of P velocities that has been published for a material.
struct MaterialRange {
  std::string material;
  double low = 0.0, high = 0.0;  ///< m/s
  std::string source;
};

/// Every material whose published range the velocity's 95 % interval touches, lowest range first. A velocity alone
/// never names a material: where only one range is touched, the nearest other one is given as well. Empty for a
/// velocity that is not determined or lies outside all ranges.
/// Source of the ranges: GeoSci.xyz, Geophysics for Practicing Geoscientists, table of seismic velocities (CC
/// BY-SA 4.0).
std::vector<MaterialRange> materialHint(const Estimate& velocity);

/// All ranges known.
const std::vector<MaterialRange>& publishedRanges();

}  // namespace strikeplate
