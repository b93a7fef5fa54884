#pragma once

#include <utility>
#include <vector>

#include <Eigen/Core>

namespace strikeplate {

/// Shortest ways between nodes of an interface that stay on or below it.
///
/// A head wave need not follow the interface: where the rock rises between two points it cuts straight below, so
/// its way is the lower convex hull of the interface between them, found for all pairs by a stack scan (Andrew 1979
/// Inf. Process. Lett. 9:216) from each node.
class HullTable {
 public:
  HullTable() = default;
  /// Interface elevation z (m) at nodes `spacing` m apart.
  HullTable(const Eigen::VectorXd& z, double spacing);

  /// Length of the way between nodes a and b, m; symmetric.
  [[nodiscard]] const Eigen::MatrixXd& lengths() const { return length_; }
  /// The same, given away; only the bends can be asked for afterwards.
  [[nodiscard]] Eigen::MatrixXd takeLengths() { return std::move(length_); }
  /// Nodes strictly between a and b at which the way bends, in order from a to b.
  void bends(int a, int b, std::vector<int>& out) const;

 private:
  Eigen::MatrixXd length_;
  Eigen::MatrixXi previous_;  // (b, a), a < b: the bend before b on the way from a
};

}  // namespace strikeplate
