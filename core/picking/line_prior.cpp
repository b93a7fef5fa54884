#include "core/picking/line_prior.h"

#include <algorithm>
#include <cmath>
#include <map>

#include <Eigen/Dense>

namespace strikeplate {
namespace {

constexpr double kUseful = 0.003;       // s; a belief wider than this says nothing
constexpr double kPickError = 0.001;    // s, typical
constexpr double kLeastScale = 0.0012;  // s
constexpr double kLeastWeight = 4.0;    // traces
constexpr int kRounds = 4;
constexpr double kStaticPrior = 8.0;  // traces that say a shot's constant is 0

struct Bandwidth {
  double offset, midpoint;  // m
};

struct Node {
  std::size_t gather;
  double offset, midpoint, time, variance;
};

double medianGap(std::vector<double> places) {
  std::sort(places.begin(), places.end());
  std::vector<double> gaps;
  for (std::size_t i = 1; i < places.size(); ++i) {
    if (places[i] > places[i - 1] + 0.01)
      gaps.push_back(places[i] - places[i - 1]);
  }
  if (gaps.empty())
    return 1.0;
  std::nth_element(gaps.begin(), gaps.begin() + static_cast<std::ptrdiff_t>(gaps.size() / 2), gaps.end());
  return gaps[gaps.size() / 2];
}

Bandwidth bandwidthOf(const LineWork& work) {
  std::vector<double> geophones, shots;
  for (const LineTrace& t : work.traces) {
    geophones.push_back(t.x);
    shots.push_back(t.shotX);
  }
  const double spacing = medianGap(geophones), between = medianGap(shots);
  return {2.5 * spacing, std::max(3.0 * spacing, 0.7 * between)};
}

struct Fit {
  double value = 0.0, scale = 0.0;
};

/// Local-linear fit at one trace from the other shots' nodes.
Fit fitAt(const Node& at, const std::vector<Node>& nodes, const Bandwidth& width) {
  std::vector<const Node*> near;
  std::vector<double> kernel;
  for (const Node& n : nodes) {
    if (n.gather == at.gather)
      continue;
    const double u = (n.offset - at.offset) / width.offset, v = (n.midpoint - at.midpoint) / width.midpoint;
    if (u * u + v * v > 9.0)
      continue;
    near.push_back(&n);
    kernel.push_back(std::exp(-0.5 * (u * u + v * v)));
  }
  Fit fit;
  double total = 0.0;
  for (const double k : kernel)
    total += k;
  if (total < kLeastWeight)
    return fit;
  std::vector<double> robust(near.size(), 1.0);
  Eigen::Matrix3d normal;
  for (int round = 0; round < kRounds; ++round) {
    normal = Eigen::Vector3d(1e-12, 1e-2, 1e-2).asDiagonal();
    Eigen::Vector3d right = Eigen::Vector3d::Zero();
    for (std::size_t k = 0; k < near.size(); ++k) {
      const Eigen::Vector3d row(1.0, (near[k]->offset - at.offset) / width.offset,
                                (near[k]->midpoint - at.midpoint) / width.midpoint);
      const double weight = kernel[k] * robust[k] * kPickError * kPickError / near[k]->variance;
      normal += weight * row * row.transpose();
      right += weight * near[k]->time * row;
    }
    const Eigen::Vector3d solution = normal.ldlt().solve(right);
    fit.value = solution(0);
    double misfit = 0.0, weights = 0.0;
    for (std::size_t k = 0; k < near.size(); ++k) {
      const double residual = near[k]->time - solution(0) -
                              solution(1) * (near[k]->offset - at.offset) / width.offset -
                              solution(2) * (near[k]->midpoint - at.midpoint) / width.midpoint;
      const double weight = kernel[k] * robust[k] * kPickError * kPickError / near[k]->variance;
      misfit += weight * residual * residual;
      weights += weight;
      robust[k] = 5.0 / (4.0 + residual * residual / near[k]->variance);
    }
    fit.scale = std::hypot(kLeastScale, std::sqrt(misfit / std::max(weights, 1e-9)));
  }
  const double leverage = normal.inverse()(0, 0);
  fit.scale = std::hypot(fit.scale, 2.0 * kPickError * std::sqrt(leverage));
  return fit;
}

}  // namespace

void findLinePrior(LineWork& work) {
  const Bandwidth width = bandwidthOf(work);
  std::vector<Node> all, useful;
  std::vector<LineTrace*> traces;
  for (LineTrace& t : work.traces) {
    if (!t.usable || t.posterior.empty())
      continue;
    const double variance = t.beliefSigma * t.beliefSigma + kPickError * kPickError;
    all.push_back({t.gather, t.offset(), 0.5 * (t.x + t.shotX), t.belief, variance});
    traces.push_back(&t);
    if (t.beliefSigma < kUseful)
      useful.push_back(all.back());
  }
  std::vector<Fit> fits(all.size());
  std::map<std::size_t, double> constants;
  for (int round = 0; round < 2; ++round) {
    std::vector<Node> corrected = useful;
    for (Node& n : corrected)
      n.time -= constants[n.gather];
    std::map<std::size_t, std::vector<double>> misfits;
    for (std::size_t i = 0; i < all.size(); ++i) {
      fits[i] = fitAt(all[i], corrected, width);
      if (fits[i].scale > 0.0 && traces[i]->beliefSigma < kUseful) {
        misfits[all[i].gather].push_back(all[i].time - fits[i].value);
      }
    }
    for (auto& [gather, values] : misfits) {
      const auto count = static_cast<double>(values.size());
      std::nth_element(values.begin(), values.begin() + static_cast<std::ptrdiff_t>(values.size() / 2), values.end());
      constants[gather] = values[values.size() / 2] * count / (count + kStaticPrior);
    }
  }
  for (std::size_t i = 0; i < all.size(); ++i) {
    traces[i]->priorMean = fits[i].value + constants[all[i].gather];
    traces[i]->priorScale = fits[i].scale;
  }
}

}  // namespace strikeplate
