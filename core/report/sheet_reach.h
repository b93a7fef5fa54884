#pragma once

#include <optional>
#include <vector>

namespace strikeplate {

/// Least depth, m, to the top of a layer of velocity `faster` (m/s) that would never arrive first out to `offset` m:
/// a layer that deep or deeper can lie under the line unseen. `velocities` (m/s, rising) are those of the known
/// layers and `thicknesses` (m) of all but the last. With flat layers the time through the last known layer n is
/// x/v_n + sum 2 h_i sqrt(1/v_i^2 - 1/v_n^2) over i < n, and setting it equal to that of `faster` gives
///
///   h_n = [x (1/v_n - 1/v) + 2 sum h_i (sqrt(1/v_i^2 - 1/v_n^2) - sqrt(1/v_i^2 - 1/v^2))] / [2 sqrt(1/v_n^2 -
///   1/v^2)]
///
/// and the depth is h_n plus the known thicknesses, and never less than those. Nothing unless the velocities rise up
/// to `faster`, the sizes fit and offset > 0. Source: travel times of flat layers, Sheriff and Geldart, Exploration
/// Seismology (1995); own rearrangement.
std::optional<double> unseenBelow(const std::vector<double>& velocities, const std::vector<double>& thicknesses,
                                  double offset, double faster);

}  // namespace strikeplate
