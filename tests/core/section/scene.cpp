#include "tests/core/section/scene.h"

#include <algorithm>
#include <cmath>
#include <limits>

namespace strikeplate::testing {
namespace {

constexpr double kFar = std::numeric_limits<double>::infinity();

struct Point {
  double x;
  double y;
};

double distance(Point a, Point b) {
  return std::hypot(a.x - b.x, a.y - b.y);
}

/// One layer's slowness along the line, integrated by the trapezoid rule on a fine raster.
class Slowness {
 public:
  Slowness(const std::function<double(double)>& velocity, double from, double to) : from_(from) {
    const int n = static_cast<int>(std::ceil((to - from) / kStep)) + 1;
    sum_.assign(n + 1, 0.0);
    for (int i = 1; i <= n; ++i) {
      const double x = from + i * kStep;
      sum_[i] = sum_[i - 1] + 0.5 * kStep * (1.0 / velocity(x) + 1.0 / velocity(x - kStep));
    }
    velocity_ = velocity;
  }
  [[nodiscard]] double mean(double a, double b) const {
    if (std::abs(a - b) < 1e-6) {
      return 1.0 / velocity_(a);
    }
    return (integral(b) - integral(a)) / (b - a);
  }

 private:
  static constexpr double kStep = 0.05;
  [[nodiscard]] double integral(double x) const {
    const double c = (x - from_) / kStep;
    const int i = std::clamp(static_cast<int>(c), 0, static_cast<int>(sum_.size()) - 2);
    return sum_[i] + (c - i) * (sum_[i + 1] - sum_[i]);
  }
  double from_;
  std::vector<double> sum_;
  std::function<double(double)> velocity_;
};

class Network {
 public:
  Network(const Scene& scene, const Spread& spread, double spacing) {
    std::vector<double> x = spread.geophones;
    x.insert(x.end(), spread.shots.begin(), spread.shots.end());
    const auto [low, high] = std::minmax_element(x.begin(), x.end());
    const double from = *low - 4.0;
    const double to = *high + 4.0;
    for (double v = from; v <= to; v += spacing) {
      x.push_back(v);
    }
    std::sort(x.begin(), x.end());
    x.erase(std::unique(x.begin(), x.end()), x.end());
    std::vector<std::function<double(double)>> surfaces{scene.ground};
    surfaces.insert(surfaces.end(), scene.interfaces.begin(), scene.interfaces.end());
    for (const auto& surface : surfaces) {
      std::vector<Point> points;
      for (const double v : x) {
        points.push_back({v, surface(v)});
      }
      surfaces_.push_back(std::move(points));
    }
    for (const auto& v : scene.velocities) {
      slowness_.emplace_back(v, from - 1.0, to + 1.0);
    }
  }

  [[nodiscard]] int nodeAt(double x) const {
    const auto at = std::lower_bound(surfaces_[0].begin(), surfaces_[0].end(), x,
                                     [](const Point& p, double v) { return p.x < v - 1e-9; });
    return static_cast<int>(at - surfaces_[0].begin());
  }

  [[nodiscard]] Point onGround(int node) const { return surfaces_[0][node]; }
  [[nodiscard]] int refractors() const { return static_cast<int>(surfaces_.size()) - 1; }

  /// Times from a point on the ground down to every node of interface k.
  [[nodiscard]] std::vector<double> down(int station, int k) const {
    std::vector<double> t(surfaces_[0].size(), kFar);
    t[station] = 0.0;
    for (int layer = 1; layer <= k; ++layer) {
      std::vector<double> next(t.size(), kFar);
      for (std::size_t a = 0; a < t.size(); ++a) {
        if (t[a] == kFar) {
          continue;
        }
        for (std::size_t b = 0; b < t.size(); ++b) {
          const Point p = surfaces_[layer - 1][a];
          const Point q = surfaces_[layer][b];
          next[b] = std::min(next[b], t[a] + distance(p, q) * slowness_[layer - 1].mean(p.x, q.x));
        }
      }
      t = std::move(next);
    }
    return t;
  }

