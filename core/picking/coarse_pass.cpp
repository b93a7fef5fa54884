#include "core/picking/coarse_pass.h"

#include <algorithm>
#include <cmath>

#include "core/picking/noise_end.h"
#include "core/picking/offset_path.h"
#include "core/picking/pulse_match.h"
#include "core/picking/trace_prior.h"
#include "core/picking/work_trace.h"

namespace strikeplate {
namespace {

constexpr std::size_t kSkip = 2;          // work samples to a raster step
constexpr double kBeforeBlow = 0.006;     // s
constexpr double kSlowestGround = 180.0;  // m/s
constexpr double kLate = 0.04;            // s
constexpr double kEndShare = 1.0, kMatchShare = 1.5;
constexpr double kLeastCap = 1.2;
constexpr double kMostCap = 8.0;

struct Axis {
  std::size_t first = 0, count = 0;  ///< work samples, raster steps
};

Axis axisOf(const LineWork& work, const std::vector<std::size_t>& side) {
  const LineTrace& near = work.traces[side.front()];
  const LineTrace& far = work.traces[side.back()];
  const double from = std::max(0.0, (-kBeforeBlow - near.start) / kWorkInterval);
  const double until = (far.offset() / kSlowestGround + kLate - near.start) / kWorkInterval;
  std::size_t shortest = near.white.size();
  for (const std::size_t i : side)
    shortest = std::min(shortest, work.traces[i].white.size());
  Axis axis;
  axis.first = static_cast<std::size_t>(from);
  const double end = std::min(until, static_cast<double>(shortest));
  axis.count = end > from + 2 * kSkip ? static_cast<std::size_t>((end - from) / kSkip) : 0;
  return axis;
}

std::vector<double> rasterEvidence(const LineTrace& trace, const NoiseModel& noise, const Axis& axis) {
  const std::span<const float> heard(trace.white.data(), trace.white.size());
  std::vector<double> full = noiseEndEvidence(heard);
  const std::vector<double> match = pulseMatchEvidence(noise, heard);
  for (std::size_t i = 0; i < full.size(); ++i)
    full[i] = kEndShare * full[i] + kMatchShare * match[i];
  std::vector<double> raster(axis.count);
  for (std::size_t p = 0; p < axis.count; ++p) {
    raster[p] = std::max(full[axis.first + p * kSkip], full[axis.first + p * kSkip + 1]);
  }
  std::vector<double> sorted = raster;
  const auto middle = sorted.begin() + static_cast<std::ptrdiff_t>(sorted.size() / 2);
  std::nth_element(sorted.begin(), middle, sorted.end());
  const double most = *std::max_element(raster.begin(), raster.end());
  const double cap = std::clamp(0.3 * (most - *middle), kLeastCap, kMostCap);
  for (double& r : raster)
    r = logAdd(r, most - cap);
  return raster;
}

}  // namespace

void beliefFromPosterior(LineTrace& trace) {
  double sum = 0.0;
  double at[3] = {0.0, 0.0, 0.0};
  const double levels[3] = {0.1587, 0.5, 0.8413};
  int next = 0;
  for (std::size_t p = 0; p < trace.posterior.size() && next < 3; ++p) {
    while (next < 3 && sum + trace.posterior[p] >= levels[next]) {
      const double part = (levels[next] - sum) / trace.posterior[p] - 0.5;
      at[next++] = trace.posteriorStart + (static_cast<double>(p) + part) * trace.step;
    }
    sum += trace.posterior[p];
  }
  trace.belief = at[1];
  trace.beliefSigma = 0.5 * (at[2] - at[0]);
}

bool coarsePass(LineWork& work, const std::vector<NoiseModel>& noise, const Progress& progress) {
  double done = 0.0;
  for (const auto& side : work.sides) {
    if (!goOn(progress, done++ / static_cast<double>(work.sides.size())))
      return false;
    if (side.empty())
      continue;
    const Axis axis = axisOf(work, side);
    if (axis.count < 2)
      continue;
    PathEvidence evidence;
    evidence.step = kSkip * kWorkInterval;
    for (const std::size_t i : side) {
      LineTrace& t = work.traces[i];
      const double origin = t.onsetTime(static_cast<double>(axis.first)) + 0.5 * kWorkInterval;
      evidence.origins.push_back(origin);
      evidence.offsets.push_back(t.offset());
      evidence.logEvidence.push_back(rasterEvidence(t, noise[t.setting], axis));
      t.evidence = evidence.logEvidence.back();
      t.evidenceStart = origin;
      t.evidenceStep = evidence.step;
      addTracePrior(t, origin, evidence.step, evidence.logEvidence.back());
    }
    const auto posterior = pathPosterior(evidence);
    for (std::size_t k = 0; k < side.size(); ++k) {
      LineTrace& t = work.traces[side[k]];
      t.posterior = posterior[k];
      t.posteriorStart = evidence.origins[k];
      t.step = evidence.step;
      beliefFromPosterior(t);
    }
  }
  return true;
}

}  // namespace strikeplate
