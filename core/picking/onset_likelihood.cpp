#include "core/picking/onset_likelihood.h"

#include <algorithm>
#include <cassert>
#include <cmath>
#include <limits>

namespace strikeplate {
namespace {

constexpr double kNever = -std::numeric_limits<double>::infinity();

struct Stretch {
  Eigen::MatrixXf columns;    ///< one column of samples for each position, zero beyond the end
  std::vector<int> counts;    ///< samples of each column that are looked at
  std::vector<double> power;  ///< sum of squares of each column
};

Stretch stretchOf(std::span<const float> white, std::size_t first, std::size_t last, std::size_t end) {
  Stretch s;
  const auto positions = static_cast<Eigen::Index>(last - first);
  s.columns = Eigen::MatrixXf::Zero(kPulseSamples, positions);
  for (Eigen::Index p = 0; p < positions; ++p) {
    const std::ptrdiff_t at = static_cast<std::ptrdiff_t>(first) + p - kLeadSamples;
    const int count =
        static_cast<int>(std::clamp<std::ptrdiff_t>(static_cast<std::ptrdiff_t>(end) - at, 0, kPulseSamples));
    double power = 0.0;
    for (int i = 0; i < count; ++i) {
      const float e = at + i < 0 ? 0.0F : white[static_cast<std::size_t>(at + i)];
      s.columns(i, p) = e;
      power += static_cast<double>(e) * e;
    }
    s.counts.push_back(count);
    s.power.push_back(power);
  }
  return s;
}

/// The scales that fit the trace: from a fortieth of the loudest swing to the swing itself.
std::pair<std::size_t, std::size_t> scaleRange(const PulseBank& bank, double loudness) {
  const auto above = std::upper_bound(bank.scales.begin(), bank.scales.end(), std::max(1.0, loudness));
  const auto last = static_cast<std::size_t>(above - bank.scales.begin());
  return {last > 6 ? last - 6 : 0, std::max<std::size_t>(last, 2)};
}

/// One filter's log likelihood ratio, split by the sign of the amplitude.
struct Signed {
  double up, down;
};

Signed evaluate(const PulseFilter& filter, const Eigen::MatrixXf& passed, Eigen::Index column, int count,
                double power) {
  double left = 0.0, match = 0.0;
  for (int i = 0; i < count; ++i) {
    const double z = passed(i, column);
    left += z * z;
    match += z * filter.mean(i);
  }
  const auto n = static_cast<std::size_t>(count);
  const double both = 0.5 * (power - left) - filter.logDiagonal[n];
  const double shape = both - 0.5 * filter.meanSquare[n];
  return {shape + match, shape - match};
}

}  // namespace

double logAdd(double a, double b) {
  const double high = std::max(a, b), low = std::min(a, b);
  return high == kNever ? kNever : high + std::log1p(std::exp(low - high));
}

OnsetLikelihood onsetLikelihood(const PulseBank& bank, std::span<const float> white, std::size_t first,
                                std::size_t last, std::size_t beyond, double loudness) {
  assert(first < last);
  const std::size_t end = std::min(white.size(), last + beyond);
  const Stretch stretch = stretchOf(white, first, last, end);
  const auto positions = static_cast<std::size_t>(stretch.columns.cols());
  OnsetLikelihood out;
  out.first = first;
  out.up.assign(positions, kNever);
  out.down.assign(positions, kNever);
  out.byPulse.assign(bank.pulses.size(), kNever);
  const auto [lowest, highest] = scaleRange(bank, loudness);
  Eigen::MatrixXf passed(kPulseSamples, stretch.columns.cols());
  for (std::size_t k = 0; k < bank.pulses.size(); ++k) {
    if (!(bank.weights[k] > 0.0))
      continue;
    const double weight = std::log(bank.weights[k] / static_cast<double>(highest - lowest));
    for (std::size_t s = lowest; s < highest; ++s) {
      const PulseFilter& filter = bank.filters[k][s];
      passed.noalias() = filter.inverse * stretch.columns;
      for (std::size_t p = 0; p < positions; ++p) {
        const Signed one =
            evaluate(filter, passed, static_cast<Eigen::Index>(p), stretch.counts[p], stretch.power[p]);
        out.up[p] = logAdd(out.up[p], weight + one.up);
        out.down[p] = logAdd(out.down[p], weight + one.down);
        out.byPulse[k] = logAdd(out.byPulse[k], logAdd(one.up, one.down));
      }
    }
  }
  return out;
}

}  // namespace strikeplate
