#include "core/picking/fine_pass.h"

#include <algorithm>
#include <cmath>
#include <numeric>

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
constexpr double kNoiseRatio = 6.0;                  // in log probability
constexpr int kMostStretches = 3;
constexpr double kMostSupport = 10.0;  // in log probability
constexpr double kOutside = 50.0;      // in log probability
constexpr double kLeastCap = 1.2, kMostCap = 8.0;

/// Largest swing in noise rms where the onset is looked for.
double loudnessOf(const LineTrace& t, std::size_t first, std::size_t end) {
  double most = 0.0;
  for (std::size_t i = first; i < std::min(end, t.samples.size()); ++i) {
    most = std::max(most, std::abs(static_cast<double>(t.samples[i])));
  }
  return most / t.rms;
}

/// Log likelihood ratio of an onset whose first swing has the expected sign, or hardly ever the other one.
double signedLog(double up, double down, int polarity) {
  if (polarity == 0)
    return logAdd(up, down);
  const double likely = std::log(1.9), unlikely = std::log(0.1);
  return logAdd(up + (polarity > 0 ? likely : unlikely), down + (polarity < 0 ? likely : unlikely));
}

/// How far the likelihood ratios of a trace are to be believed, 0 to 1. Where arrivals are looked for in stretches of
/// its noise alone, a right noise model gives seldom more than `kNoiseRatio`; noise that swells or comes in waves
/// gives more, and would pass for arrivals.
double trustIn(const LineTrace& t, const PulseBank& bank) {
  constexpr auto kLength = static_cast<std::size_t>(kBefore + kAfter);
  double most = 0.0;
  std::size_t end = std::min(t.noiseEnd, t.white.size());
  for (int stretch = 0; stretch < kMostStretches && end >= kLength + kBeyond; ++stretch, end -= kLength) {
    const std::size_t first = end - kLength - kBeyond;
    const OnsetLikelihood like =
        onsetLikelihood(bank, t.white, first, first + kLength, kBeyond, loudnessOf(t, first, end));
    for (std::size_t p = 0; p < like.up.size(); ++p)
      most = std::max(most, logAdd(like.up[p], like.down[p]));
  }
  return std::min(1.0, kNoiseRatio / std::max(most, 1e-9));
}

struct FineEvidence {
  std::vector<double> log;      ///< by position
  std::vector<double> support;  ///< log likelihood ratio of an arrival to noise, at most 10, by position
  std::vector<double> upness;   ///< ln p(up) - ln p(down), by position
};

FineEvidence fineEvidence(const LineTrace& t, const PulseBank& bank, std::ptrdiff_t from) {
  constexpr auto count = static_cast<std::size_t>(kBefore + kAfter);
  FineEvidence out{std::vector<double>(count, 0.0), std::vector<double>(count, 0.0), std::vector<double>(count, 0.0)};
  const auto size = static_cast<std::ptrdiff_t>(t.white.size());
  const std::ptrdiff_t first = std::clamp<std::ptrdiff_t>(from, 0, size);
  const std::ptrdiff_t last = std::clamp<std::ptrdiff_t>(from + kBefore + kAfter, 0, size);
  if (last <= first)
    return out;
  const auto a = static_cast<std::size_t>(first), b = static_cast<std::size_t>(last);
  const OnsetLikelihood like = onsetLikelihood(bank, t.white, a, b, kBeyond, loudnessOf(t, a, b + kBeyond));
  const auto skipped = static_cast<std::size_t>(first - from);
  double most = 0.0;
  for (std::size_t p = 0; p < like.up.size(); ++p)
    most = std::max(most, signedLog(like.up[p], like.down[p], t.polarity));
  const double cap = std::clamp(0.5 * most, kLeastCap, kMostCap);
  for (std::size_t p = 0; p < count; ++p) {
    const std::size_t at = p - skipped;  // wraps beyond the end for positions before the trace
    const bool inside = at < like.up.size();
    const double log = inside ? signedLog(like.up[at], like.down[at], t.polarity) : most - kOutside;
    out.log[p] = logAdd(kTemper * (log - most), -cap);
    out.support[p] = std::clamp(log, -kMostSupport, kMostSupport);
    if (inside)
      out.upness[p] = like.up[at] - like.down[at];
  }
  return out;
}

/// Support of each trace: the mean over it and two neighbours to either side.
void shareSupport(LineWork& work, const std::vector<std::size_t>& side, const std::vector<double>& own) {
  for (std::size_t k = 0; k < side.size(); ++k) {
    const std::size_t first = k > 2 ? k - 2 : 0, last = std::min(k + 3, side.size());
    double sum = 0.0;
    for (std::size_t j = first; j < last; ++j)
      sum += own[j];
    work.traces[side[k]].support = sum / static_cast<double>(last - first);
  }
}

}  // namespace

void updateNoise(LineWork& work) {
  for (LineTrace& t : work.traces) {
    if (!t.usable || t.posterior.empty())
      continue;
    const double wanted = std::max(0.0025, 3.0 * t.beliefSigma);
    const double clear = std::min(wanted, std::max(0.00075, 0.4 * (t.belief - t.start)));
    const double samples = (t.belief - clear - t.start) / kWorkInterval;
    // Not before what the trace alone says: a belief far too early must not make itself true.
    const double least = static_cast<double>(noiseEndOf(t));
    t.noiseEnd = static_cast<std::size_t>(std::clamp(samples, least, static_cast<double>(t.samples.size())));
  }
}

bool finePass(LineWork& work, const std::vector<PulseBank>& banks, const Progress& progress) {
  double done = 0.0;
  for (const auto& side : work.sides) {
    if (!goOn(progress, done++ / static_cast<double>(work.sides.size())))
      return false;
    PathEvidence evidence;
    std::vector<std::vector<double>> upness, support;
    evidence.step = kWorkInterval;
    for (const std::size_t i : side) {
      const LineTrace& t = work.traces[i];
      const auto centre = static_cast<std::ptrdiff_t>(std::llround((t.belief - t.start) / kWorkInterval + 0.5));
      const std::ptrdiff_t from = centre - kBefore;
      evidence.origins.push_back(t.onsetTime(static_cast<double>(from)));
      evidence.offsets.push_back(t.offset());
      FineEvidence fine = fineEvidence(t, banks[t.setting], from);
      evidence.logEvidence.push_back(std::move(fine.log));
      upness.push_back(std::move(fine.upness));
      support.push_back(std::move(fine.support));
      addTracePrior(t, evidence.origins.back(), evidence.step, evidence.logEvidence.back());
    }
    const auto posterior = pathPosterior(evidence);
    std::vector<double> own(side.size());
    for (std::size_t k = 0; k < side.size(); ++k) {
      LineTrace& t = work.traces[side[k]];
      t.posterior = posterior[k];
      own[k] = std::inner_product(support[k].begin(), support[k].end(), t.posterior.begin(), 0.0);
      t.upness = std::inner_product(upness[k].begin(), upness[k].end(), t.posterior.begin(), 0.0);
      t.posteriorStart = evidence.origins[k];
      t.step = evidence.step;
      beliefFromPosterior(t);
    }
    shareSupport(work, side, own);
  }
  return true;
}

void judgeSureness(LineWork& work, const std::vector<PulseBank>& banks) {
  for (LineTrace& t : work.traces) {
    if (t.usable)
      t.sureness = t.support * trustIn(t, banks[t.setting]);
  }
}

}  // namespace strikeplate
