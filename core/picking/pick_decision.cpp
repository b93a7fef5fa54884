#include "core/picking/pick_decision.h"

#include <cmath>

namespace strikeplate {
namespace {

constexpr double kNear = 0.002;  // s
constexpr double kLeastMass = 0.7;
constexpr double kLeastSupport = 1.0, kLeastSureSupport = -2.5;  // in log probability
constexpr double kSureMass = 0.97;
constexpr double kSureSigma = 0.0009, kMostSigma = 0.0015;  // s
constexpr double kWiden = 1.3;                              // the posterior is too sure of its model
constexpr double kPulseSigma = 0.00017;                     // s, what the unknown shape of the pulse leaves open

}  // namespace

std::optional<Onset> decide(const LineTrace& trace) {
  if (!trace.usable || trace.posterior.empty())
    return std::nullopt;
  double mass = 0.0;
  for (std::size_t p = 0; p < trace.posterior.size(); ++p) {
    const double time = trace.posteriorStart + static_cast<double>(p) * trace.step;
    if (std::abs(time - trace.belief) <= kNear)
      mass += trace.posterior[p];
  }
  const double sigma = std::hypot(kWiden * trace.beliefSigma, kPulseSigma);
  const bool sure = mass >= kSureMass && sigma <= kSureSigma;
  if (!trace.trusted && !(trace.support >= (sure ? kLeastSureSupport : kLeastSupport)))
    return std::nullopt;
  if (!(mass >= kLeastMass) || !(sigma <= kMostSigma))
    return std::nullopt;
  return Onset{trace.belief, sigma, mass};
}

}  // namespace strikeplate