  /// Lets times at the nodes of surface k spread through the layer below it, both ways along the line.
  [[nodiscard]] std::vector<double> along(int k, const std::vector<double>& start) const {
    const std::vector<double> right = sweep(k, start, 1);
    const std::vector<double> left = sweep(k, start, -1);
    std::vector<double> out(start.size());
    for (std::size_t i = 0; i < out.size(); ++i) {
      out[i] = std::min(right[i], left[i]);
    }
    return out;
  }

 private:
  [[nodiscard]] std::vector<double> sweep(int k, std::vector<double> t, int direction) const {
    const std::vector<Point>& points = surfaces_[k];
    const int n = static_cast<int>(points.size());
    for (int step = 0; step < n; ++step) {
      const int a = direction > 0 ? step : n - 1 - step;
      if (t[a] == kFar) {
        continue;
      }
      double steepest = kFar;  // the lowest line of sight so far; what sticks out of it is hidden
      for (int b = a + direction; b >= 0 && b < n; b += direction) {
        const double run = std::abs(points[b].x - points[a].x);
        const double rise = (points[b].y - points[a].y) / run;
        if (rise <= steepest + 1e-12) {
          t[b] = std::min(
              t[b], t[a] + std::hypot(run, points[b].y - points[a].y) * slowness_[k].mean(points[a].x, points[b].x));
        }
        steepest = std::min(steepest, rise);
      }
    }
    return t;
  }

