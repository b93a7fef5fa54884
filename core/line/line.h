#pragma once

#include <string>
#include <vector>

namespace strikeplate {

/// A geophone's place: x along the line, elevation of the ground there, both in m.
struct Geophone {
  double x = 0.0;
  double elevation = 0.0;
  bool operator==(const Geophone&) const = default;
};

/// A shot's place: x along the line, elevation of the ground there, depth of the shot below the ground, all in m.
struct ShotPoint {
  double x = 0.0;
  double elevation = 0.0;
  double depth = 0.0;
  bool operator==(const ShotPoint&) const = default;
};

/// Depth to an interface met in a borehole on the line. depth and sigma in m, depth from the ground; `layer` is the
/// layer whose top was met (2, 3, ...).
struct Borehole {
  double x = 0.0;
  int layer = 2;
  double depth = 0.0;
  double sigma = 0.1;
  bool used = false;  ///< enters the section as a datum; otherwise it is only compared
  std::string name;
  bool operator==(const Borehole&) const = default;
};

/// The ground surface along the line: straight between the known points, level beyond the outermost ones.
class Ground {
 public:
  Ground() = default;
  /// Points in any order; where two share a position the mean elevation holds. No points means level ground at 0 m.
  Ground(const std::vector<Geophone>& geophones, const std::vector<ShotPoint>& shots);

  /// Elevation in m at x in m.
  [[nodiscard]] double at(double x) const;
  [[nodiscard]] const std::vector<Geophone>& points() const { return points_; }

 private:
  std::vector<Geophone> points_;  // rising x
};

}  // namespace strikeplate
