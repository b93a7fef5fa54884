#include "core/picking/polarity.h"

#include <algorithm>
#include <cmath>
#include <map>

namespace strikeplate {
namespace {

constexpr double kMostPerTrace = 4.0;  // in log probability
constexpr double kPlain = 6.0;

double vote(const LineTrace& t) {
  return std::clamp(t.upness, -kMostPerTrace, kMostPerTrace);
}

}  // namespace

void findPolarity(LineWork& work) {
  double sum = 0.0;
  std::map<double, double> channels;
  for (const LineTrace& t : work.traces) {
    if (!t.usable)
      continue;
    sum += vote(t);
    channels[t.x] += vote(t);
  }
  const int line = std::abs(sum) < kPlain ? 0 : (sum > 0.0 ? 1 : -1);
  for (LineTrace& t : work.traces) {
    if (!t.usable)
      continue;
    t.reversed = line != 0 && channels[t.x] * line < -kPlain;
    t.polarity = t.reversed ? -line : line;
  }
}

}  // namespace strikeplate