  std::vector<std::vector<Point>> surfaces_;
  std::vector<Slowness> slowness_;
};

TravelTimes emptyTimes(const std::function<double(double)>& ground, const Spread& spread) {
  TravelTimes t;
  for (const double x : spread.geophones) {
    t.geophones.push_back({x, ground(x)});
  }
  for (const double x : spread.shots) {
    t.shots.push_back({x, ground(x), 0.0});
  }
  t.ground = Ground(t.geophones, t.shots);
  return t;
}

/// Calls `timeOf(shot, geophone, layer)` for every pair a distance apart and keeps the earliest.
template <class TimeOf>
void fill(TrueTimes& out, int layers, double sigma, TimeOf&& timeOf) {
  for (int s = 0; s < static_cast<int>(out.times.shots.size()); ++s) {
    for (int g = 0; g < static_cast<int>(out.times.geophones.size()); ++g) {
      if (std::abs(out.times.geophones[g].x - out.times.shots[s].x) < 1e-6) {
        continue;
      }
      Arrival a;
      a.shot = s;
      a.trace = g;
      a.geophone = g;
      a.sigma = sigma;
      a.time = kFar;
      int best = 1;
      for (int layer = 1; layer <= layers; ++layer) {
        const double t = timeOf(s, g, layer);
        if (t < a.time) {
          a.time = t;
          best = layer;
        }
      }
      out.times.arrivals.push_back(a);
      out.layers.push_back(best);
    }
  }
}

bool inside(const Spread& spread, double x) {
  const auto [low, high] = std::minmax_element(spread.geophones.begin(), spread.geophones.end());
  return x >= *low && x <= *high;
}

}  // namespace

Scene planeScene(const std::vector<double>& velocities, const std::vector<double>& depths,
                 const std::vector<double>& slopes) {
  Scene s;
  for (const double v : velocities) {
    s.velocities.emplace_back([v](double) { return v; });
  }
  for (std::size_t k = 0; k < depths.size(); ++k) {
    const double depth = depths[k];
    const double slope = slopes[k];
    s.interfaces.emplace_back([depth, slope](double x) { return -depth - slope * x; });
  }
  return s;
}

Spread evenSpread(int geophones, double spacing, const std::vector<double>& shots) {
  Spread s;
  for (int i = 0; i < geophones; ++i) {
    s.geophones.push_back(i * spacing);
  }
  s.shots = shots;
  return s;
}

TrueTimes networkTimes(const Scene& scene, const Spread& spread, double spacing, double sigma) {
  const Network network(scene, spread, spacing);
  TrueTimes out;
  out.times = emptyTimes(scene.ground, spread);
  std::vector<int> shotNodes;
  std::vector<int> geophoneNodes;
  for (const double x : spread.shots) {
    shotNodes.push_back(network.nodeAt(x));
  }
  for (const double x : spread.geophones) {
    geophoneNodes.push_back(network.nodeAt(x));
  }
  const int layers = network.refractors() + 1;
  std::vector<std::vector<std::vector<double>>> arriving(layers);
  std::vector<std::vector<std::vector<double>>> leaving(layers);
  for (int k = 0; k < layers; ++k) {
    for (const int s : shotNodes) {
      arriving[k].push_back(network.along(k, network.down(s, k)));
    }
    for (const int g : geophoneNodes) {
      leaving[k].push_back(network.down(g, k));
    }
  }
  fill(out, layers, sigma, [&](int s, int g, int layer) {
    double best = kFar;
    for (std::size_t i = 0; i < arriving[layer - 1][s].size(); ++i) {
      best = std::min(best, arriving[layer - 1][s][i] + leaving[layer - 1][g][i]);
    }
    return best;
  });
  return out;
}

TrueTimes flatTimes(const std::vector<double>& velocities, const std::vector<double>& thicknesses,
                    const Spread& spread, double sigma) {
  TrueTimes out;
  out.times = emptyTimes([](double) { return 0.0; }, spread);
  fill(out, static_cast<int>(velocities.size()), sigma, [&](int s, int g, int layer) {
    const double x = std::abs(spread.geophones[g] - spread.shots[s]);
    double t = x / velocities[layer - 1];
    for (int k = 0; k + 1 < layer; ++k) {
      t += 2.0 * thicknesses[k] *
           std::sqrt(1.0 / (velocities[k] * velocities[k]) - 1.0 / (velocities[layer - 1] * velocities[layer - 1]));
    }
    return t;
  });
  return out;
}

TravelTimes withNoise(const TravelTimes& times, std::mt19937& random, double factor, double gross) {
  std::normal_distribution<double> normal;
  std::uniform_real_distribution<double> uniform;
  TravelTimes out = times;
  for (Arrival& a : out.arrivals) {
    a.time += factor * a.sigma * normal(random);
    if (uniform(random) < gross) {
      a.time += (uniform(random) < 0.5 ? -1.0 : 1.0) * (5.0 + 20.0 * uniform(random)) * factor * a.sigma;
    }
  }
  return out;
}

double depthError(const Section& section, const Scene& scene, const Spread& spread, int layer) {
  double sum = 0.0;
  int n = 0;
  for (std::size_t i = 0; i < section.x.size(); ++i) {
    if (inside(spread, section.x[i])) {
      const double truth = scene.depth(layer, section.x[i]);
      const double e = (section.interfaces[layer - 2].depth[i].value - truth) / truth;
      sum += e * e;
      ++n;
    }
  }
  return std::sqrt(sum / n);
}

Coverage coverageOf(const Section& section, const Scene& scene, const Spread& spread, int layer) {
  Coverage out;
  int n = 0;
  for (std::size_t i = 0; i < section.x.size(); ++i) {
    if (!inside(spread, section.x[i])) {
      continue;
    }
    const double truth = scene.depth(layer, section.x[i]);
    const Estimate& e = section.interfaces[layer - 2].depth[i];
    out.share68 += e.low68 <= truth && truth <= e.high68 ? 1.0 : 0.0;
    out.share95 += e.low95 <= truth && truth <= e.high95 ? 1.0 : 0.0;
    ++n;
  }
  out.share68 /= n;
  out.share95 /= n;
  return out;
}

}  // namespace strikeplate::testing
