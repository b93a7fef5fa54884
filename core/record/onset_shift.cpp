#include "core/record/onset_shift.h"

#include <algorithm>
#include <cmath>
#include <vector>

namespace strikeplate {
namespace {

constexpr double kInterval = 0.000125;
constexpr double kStart = 0.5;  // s, far from both ends, so that no filter here meets them

double fivePercentTime(const PassBand& band) {
  constexpr double kRise = 0.004;
  constexpr float kShare = 0.05F;
  std::vector<float> pulse(8000);
  for (std::size_t i = 0; i < pulse.size(); ++i) {
    const double u = (static_cast<double>(i) * kInterval - kStart) / kRise;
    pulse[i] = static_cast<float>(u <= 0.0 ? 0.0 : u * u * std::exp(2.0 * (1.0 - u)) * std::cos(1.2 * (u - 1.0)));
  }
  const auto out = zeroPhase(pulse, kInterval, band);
  const auto peak = std::max_element(out.begin(), out.end());
  auto at = peak;
  while (at != out.begin() && *at > kShare * *peak) {
    --at;
  }
  const double part = static_cast<double>((kShare * *peak - *at) / (*(at + 1) - *at));
  return (static_cast<double>(at - out.begin()) + part) * kInterval - kStart;
}

}  // namespace

double onsetShift(const PassBand& band) {
  return fivePercentTime(band) - fivePercentTime({});
}

}  // namespace strikeplate
