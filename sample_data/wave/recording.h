#pragma once

#include <cstdint>
#include <vector>

#include "sample_data/wave/elastic.h"

namespace strikeplate::wave {

/// What the geophones put out after one blow, mV, without noise: sample k at k * interval after the blow.
using Traces = std::vector<std::vector<double>>;

/// From line source to hammer blow and from ground motion to voltage, each step causal, so that what is zero before
/// the arrival stays zero:
/// - half a derivative in time (Gruenwald-Letnikov) and the factor sqrt(t / 2 pi) / r turn a line source's far field
///   into a point source's, for a straight ray of velocity r / t (from the far forms of both Green's functions);
/// - a geophone of 10 Hz, damping 0.65 (bilinear), 28 V s/m; largest force 10 kN.
/// SEG polarity: upward motion is a negative number.
Traces geophoneTraces(const Scene& scene, const Place& shot, const Motion& motion);

/// Value of a trace at t (s), straight between samples; zero before the blow, the last sample's after the end.
double valueAt(const std::vector<double>& trace, double interval, double t);

/// Height of the first peak after `onset` (s): the first largest magnitude over 2 % of the largest within 15 ms.
double firstPeak(const std::vector<double>& trace, double interval, double onset);

/// Seeded noise of the ground: 8 to 180 Hz, rms 1; a quarter of its power is one 8 to 35 Hz wave crossing the line.
class GroundNoise {
 public:
  explicit GroundNoise(std::uint64_t seed) : state_(seed) {}
  /// One record: a row of `samples` for each geophone.
  Traces record(const std::vector<Place>& geophones, int samples, double interval);
  /// Uniform from 0 to 1.
  double uniform();

 private:
  double normal();
  std::vector<double> band(int samples, double interval, double low, double high);
  std::uint64_t state_;
};

}  // namespace strikeplate::wave
