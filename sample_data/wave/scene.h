#pragma once

#include <string>
#include <utility>
#include <vector>

#include "core/base/result.h"
#include "core/section/layered_grid.h"

namespace strikeplate::wave {

/// One elastic layer; P velocity grows by `gradient` (1/s) with depth below the layer's top, S velocity in
/// proportion.
struct Layer {
  std::string name;
  double vp = 0.0;   ///< m/s
  double vs = 0.0;   ///< m/s
  double rho = 0.0;  ///< kg/m3
  double gradient = 0.0;
};

/// Straight between the points, level beyond the outermost ones; m.
struct Profile {
  std::vector<double> x;
  std::vector<double> elevation;
  [[nodiscard]] double at(double position) const;
};

/// A place on the ground, moved to the nearest node of the wave grid; m.
struct Place {
  double x = 0.0;
  double elevation = 0.0;
};

enum class Pulse { SquareExponential, LinearExponential, RaisedCosine };

/// What is wrong on purpose in the noise class `faults`. Traces and shots count from 1, 0 for none.
struct Faults {
  int deadTrace = 0;
  int reversedTrace = 0;
  int lateShot = 0;
  double clockError = 0.0;  ///< s, added to every time in the file of lateShot
  int repeatedShot = 0;
  int blows = 1;             ///< files of repeatedShot
  double humHz = 0.0;        ///< 0 for no hum; its rms is twice the noise's
  double airVelocity = 0.0;  ///< m/s, 0 for no sound wave
  double delay = 0.0;        ///< s, DELAY of every file
};

struct Scene {
  std::string name;
  std::string title;
  std::string note;
  std::vector<Layer> layers;
  std::vector<Profile> interfaces;
  Profile ground;
  std::vector<Place> geophones;
  std::vector<Place> shots;
  Pulse pulse = Pulse::SquareExponential;
  double tau = 0.003;         ///< s
  double interval = 0.00025;  ///< s
  double length = 0.2;        ///< s, from the first sample
  double step = 0.125;        ///< m, of the wave grid
  double margin = 25.0;       ///< m of ground beyond the outermost shot or geophone
  double depth = 40.0;        ///< m of ground below the lowest surface
  double absorbing = 12.0;    ///< m of it that absorb, at both sides and below
  double timesStep = 0.1;     ///< m, of the grid for the true times
  int code = 2;               ///< SEG-2 sample format
  Faults faults;
  std::vector<std::pair<std::string, std::string>> header;  ///< SEG-2 keywords of every file

  /// The ground down to the top `count` layers, for grids; refers to this scene.
  [[nodiscard]] LayeredGround layered(int count) const;
  /// Index from 0 of the layer at a point, and the elevation of that layer's top.
  [[nodiscard]] std::pair<int, double> layerAt(double x, double elevation) const;
};

/// Reads a scene file (the fields are described in sample_data/README.md).
Result<Scene> readScene(const std::string& path);

}  // namespace strikeplate::wave
