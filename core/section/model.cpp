#include "core/section/model.h"

#include <cmath>

namespace strikeplate {
namespace {

constexpr double kGradientBend = 5.0;    // 1/s
constexpr double kLeastGradient = 1e-3;  // 1/s, as good as none

struct Softplus {
  double value;
  double slope;
};

Softplus softplus(double a, double c) {
  const double r = a / c;
  if (r > 36.0) {
    return {a, 1.0};
  }
  if (r < -36.0) {
    return {c * std::exp(r), std::exp(r)};
  }
  return {c * std::log1p(std::exp(r)), 1.0 / (1.0 + std::exp(-r))};
}

void stackInterface(SectionModel& m, int k, const Eigen::VectorXd& e) {
  const Eigen::VectorXd& above = m.z[k - 1];
  const double c = 0.1 * m.grid->knotSpacing;
  Eigen::VectorXd z(above.size());
  Eigen::VectorXd s(above.size());
  for (Eigen::Index j = 0; j < z.size(); ++j) {
    const Softplus sp = softplus(above[j] - e[j], c);
    z[j] = above[j] - sp.value;
    s[j] = sp.slope;
  }
  std::vector<Eigen::VectorXd> chain(k + 1);
  for (int l = 1; l < k; ++l) {
    chain[l] = (1.0 - s.array()) * m.chain[k - 1][l].array();
  }
  chain[k] = s;
  m.z.push_back(std::move(z));
  m.chain.push_back(std::move(chain));
}

Eigen::VectorXd slownessOf(const SectionGrid& grid, const SectionLayout& layout, const Eigen::VectorXd& theta,
                           int layer) {
  Eigen::VectorXd u = Eigen::VectorXd::Constant(grid.nodes, std::exp(-theta[layout.logVelocity(layer)]));
  if (!layout.varies(layer)) {
    return u;
  }
  const auto deviation = theta.segment(layout.deviation(layer), layout.velocityKnots);
  if (deviation.cwiseAbs().maxCoeff() == 0.0) {
    return u;
  }
  for (int j = 0; j < grid.nodes; ++j) {
    const double c = (grid.nodeX[j] - grid.start) / grid.velocitySpacing;
    const int i = std::min(static_cast<int>(c), layout.velocityKnots - 2);
    u[j] *= std::exp(-(deviation[i] + (c - i) * (deviation[i + 1] - deviation[i])));
  }
  return u;
}

}  // namespace

double SectionModel::integral(int layer, double x) const {
  const Eigen::VectorXd& u = slowness[layer - 1];
  const double c = std::clamp(grid->coordinate(x), 0.0, grid->nodes - 1.0);
  const int j = std::min(static_cast<int>(c), grid->nodes - 2);
  const double f = c - j;
  return cumulative[layer - 1][j] + f * (u[j] + 0.5 * f * (u[j + 1] - u[j])) * grid->nodeSpacing;
}

double SectionModel::meanSlowness(int layer, double xa, double xb) const {
  if (!layout.varies(layer)) {
    return slowness[layer - 1][0];
  }
  if (std::abs(xb - xa) < 1e-3 * grid->nodeSpacing) {
    return grid->at(slowness[layer - 1], 0.5 * (xa + xb));
  }
  return (integral(layer, xb) - integral(layer, xa)) / (xb - xa);
}

SectionModel::FirstLayerTime SectionModel::firstLayer(SectionPoint a, SectionPoint b, double length) const {
  const double u = meanSlowness(1, a.x, b.x);
  const double rise = length > 0.0 ? (b.y - a.y) / length : 0.0;
  if (gradient == 0.0) {
    return {length * u, -length * u, u * rise, 0.0};
  }
  const double da = std::max(0.0, grid->at(grid->ground, a.x) - a.y);
  const double db = std::max(0.0, grid->at(grid->ground, b.x) - b.y);
  const double v = 1.0 / u;
  const double va = v + gradient * da;
  const double vb = v + gradient * db;
  const double y = 0.5 * gradient * length / std::sqrt(va * vb);
  const double time = 2.0 / gradient * std::asinh(y);
  // dT = f dlog(y), f = 2 / k y / sqrt(1 + y^2).
  const double f = 2.0 / gradient * y / std::sqrt(1.0 + y * y);
  FirstLayerTime out;
  out.time = time;
  out.perLogVelocity = -0.5 * f * (v / va + v / vb);
  out.perRise = f * ((length > 0.0 ? rise / length : 0.0) + 0.5 * gradient / vb);
  out.perGradient = (f - time) / gradient - 0.5 * f * (da / va + db / vb);
  return out;
}

SectionModel makeSectionModel(const SectionGrid& grid, const SectionLayout& layout, const Eigen::VectorXd& theta) {
  SectionModel m;
  m.layout = layout;
  m.grid = &grid;
  m.z.push_back(grid.ground);
  m.chain.emplace_back();
  for (int k = 1; k <= layout.interfaces(); ++k) {
    stackInterface(m, k, grid.spread(theta.segment(layout.elevation(k), layout.knots)));
  }
  if (layout.gradient) {
    const Softplus k = softplus(theta[layout.gradientIndex()], kGradientBend);
    m.gradient = std::max(k.value, kLeastGradient);
    m.gradientSlope = k.slope;
  }
  for (int layer = 1; layer <= layout.layers; ++layer) {
    Eigen::VectorXd u = slownessOf(grid, layout, theta, layer);
    Eigen::VectorXd sum(grid.nodes);
    sum[0] = 0.0;
    for (int j = 1; j < grid.nodes; ++j) {
      sum[j] = sum[j - 1] + 0.5 * (u[j - 1] + u[j]) * grid.nodeSpacing;
    }
    m.slowness.push_back(std::move(u));
    m.cumulative.push_back(std::move(sum));
  }
  return m;
}

}  // namespace strikeplate
