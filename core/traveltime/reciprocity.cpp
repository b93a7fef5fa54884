#include "core/traveltime/reciprocity.h"

#include <algorithm>
#include <cmath>
#include <optional>
#include <utility>

#include "core/base/estimate.h"
#include "core/traveltime/line_fit.h"

namespace strikeplate {
namespace {

constexpr std::size_t kPicks = 5;

double medianSpacing(const std::vector<Geophone>& geophones) {
  std::vector<double> gaps;
  for (std::size_t i = 1; i < geophones.size(); ++i) {
    gaps.push_back(geophones[i].x - geophones[i - 1].x);
  }
  if (gaps.empty()) {
    return 0.0;
  }
  std::nth_element(gaps.begin(), gaps.begin() + static_cast<std::ptrdiff_t>(gaps.size() / 2), gaps.end());
  return gaps[gaps.size() / 2];
}

struct TimeThere {
  double time = 0.0, variance = 0.0;
};

/// One shot's arrivals as points of position and time, for reading its times off at a place.
class ShotCurve {
 public:
  ShotCurve(const TravelTimes& times, int shot) : x_(times.shots[static_cast<std::size_t>(shot)].x) {
    for (const Arrival& a : times.arrivals) {
      if (a.shot == shot) {
        points_.push_back({times.geophones[static_cast<std::size_t>(a.geophone)].x, a.time, a.sigma});
      }
    }
  }

  [[nodiscard]] std::optional<TimeThere> at(double x, double reach) const {
    std::vector<FitPoint> side;
    for (const FitPoint& p : points_) {
      if ((p.offset - x_) * (x - x_) > 0.0) {
        side.push_back({p.offset - x, p.time, p.sigma});
      }
    }
    if (side.size() < 3) {
      return std::nullopt;
    }
    const std::size_t count = std::min(kPicks, side.size());
    std::partial_sort(side.begin(), side.begin() + static_cast<std::ptrdiff_t>(count), side.end(),
                      [](const FitPoint& a, const FitPoint& b) { return std::abs(a.offset) < std::abs(b.offset); });
    side.resize(count);
    if (std::abs(side.front().offset) > std::max(reach, 0.05 * std::abs(x - x_))) {
      return std::nullopt;
    }
    const LineFit fit = fitLine(side);
    return fit.determined ? std::optional<TimeThere>(TimeThere{fit.intercept, fit.varIntercept}) : std::nullopt;
  }

 private:
  double x_;
  std::vector<FitPoint> points_;
};

}  // namespace

std::vector<ReciprocalPair> reciprocalPairs(const TravelTimes& times) {
  const double spacing = medianSpacing(times.geophones);
  const int count = static_cast<int>(times.shots.size());
  std::vector<ShotCurve> curves;
  for (int s = 0; s < count; ++s) {
    curves.emplace_back(times, s);
  }
  std::vector<ReciprocalPair> pairs;
  for (int a = 0; a < count; ++a) {
    for (int b = a + 1; b < count; ++b) {
      const double xa = times.shots[static_cast<std::size_t>(a)].x, xb = times.shots[static_cast<std::size_t>(b)].x;
      // Closer shots share the ground between them with too few geophones.
      if (std::abs(xa - xb) < 4.0 * spacing) {
        continue;
      }
      const auto ab = curves[static_cast<std::size_t>(a)].at(xb, 2.0 * spacing);
      const auto ba = curves[static_cast<std::size_t>(b)].at(xa, 2.0 * spacing);
      if (ab && ba) {
        pairs.push_back({a, b, ab->time, ba->time, kNormal95 * std::sqrt(ab->variance + ba->variance)});
      }
    }
  }
  return pairs;
}

}  // namespace strikeplate
