#include "core/picking/trace_prior.h"

#include <algorithm>
#include <cmath>

namespace strikeplate {
namespace {

constexpr double kHeavyTail = 2.0;           // half of the degrees of freedom plus one
constexpr double kFastestGround = 6000.0;    // m/s
constexpr double kLateTrigger = 0.0035;      // s
constexpr double kTooFast = 5.0;             // in log probability
constexpr double kLeastPrediction = 0.0005;  // s

double studentLog(double z) {
  return -kHeavyTail * std::log1p(z * z / 3.0);
}

}  // namespace

void addTracePrior(const LineTrace& trace, double origin, double step, std::vector<double>& logEvidence) {
  for (std::size_t p = 0; p < logEvidence.size(); ++p) {
    const double time = origin + static_cast<double>(p) * step;
    if (trace.trusted) {
      const double z = (time - trace.trusted->time) / std::hypot(trace.trusted->sigma, step);
      logEvidence[p] = std::max(-0.5 * z * z, -60.0);
      continue;
    }
    if (time < trace.offset() / kFastestGround - kLateTrigger)
      logEvidence[p] -= kTooFast;
    if (trace.priorScale > 0.0)
      logEvidence[p] += studentLog((time - trace.priorMean) / trace.priorScale);
    if (trace.curveScale > 0.0)
      logEvidence[p] += studentLog((time - trace.curveMean) / trace.curveScale);
    if (trace.predicted) {
      logEvidence[p] +=
          studentLog((time - trace.predicted->time) / std::max(trace.predicted->sigma, kLeastPrediction));
    }
  }
}

}  // namespace strikeplate
