#include "core/section/descent.h"

#include <algorithm>
#include <cmath>

namespace strikeplate {
namespace {

// A leg meets its interface within this many depths of its station: enough down to a velocity contrast of 1.03.
constexpr double kReachInDepths = 4.0;

Descent::Window windowOf(const SectionModel& model, int k, SectionPoint station) {
  const SectionGrid& grid = *model.grid;
  const double depth = (model.z[0] - model.z[k]).maxCoeff();
  const int reach = static_cast<int>(std::min(kReachInDepths * depth / grid.nodeSpacing, 1e6)) + 4;
  const int centre = static_cast<int>(std::lround(grid.coordinate(station.x)));
  Descent::Window w;
  w.first = std::clamp(centre - reach, 0, grid.nodes - 1);
  w.time.resize(std::min(grid.nodes - 1, centre + reach) - w.first + 1);
  return w;
}

Descent toFirst(const SectionModel& model, const std::vector<SectionPoint>& stations) {
  const SectionGrid& grid = *model.grid;
  Descent out;
  for (const SectionPoint& s : stations) {
    Descent::Window w = windowOf(model, 1, s);
    for (std::size_t i = 0; i < w.time.size(); ++i) {
      const int j = w.first + static_cast<int>(i);
      const double dx = grid.nodeX[j] - s.x;
      const double dy = model.z[1][j] - s.y;
      w.time[i] = model.firstLayer(s, {grid.nodeX[j], model.z[1][j]}, std::sqrt(dx * dx + dy * dy)).time;
    }
    out.windows.push_back(std::move(w));
  }
  return out;
}

/// Time (s) through layer k between every node of interface k - 1 (rows) and of interface k (columns).
Eigen::MatrixXd crossTimes(const SectionModel& model, int k) {
  const int n = model.grid->nodes;
  const double h = model.grid->nodeSpacing;
  const double u = model.slowness[k - 1][0];
  Eigen::MatrixXd t(n, n);
  for (int j = 0; j < n; ++j) {
    for (int i = 0; i < n; ++i) {
      const double dx = (j - i) * h;
      const double dy = model.z[k][j] - model.z[k - 1][i];
      t(i, j) = u * std::sqrt(dx * dx + dy * dy);
    }
  }
  return t;
}

Descent toNext(const SectionModel& model, int k, const std::vector<SectionPoint>& stations, const Descent& above) {
  const Eigen::MatrixXd cross = crossTimes(model, k);
  Descent out;
  for (std::size_t s = 0; s < stations.size(); ++s) {
    const Descent::Window& upper = above.windows[s];
    const auto count = static_cast<Eigen::Index>(upper.time.size());
    const Eigen::Map<const Eigen::VectorXd> arriving(upper.time.data(), count);
    Descent::Window w = windowOf(model, k, stations[s]);
    w.from.resize(w.time.size());
    for (std::size_t i = 0; i < w.time.size(); ++i) {
      const auto through = cross.col(w.first + static_cast<int>(i)).segment(upper.first, count);
      Eigen::Index best = 0;
      w.time[i] = (arriving + through).minCoeff(&best);
      w.from[i] = upper.first + static_cast<int>(best);
    }
    out.windows.push_back(std::move(w));
  }
  return out;
}

}  // namespace

std::vector<Descent> descend(const SectionModel& model, const std::vector<SectionPoint>& stations) {
  std::vector<Descent> out{toFirst(model, stations)};
  for (int k = 2; k <= model.layout.interfaces(); ++k) {
    out.push_back(toNext(model, k, stations, out.back()));
  }
  return out;
}

std::array<double, kMostLayers - 1> crossings(const std::vector<Descent>& descents, int k, int station, int node) {
  std::array<double, kMostLayers - 1> c{};
  for (int i = k; i >= 1; --i) {
    c[i - 1] = node;
    const Descent::Window& w = descents[i - 1].windows[station];
    if (i > 1) {
      node = w.from[node - w.first];
    }
  }
  return c;
}

}  // namespace strikeplate
