#include "core/picking/fine_pass.h"

#include <algorithm>
#include <cmath>

#include "core/picking/coarse_pass.h"
#include "core/picking/offset_path.h"
#include "core/picking/onset_likelihood.h"
#include "core/picking/trace_prior.h"
#include "core/picking/work_trace.h"

namespace strikeplate {
namespace {

constexpr std::ptrdiff_t kBefore = 24, kAfter = 12;  // onset positions about the belief
constexpr std::size_t kBeyond = 8;                   // samples heard after the last position
constexpr double kTemper = 0.7;                      // the pulses are not the truth
constexpr double kLeastCap = 1.2, kMostCap = 8.0;

/// Largest swing in noise rms where the onset is looked for.
double loudnessOf(const LineTrace& t, std::size_t first, std::size_t end) {
  double most = 0.0;
  for (std::size_t i = first; i < std::min(end, t.samples.size()); ++i) {
    most = std::max(most, std::abs(static_cast<double>(t.samples[i])));
  }
  return most / t.rms;
}

std::vector<double> fineEvidence(const LineTrace& t, const PulseBank& bank, std::ptrdiff_t from) {
  constexpr auto count = static_cast<std::size_t>(kBefore + kAfter);
  std::vector<double> evidence(count, 0.0);
  const auto size = static_cast<std::ptrdiff_t>(t.white.size());
  const std::ptrdiff_t first = std::clamp<std::ptrdiff_t>(from, 0, size);
  const std::ptrdiff_t last = std::clamp<std::ptrdiff_t>(from + kBefore + kAfter, 0, size);
  if (last <= first)
    return evidence;
  const auto a = static_cast<std::size_t>(first), b = static_cast<std::size_t>(last);
  const OnsetLikelihood like = onsetLikelihood(bank, t.white, a, b, kBeyond, loudnessOf(t, a, b + kBeyond));
  double most = 0.0;
  for (std::size_t p = 0; p < like.up.size(); ++p)
    most = std::max(most, logAdd(like.up[p], like.down[p]));
  const double cap = std::clamp(0.5 * most, kLeastCap, kMostCap);
  for (std::size_t p = 0; p < count; ++p) {
    const std::ptrdiff_t at = from + static_cast<std::ptrdiff_t>(p) - first;
    const bool inside = at >= 0 && at < static_cast<std::ptrdiff_t>(like.up.size());
    const double log =
        inside ? logAdd(like.up[static_cast<std::size_t>(at)], like.down[static_cast<std::size_t>(at)]) : most - 50.0;
    evidence[p] = logAdd(kTemper * (log - most), -cap);
  }
  return evidence;
}

}  // namespace

void updateNoise(LineWork& work) {
  for (LineTrace& t : work.traces) {
    if (!t.usable || t.posterior.empty())
      continue;
    const double wanted = std::max(0.0025, 3.0 * t.beliefSigma);
    const double clear = std::min(wanted, std::max(0.00075, 0.4 * (t.belief - t.start)));
    const double samples = (t.belief - clear - t.start) / kWorkInterval;
    t.noiseEnd = static_cast<std::size_t>(std::clamp(samples, 0.0, static_cast<double>(t.samples.size())));
  }
}

bool finePass(LineWork& work, const PulseBank& bank, const Progress& progress) {
  double done = 0.0;
  for (const auto& side : work.sides) {
    if (!goOn(progress, done++ / static_cast<double>(work.sides.size())))
      return false;
    PathEvidence evidence;
    evidence.step = kWorkInterval;
    for (const std::size_t i : side) {
      const LineTrace& t = work.traces[i];
      const auto centre = static_cast<std::ptrdiff_t>(std::llround((t.belief - t.start) / kWorkInterval + 0.5));
      const std::ptrdiff_t from = centre - kBefore;
      evidence.origins.push_back(t.onsetTime(static_cast<double>(from)));
      evidence.offsets.push_back(t.offset());
      evidence.logEvidence.push_back(fineEvidence(t, bank, from));
      addTracePrior(t, evidence.origins.back(), evidence.step, evidence.logEvidence.back());
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
