#include "core/methods/generalized_reciprocal.h"

#include <algorithm>
#include <cmath>
#include <map>

#include "core/traveltime/line_fit.h"

namespace strikeplate {
namespace {

constexpr std::size_t kFewest = 5;

struct TimeAt {
  double time = 0.0, sigma = 0.0;
};

/// The picks of one branch by position.
class Curve {
 public:
  void put(double x, TimeAt time) { points_[x] = time; }

  [[nodiscard]] std::optional<TimeAt> at(double x) const {
    constexpr double kSame = 1e-9;  // m
    const auto after = points_.lower_bound(x - kSame);
    if (after == points_.end()) {
      return std::nullopt;
    }
    if (after->first <= x + kSame) {
      return after->second;
    }
    if (after == points_.begin()) {
      return std::nullopt;
    }
    const auto before = std::prev(after);
    const double part = (x - before->first) / (after->first - before->first);
    return TimeAt{(1.0 - part) * before->second.time + part * after->second.time,
                  std::hypot((1.0 - part) * before->second.sigma, part * after->second.sigma)};
  }

  [[nodiscard]] const std::map<double, TimeAt>& points() const { return points_; }

 private:
  std::map<double, TimeAt> points_;
};

struct Point {
  TimeAt fromA, fromB;
};

/// G -> times at Y and X, for every G at a geophone that both curves reach.
std::map<double, Point> pointsOf(const TravelTimes& times, const Curve& a, const Curve& b, double xy) {
  std::map<double, Point> points;
  for (const Geophone& g : times.geophones) {
    const auto fromA = a.at(g.x + 0.5 * xy), fromB = b.at(g.x - 0.5 * xy);
    if (fromA && fromB) {
      points[g.x] = {*fromA, *fromB};
    }
  }
  return points;
}

}  // namespace

XyAnalysis xyAnalysis(const TravelTimes& times, const ReversedPair& pair, std::span<const double> xy) {
  XyAnalysis analysis;
  if (!pair.determined) {
    analysis.reason = pair.reason;
    return analysis;
  }
  const double xA = times.shots[static_cast<std::size_t>(pair.shotA)].x;
  const double xB = times.shots[static_cast<std::size_t>(pair.shotB)].x;
  Curve a, b;
  for (std::size_t i = 0; i < pair.time.size(); ++i) {
    const TimeAt time{pair.time[i], pair.sigma[i]};
    i < pair.picksOfA ? a.put(xA + pair.offset[i], time) : b.put(xB - pair.offset[i], time);
  }
  std::vector<std::map<double, Point>> all;
  std::map<double, std::size_t> seen;
  for (const double distance : xy) {
    auto points = pointsOf(times, a, b, distance);
    if (distance < 0.0 || points.size() < kFewest) {
      continue;
    }
    for (const auto& [x, point] : points) {
      ++seen[x];
    }
    analysis.readings.push_back({});
    analysis.readings.back().xy = distance;
    all.push_back(std::move(points));
  }
  const double reciprocal = pair.reciprocalTime.value;
  const auto shared =
      std::count_if(seen.begin(), seen.end(), [&all](const auto& s) { return s.second == all.size(); });
  for (std::size_t i = 0; i < all.size(); ++i) {
    XyReading& reading = analysis.readings[i];
    std::vector<FitPoint> line, common;
    for (const auto& [x, p] : all[i]) {
      const double t = 0.5 * (p.fromA.time - p.fromB.time + reciprocal);
      reading.x.push_back(x);
      reading.velocityTimes.push_back(t);
      line.push_back({x, t, 0.5 * std::hypot(p.fromA.sigma, p.fromB.sigma)});
      if (seen[x] == all.size()) {
        common.push_back(line.back());
      }
    }
    const LineFit fit = fitLine(line);
    reading.velocity =
        fit.determined ? Estimate::fromSlowness(fit.slope, std::sqrt(fit.varSlope)) : Estimate::none(fit.reason);
    // Straightness is compared on the same points where there are enough of them.
    reading.roughness = shared >= static_cast<std::ptrdiff_t>(kFewest) ? fitLine(common).rms : fit.rms;
    for (const auto& [x, p] : all[i]) {
      reading.timeDepths.push_back(0.5 * (p.fromA.time + p.fromB.time - reciprocal - reading.xy * fit.slope));
    }
    if (reading.roughness < analysis.readings[analysis.best].roughness) {
      analysis.best = i;
    }
  }
  analysis.determined = !analysis.readings.empty();
  if (!analysis.determined) {
    analysis.reason = "no distance XY leaves five points on this pair of shots";
  }
  return analysis;
}

std::optional<double> depthFromTimeDepth(double timeDepth, double v1, double refractor) {
  if (!(v1 > 0.0) || !(refractor > v1) || !(timeDepth > 0.0)) {
    return std::nullopt;
  }
  return timeDepth * v1 * refractor / std::sqrt(refractor * refractor - v1 * v1);
}

std::optional<double> optimumXy(double depth, double v1, double refractor) {
  if (!(v1 > 0.0) || !(refractor > v1) || !(depth > 0.0)) {
    return std::nullopt;
  }
  return 2.0 * depth * v1 / std::sqrt(refractor * refractor - v1 * v1);
}

std::optional<double> averageVelocity(double xy, double timeDepth, double refractor) {
  if (!(xy > 0.0) || !(timeDepth > 0.0) || !(refractor > 0.0)) {
    return std::nullopt;
  }
  return std::sqrt(refractor * refractor * xy / (xy + 2.0 * timeDepth * refractor));
}

}  // namespace strikeplate
