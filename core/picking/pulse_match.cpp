#include "core/picking/pulse_match.h"

#include <algorithm>
#include <array>
#include <cmath>

#include "core/picking/tune.h"
#include "core/picking/work_trace.h"

namespace strikeplate {
namespace {

constexpr std::array<double, 4> kPeaks{0.001, 0.0016, 0.0026, 0.0042};  // s
constexpr std::array<double, 5> kAmplitudes{2.0, 3.0, 4.5, 6.5, 9.0};   // of the matched filter's output
static const double kMost = tune("PM", 10.0);
static const double kEarlierFrom = tune("PE", 2.5);  // evidence that counts as an earlier arrival
static const double kEarlierFade = std::exp(-0.25 / tune("PF", 40));
static const std::size_t kGuard =
    static_cast<std::size_t>(tune("PG", 12));  // samples before the onset that its own pulse may reach
static const double kBlock = tune("PB", 16);   // samples that make one independent look

/// The pulse (u exp(1-u))^2 up to 2.2 of its peak time, whitened, unit energy.
std::vector<float> unitPulse(const NoiseModel& noise, double peak) {
  const auto count = static_cast<std::size_t>(std::ceil(2.2 * peak / kWorkInterval));
  std::vector<float> pulse(count);
  for (std::size_t i = 0; i < count; ++i) {
    const double u = (static_cast<double>(i) + 0.5) * kWorkInterval / peak;
    pulse[i] = static_cast<float>(std::pow(u * std::exp(1.0 - u), 2.0));
  }
  std::vector<float> padded(noise.whitener.size(), 0.0F);
  padded.insert(padded.end(), pulse.begin(), pulse.end());
  const std::vector<float> seen = whitened(noise, padded);
  std::vector<float> out(seen.begin() + static_cast<std::ptrdiff_t>(noise.whitener.size()), seen.end());
  double energy = 0.0;
  for (const float x : out)
    energy += static_cast<double>(x) * x;
  for (float& x : out)
    x = static_cast<float>(x / std::sqrt(energy));
  return out;
}

/// ln of the mean over amplitudes of p(output | amplitude, either sign) / p(output | noise).
double ratioOf(double output) {
  double sum = 0.0;
  for (const double a : kAmplitudes)
    sum += std::exp(std::min(300.0, a * std::abs(output) - 0.5 * a * a));
  return std::log(0.5 * sum / static_cast<double>(kAmplitudes.size()));
}

}  // namespace

std::vector<double> pulseMatchEvidence(const NoiseModel& noise, std::span<const float> white) {
  const std::size_t n = white.size();
  std::vector<double> match(n, 0.0);
  for (const double peak : kPeaks) {
    const std::vector<float> pulse = unitPulse(noise, peak);
    for (std::size_t i = 0; i + pulse.size() <= n; ++i) {
      float sum = 0.0F, energy = 0.0F;
      for (std::size_t k = 0; k < pulse.size(); ++k) {
        sum += pulse[k] * white[i + k];
        energy += white[i + k] * white[i + k];
      }
      const double left = (energy - sum * sum) / static_cast<double>(pulse.size() - 1);
      match[i] += std::exp(std::min(ratioOf(sum / std::sqrt(std::max(1.0, left))), kMost + 2.0)) /
                  static_cast<double>(kPeaks.size());
    }
  }
  for (double& m : match)
    m = m > 0.0 ? std::min(std::log(m), kMost) : 0.0;
  std::vector<double> evidence = match;
  double earlier = 0.0;
  for (std::size_t i = kGuard; i < n; ++i) {
    earlier = std::max(0.0, match[i - kGuard] - kEarlierFrom) + kEarlierFade * earlier;
    evidence[i] -= earlier / kBlock;
  }
  return evidence;
}

}  // namespace strikeplate
