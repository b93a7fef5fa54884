#include "core/picking/dead_traces.h"

#include <algorithm>
#include <cmath>
#include <limits>
#include <map>

#include "core/picking/noise_model.h"

namespace strikeplate {
namespace {

constexpr double kQuiet = 0.03;     // of the neighbours' rms
constexpr double kStandsOut = 6.0;  // of the own rms

struct Loudness {
  double rms = 0.0, peak = 0.0;
};

Loudness loudnessOf(const LineTrace& t) {
  const NoiseLevel level = noiseLevel(t.samples);
  Loudness loudness{level.rms, 0.0};
  for (const float x : t.samples)
    loudness.peak = std::max(loudness.peak, std::abs(x - level.mean));
  return loudness;
}

/// A geophone that is dead for most shots is dead for all: at the quietest ones its hiss may pass for noise.
void markDeadGeophones(std::vector<LineTrace>& traces) {
  std::map<double, std::pair<std::size_t, std::size_t>> geophones;  // position -> dead, all
  for (const LineTrace& t : traces) {
    auto& [dead, all] = geophones[t.x];
    dead += t.usable ? 0 : 1;
    ++all;
  }
  for (LineTrace& t : traces) {
    const auto& [dead, all] = geophones[t.x];
    if (2 * dead > all)
      t.usable = false;
  }
}

}  // namespace

void markDeadTraces(std::vector<LineTrace>& traces) {
  std::vector<Loudness> loudness;
  for (const LineTrace& t : traces)
    loudness.push_back(loudnessOf(t));
  for (std::size_t i = 0; i < traces.size(); ++i) {
    double neighbours = std::numeric_limits<double>::infinity();
    for (const std::size_t j : {i - 1, i + 1}) {
      if (j < traces.size() && traces[j].gather == traces[i].gather && traces[j].usable) {
        neighbours = std::min(neighbours, loudness[j].rms);
      }
    }
    const bool quiet = std::isfinite(neighbours) && loudness[i].rms < kQuiet * neighbours;
    if (quiet && loudness[i].peak < kStandsOut * loudness[i].rms)
      traces[i].usable = false;
  }
  markDeadGeophones(traces);
}

}  // namespace strikeplate
