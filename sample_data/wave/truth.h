#pragma once

#include <string>
#include <vector>

#include <nlohmann/json.hpp>

#include "sample_data/wave/scene.h"

namespace strikeplate::wave {

/// True first arrivals of one shot.
struct ShotTruth {
  std::vector<double> time;                 ///< s after the blow, at each geophone
  std::vector<int> layer;                   ///< deepest layer the arrival needs, from 1
  std::vector<std::vector<double>> within;  ///< s, by layer n: first arrival if only layers 1 to n were there
};

/// Times by the eikonal solver on the true ground, one run for every number of layers. An arrival is of the deepest
/// layer without which it would be later by more than 20 microseconds.
ShotTruth trueTimes(const Scene& scene, const Place& shot);

/// One file that was written.
struct WrittenFile {
  std::string name;  ///< with its folder
  int shot = 0;      ///< from 0
  int repeat = 0;
  double clockError = 0.0;
  std::vector<double> signalToNoise;  ///< first peak over noise rms; NaN where the trace is dead
};

/// The truth file: scene, truth of every shot, and what is wrong in which file.
nlohmann::ordered_json truthJson(const Scene& scene, const std::vector<ShotTruth>& shots);
nlohmann::ordered_json variantJson(const Scene& scene, const std::vector<ShotTruth>& shots,
                                   const std::vector<WrittenFile>& files, bool faults);

}  // namespace strikeplate::wave
