#include "core/picking/crosstalk.h"

#include <algorithm>
#include <map>

#include "core/picking/work_trace.h"

namespace strikeplate {
namespace {

constexpr double kFirstBin = -0.001, kLastBin = 0.010, kBin = 0.001;  // s
constexpr double kFastGround = 3000.0, kSlowGround = 600.0;           // m/s
constexpr double kLoud = 2.0;
constexpr std::size_t kLeastTraces = 4;

struct Samples {
  std::size_t first, last;
};

Samples samplesOf(const LineTrace& t, double bin) {
  const auto at = [&](double time) {
    const double i = (time - t.start) / kWorkInterval + 0.5;
    return static_cast<std::size_t>(std::clamp(i, 0.0, static_cast<double>(t.white.size())));
  };
  return {at(bin), at(bin + kBin)};
}

double meanEnergy(const std::vector<const LineTrace*>& traces, double bin) {
  double sum = 0.0, count = 0.0;
  std::size_t heard = 0;
  for (const LineTrace* t : traces) {
    if (t->offset() / kFastGround < bin + kBin)
      continue;
    const Samples s = samplesOf(*t, bin);
    if (s.last <= s.first)
      continue;
    ++heard;
    for (std::size_t i = s.first; i < s.last; ++i)
      sum += std::min(100.0, static_cast<double>(t->white[i]) * t->white[i]);
    count += static_cast<double>(s.last - s.first);
  }
  return heard >= kLeastTraces ? sum / count : 0.0;
}

}  // namespace

void silenceCrosstalk(LineWork& work) {
  std::map<std::size_t, std::vector<const LineTrace*>> gathers;
  for (const LineTrace& t : work.traces) {
    if (t.usable)
      gathers[t.gather].push_back(&t);
  }
  for (double bin = kFirstBin; bin < kLastBin; bin += kBin) {
    std::map<std::size_t, bool> loud;
    for (const auto& [gather, traces] : gathers)
      loud[gather] = meanEnergy(traces, bin) > kLoud;
    for (LineTrace& t : work.traces) {
      if (!t.usable || !loud[t.gather] || t.offset() / kSlowGround < bin + kBin)
        continue;
      const Samples s = samplesOf(t, bin);
      std::fill(t.white.begin() + static_cast<std::ptrdiff_t>(s.first),
                t.white.begin() + static_cast<std::ptrdiff_t>(s.last), 0.0F);
    }
  }
}

}  // namespace strikeplate
