#include "core/methods/reversed_pair.h"

#include <algorithm>
#include <cmath>
#include <numeric>

namespace strikeplate {
namespace {

constexpr std::size_t kNearest = 5;
constexpr double kReach = 0.1;  // of the distance between the shots

/// Weights of a weighted line through picks `which`, evaluated at `x` (value) or its slope.
struct LineWeights {
  std::vector<double> value, slope;
};

LineWeights lineWeights(const ReversedPair& pair, const std::vector<std::size_t>& which, double x) {
  double s = 0.0, sx = 0.0, sxx = 0.0;
  for (const std::size_t i : which) {
    const double w = 1.0 / (pair.sigma[i] * pair.sigma[i]);
    s += w;
    sx += w * pair.offset[i];
  }
  const double mean = sx / s;
  for (const std::size_t i : which) {
    sxx += (pair.offset[i] - mean) * (pair.offset[i] - mean) / (pair.sigma[i] * pair.sigma[i]);
  }
  LineWeights out{std::vector<double>(pair.time.size(), 0.0), std::vector<double>(pair.time.size(), 0.0)};
  for (const std::size_t i : which) {
    const double w = 1.0 / (pair.sigma[i] * pair.sigma[i]);
    out.slope[i] = w * (pair.offset[i] - mean) / sxx;
    out.value[i] = w / s + out.slope[i] * (x - mean);
  }
  return out;
}

void add(LinearInPicks& sum, const std::vector<double>& weights, double factor, const std::vector<double>& times) {
  sum.weights.resize(times.size(), 0.0);
  for (std::size_t i = 0; i < weights.size(); ++i) {
    sum.weights[i] += factor * weights[i];
    sum.value += factor * weights[i] * times[i];
  }
}

void addPicks(const TravelTimes& times, const Branch& branch, ReversedPair& pair) {
  for (const int index : branch.arrivals) {
    const Arrival& a = times.arrivals[static_cast<std::size_t>(index)];
    pair.offset.push_back(times.offset(a));
    pair.time.push_back(a.time);
    pair.sigma.push_back(a.sigma);
  }
}

void readReciprocalTime(ReversedPair& pair, std::vector<std::size_t> branch) {
  add(pair.meanSlowness, lineWeights(pair, branch, 0.0).slope, 0.5, pair.time);
  const auto distance = [&pair](std::size_t i) { return std::abs(pair.offset[i] - pair.length); };
  std::sort(branch.begin(), branch.end(),
            [&distance](std::size_t i, std::size_t j) { return distance(i) < distance(j); });
  if (distance(branch.front()) <= kReach * pair.length && branch.size() > kNearest) {
    branch.resize(kNearest);
  }
  add(pair.reciprocalTime, lineWeights(pair, branch, pair.length).value, 0.5, pair.time);
}

void findStations(const TravelTimes& times, const Branch& fromA, const Branch& fromB, ReversedPair& pair) {
  for (std::size_t i = 0; i < fromA.arrivals.size(); ++i) {
    const int geophone = times.arrivals[static_cast<std::size_t>(fromA.arrivals[i])].geophone;
    for (std::size_t j = 0; j < fromB.arrivals.size(); ++j) {
      if (times.arrivals[static_cast<std::size_t>(fromB.arrivals[j])].geophone == geophone) {
        const std::size_t a = i, b = pair.picksOfA + j;
        pair.stations.push_back({geophone, times.geophones[static_cast<std::size_t>(geophone)].x, a, b,
                                 pair.time[a] + pair.time[b] - pair.reciprocalTime.value,
                                 pair.time[a] - pair.time[b]});
      }
    }
  }
}

void fitMinusTimes(ReversedPair& pair) {
  double s = 0.0, sx = 0.0, sxx = 0.0;
  const auto weight = [&pair](const ReversedStation& d) {
    return 1.0 / (pair.sigma[d.a] * pair.sigma[d.a] + pair.sigma[d.b] * pair.sigma[d.b]);
  };
  for (const ReversedStation& d : pair.stations) {
    s += weight(d);
    sx += weight(d) * d.x;
  }
  for (const ReversedStation& d : pair.stations) {
    sxx += weight(d) * (d.x - sx / s) * (d.x - sx / s);
  }
  std::vector<double> weights(pair.time.size(), 0.0);
  for (const ReversedStation& d : pair.stations) {
    const double w = 0.5 * weight(d) * (d.x - sx / s) / sxx;
    weights[d.a] += w;
    weights[d.b] -= w;
  }
  add(pair.minusSlowness, weights, 1.0, pair.time);
}

}  // namespace

double ReversedPair::covariance(const LinearInPicks& p, const LinearInPicks& q) const {
  double sum = 0.0;
  for (std::size_t i = 0; i < sigma.size(); ++i) {
    sum += p.weights[i] * q.weights[i] * sigma[i] * sigma[i];
  }
  return sum;
}

double ReversedPair::sigmaOf(const LinearInPicks& p) const {
  return std::sqrt(covariance(p, p));
}

ReversedPair reversedPair(const TravelTimes& times, const Branch& fromA, const Branch& fromB) {
  ReversedPair pair;
  pair.shotA = fromA.shot;
  pair.shotB = fromB.shot;
  pair.layer = fromA.layer;
  pair.length =
      times.shots[static_cast<std::size_t>(fromB.shot)].x - times.shots[static_cast<std::size_t>(fromA.shot)].x;
  if (fromA.side != 1 || fromB.side != -1 || fromA.layer != fromB.layer || !(pair.length > 0.0)) {
    pair.reason = "the two branches do not run toward each other through one layer";
    return pair;
  }
  if (!fromA.fit.determined || !fromB.fit.determined) {
    pair.reason = fromA.fit.determined ? fromB.fit.reason : fromA.fit.reason;
    return pair;
  }
  addPicks(times, fromA, pair);
  pair.picksOfA = pair.time.size();
  addPicks(times, fromB, pair);
  std::vector<std::size_t> a(pair.picksOfA), b(pair.time.size() - pair.picksOfA);
  std::iota(a.begin(), a.end(), 0U);
  std::iota(b.begin(), b.end(), pair.picksOfA);
  readReciprocalTime(pair, a);
  readReciprocalTime(pair, b);
  findStations(times, fromA, fromB, pair);
  if (pair.stations.size() < 3) {
    pair.reason = "fewer than three geophones recorded this layer from both shots";
    return pair;
  }
  fitMinusTimes(pair);
  pair.determined = true;
  return pair;
}

Estimate stationDepth(const ReversedPair& pair, const ReversedStation& station, const LinearInPicks& slowness,
                      const Overburden& above) {
  LinearInPicks delay;
  add(delay, pair.reciprocalTime.weights, -0.5, pair.time);
  for (const std::size_t i : {station.a, station.b}) {
    delay.weights[i] += 0.5;
    delay.value += 0.5 * pair.time[i];
  }
  return depthFromDelay({{delay.value, pair.sigmaOf(delay)},
                         {slowness.value, pair.sigmaOf(slowness)},
                         pair.covariance(delay, slowness)},
                        above);
}

}  // namespace strikeplate
