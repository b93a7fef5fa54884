#include "sample_data/wave/truth.h"

#include <algorithm>
#include <cmath>

namespace strikeplate::wave {

namespace {

using nlohmann::ordered_json;

double microseconds(double s) {
  return std::round(s * 1e7) / 1e7;
}

ordered_json rounded(const std::vector<double>& values) {
  ordered_json list = ordered_json::array();
  for (const double v : values)
    list.push_back(microseconds(v));
  return list;
}

PlaneGrid timesGrid(const Scene& scene) {
  const double h = scene.timesStep;
  double left = scene.geophones.front().x;
  double right = left;
  double high = scene.geophones.front().elevation;
  for (const auto* places : {&scene.geophones, &scene.shots}) {
    for (const Place& p : *places) {
      left = std::min(left, p.x), right = std::max(right, p.x), high = std::max(high, p.elevation);
    }
  }
  double low = high;
  for (const Profile& p : scene.interfaces)
    low = std::min(low, *std::min_element(p.elevation.begin(), p.elevation.end()));
  const bool dives = scene.layers.back().gradient > 0.0;
  const double below = dives ? scene.depth : 2.0;
  return {left - 10.0 * h, high + 5.0 * h, h, static_cast<int>(std::ceil((right - left) / h)) + 21,
          static_cast<int>(std::ceil((high - low + below) / h)) + 6};
}

ordered_json interfaceJson(const Scene& scene, std::size_t n) {
  ordered_json x = ordered_json::array(), elevation = ordered_json::array(), depth = ordered_json::array();
  const double from = scene.geophones.front().x;
  const int points = static_cast<int>(std::lround((scene.geophones.back().x - from) * 2.0)) + 1;
  for (int i = 0; i < points; ++i) {
    const double at = from + 0.5 * i;
    const double z = scene.interfaces[n].at(at);
    x.push_back(at);
    elevation.push_back(std::round(z * 1e4) / 1e4);
    depth.push_back(std::round((scene.ground.at(at) - z) * 1e4) / 1e4);
  }
  return {{"layer", n + 2},
          {"what", "top of this layer"},
          {"x", x},
          {"elevation", elevation},
          {"depth_below_ground", depth}};
}

}  // namespace

ShotTruth trueTimes(const Scene& scene, const Place& shot) {
  constexpr double kNeeded = 2e-5;
  ShotTruth truth;
  const PlaneGrid grid = timesGrid(scene);
  for (int count = 1; count <= static_cast<int>(scene.layers.size()); ++count) {
    const TimeField field = firstArrivals(layeredSlowness(scene.layered(count), grid), shot.x, shot.elevation);
    std::vector<double> row;
    for (const Place& g : scene.geophones)
      row.push_back(field.at(g.x, g.elevation));
    truth.within.push_back(std::move(row));
  }
  truth.time = truth.within.back();
  for (std::size_t g = 0; g < scene.geophones.size(); ++g) {
    int layer = static_cast<int>(scene.layers.size());
    while (layer > 1 && truth.within[static_cast<std::size_t>(layer - 2)][g] - truth.time[g] < kNeeded)
      --layer;
    truth.layer.push_back(layer);
  }
  return truth;
}

ordered_json truthJson(const Scene& scene, const std::vector<ShotTruth>& shots) {
  ordered_json j;
  j["scene"] = scene.name;
  j["title"] = scene.title;
  j["note"] = scene.note;
  j["conventions"] = {
      {"x", "m along the line"},
      {"z", "elevation, m, positive up"},
      {"time", "s after the blow; sample k of a file is at DELAY + k * SAMPLE_INTERVAL on the recorder's clock"},
      {"t_in_file", "t_in_file_s = t_s + time_zero_error_s: what the recorder's clock shows"},
      {"t_within_layers", "row n: first arrival if only layers 1 to n were there"},
      {"margin", "by how much the arrival would be later without its layer; null for the direct wave"},
      {"polarity", "upward motion is a negative number (SEG)"}};
  for (std::size_t n = 0; n < scene.layers.size(); ++n) {
    const Layer& l = scene.layers[n];
    j["layers"].push_back({{"layer", n + 1},
                           {"name", l.name},
                           {"vp", l.vp},
                           {"vs", l.vs},
                           {"rho", l.rho},
                           {"gradient_per_s", l.gradient}});
  }
  j["interfaces"] = ordered_json::array();
  for (std::size_t n = 0; n < scene.interfaces.size(); ++n)
    j["interfaces"].push_back(interfaceJson(scene, n));
  for (std::size_t g = 0; g < scene.geophones.size(); ++g) {
    j["geophones"].push_back({{"trace", g + 1}, {"x", scene.geophones[g].x}, {"z", scene.geophones[g].elevation}});
  }
  j["sampling"] = {{"dt_s", scene.interval}};
  j["polarity"] = -1;
  for (std::size_t s = 0; s < shots.size(); ++s) {
    ordered_json margin = ordered_json::array(), within = ordered_json::array();
    for (std::size_t g = 0; g < scene.geophones.size(); ++g) {
      const int layer = shots[s].layer[g];
      margin.push_back(layer == 1 ? ordered_json()
                                  : ordered_json(microseconds(
                                        shots[s].within[static_cast<std::size_t>(layer - 2)][g] - shots[s].time[g])));
    }
    for (const auto& row : shots[s].within)
      within.push_back(rounded(row));
    j["shots"].push_back({{"shot", s + 1},
                          {"x", scene.shots[s].x},
                          {"z", scene.shots[s].elevation},
                          {"t_s", rounded(shots[s].time)},
                          {"layer", shots[s].layer},
                          {"margin_to_next_layer_s", margin},
                          {"t_within_layers_s", within}});
  }
  return j;
}

ordered_json variantJson(const Scene& scene, const std::vector<ShotTruth>& shots,
                         const std::vector<WrittenFile>& files, bool faults) {
  const auto list = [faults](int trace) {
    return faults && trace > 0 ? ordered_json::array({trace}) : ordered_json::array();
  };
  ordered_json v;
  v["dead_traces"] = list(scene.faults.deadTrace);
  v["reversed_traces"] = list(scene.faults.reversedTrace);
  for (const WrittenFile& f : files) {
    const auto s = static_cast<std::size_t>(f.shot);
    std::vector<double> inFile = shots[s].time;
    for (double& t : inFile)
      t += f.clockError;
    ordered_json ratio = ordered_json::array();
    for (const double r : f.signalToNoise)
      ratio.push_back(std::isfinite(r) ? ordered_json(std::round(r * 100) / 100) : ordered_json());
    v["files"].push_back({{"file", f.name},
                          {"also", ordered_json::array()},
                          {"shot", f.shot + 1},
                          {"shot_x", scene.shots[s].x},
                          {"shot_z", scene.shots[s].elevation},
                          {"repeat", f.repeat},
                          {"delay_s", faults ? scene.faults.delay : 0.0},
                          {"time_zero_error_s", f.clockError},
                          {"t_in_file_s", rounded(inFile)},
                          {"snr", ratio}});
  }
  return v;
}

}  // namespace strikeplate::wave
