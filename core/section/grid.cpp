#include "core/section/grid.h"

#include <algorithm>
#include <cassert>
#include <cmath>

namespace strikeplate {
namespace {

constexpr int kNodesPerKnot = 2;
constexpr int kFarStride = 3;       // knot spacings between knots where no geophone is near
constexpr int kMargin = 3;          // knots beyond the outermost station
constexpr int kMostKnots = 300;     // longer lines get wider spacing
constexpr int kVelocityKnots = 16;  // about so many along a line, but not denser than every other knot

std::vector<double> positions(const TravelTimes& times) {
  std::vector<double> x;
  for (const Geophone& g : times.geophones) {
    x.push_back(g.x);
  }
  for (const ShotPoint& s : times.shots) {
    x.push_back(s.x);
  }
  std::sort(x.begin(), x.end());
  x.erase(std::unique(x.begin(), x.end()), x.end());
  return x;
}

double typicalSpacing(const TravelTimes& times, double length) {
  std::vector<double> gaps;
  for (std::size_t i = 1; i < times.geophones.size(); ++i) {
    const double gap = times.geophones[i].x - times.geophones[i - 1].x;
    if (gap > 0.0) {
      gaps.push_back(gap);
    }
  }
  if (gaps.empty()) {
    return length / 20.0;
  }
  std::nth_element(gaps.begin(), gaps.begin() + static_cast<long>(gaps.size() / 2), gaps.end());
  return std::clamp(gaps[gaps.size() / 2], length / kMostKnots, length / 8.0);
}

/// Knots at every other node near the geophones, at every sixth further out, and at both ends.
std::vector<int> knotNodes(const TravelTimes& times, const SectionGrid& g) {
  const double first = times.geophones.front().x - kMargin * g.knotSpacing;
  const double last = times.geophones.back().x + kMargin * g.knotSpacing;
  std::vector<int> out;
  for (int j = 0; j < g.nodes; j += kNodesPerKnot) {
    const double x = g.start + j * g.nodeSpacing;
    const bool dense = x >= first && x <= last;
    if (dense || j == 0 || j + kNodesPerKnot >= g.nodes || j - out.back() >= kFarStride * kNodesPerKnot) {
      out.push_back(j);
    }
  }
  return out;
}

/// Weights of a node between knots k and k + 1.
SectionGrid::Weights weightsOf(const std::vector<int>& knotNode, int k, int node) {
  const int knots = static_cast<int>(knotNode.size());
  const int gap = knotNode[k + 1] - knotNode[k];
  const double f = static_cast<double>(node - knotNode[k]) / gap;
  SectionGrid::Weights weights;
  const bool even =
      k >= 1 && k + 2 < knots && knotNode[k] - knotNode[k - 1] == gap && knotNode[k + 2] - knotNode[k + 1] == gap;
  if (even) {
    // Keys' kernel with a = -1/2.
    weights.first = k - 1;
    weights.w = {0.5 * f * (-1.0 + f * (2.0 - f)), 1.0 + 0.5 * f * f * (-5.0 + 3.0 * f),
                 0.5 * f * (1.0 + f * (4.0 - 3.0 * f)), 0.5 * f * f * (f - 1.0)};
    return weights;
  }
  weights.first = std::clamp(k, 0, knots - 4);
  weights.w[k - weights.first] = 1.0 - f;
  weights.w[k + 1 - weights.first] = f;
  return weights;
}

}  // namespace

double SectionGrid::at(const Eigen::VectorXd& atNodes, double x) const {
  const double c = std::clamp(coordinate(x), 0.0, static_cast<double>(nodes - 1));
  const int j = std::min(static_cast<int>(c), nodes - 2);
  return atNodes[j] + (c - j) * (atNodes[j + 1] - atNodes[j]);
}

Eigen::VectorXd SectionGrid::spread(const Eigen::Ref<const Eigen::VectorXd>& atKnots) const {
  Eigen::VectorXd out(nodes);
  for (int j = 0; j < nodes; ++j) {
    const Weights& t = toKnots[j];
    out[j] = t.w[0] * atKnots[t.first] + t.w[1] * atKnots[t.first + 1] + t.w[2] * atKnots[t.first + 2] +
             t.w[3] * atKnots[t.first + 3];
  }
  return out;
}

Eigen::MatrixXd SectionGrid::spreadColumns(const Eigen::MatrixXd& atKnots) const {
  Eigen::MatrixXd out(nodes, atKnots.cols());
  for (Eigen::Index c = 0; c < atKnots.cols(); ++c) {
    out.col(c) = spread(atKnots.col(c));
  }
  return out;
}

SectionGrid makeSectionGrid(const TravelTimes& times) {
  const std::vector<double> used = positions(times);
  assert(used.size() >= 2);
  SectionGrid g;
  g.lineStart = used.front();
  g.lineEnd = used.back();
  g.knotSpacing = typicalSpacing(times, g.length());
  g.nodeSpacing = g.knotSpacing / kNodesPerKnot;
  g.start = g.lineStart - kMargin * g.knotSpacing;
  const int steps = static_cast<int>(std::ceil(g.length() / g.knotSpacing - 1e-9)) + 2 * kMargin;
  g.nodes = steps * kNodesPerKnot + 1;
  g.knotNode = knotNodes(times, g);
  g.knots = static_cast<int>(g.knotNode.size());
  g.nodeX = Eigen::VectorXd::LinSpaced(g.nodes, g.start, g.start + (g.nodes - 1) * g.nodeSpacing);
  g.knotX = g.nodeX(g.knotNode);
  g.ground = g.nodeX.unaryExpr([&times](double x) { return times.ground.at(x); });
  for (int j = 0, k = 0; j < g.nodes; ++j) {
    k += k + 2 < g.knots && j >= g.knotNode[k + 1] ? 1 : 0;
    g.toKnots.push_back(weightsOf(g.knotNode, k, j));
  }
  const double reach = g.nodeX[g.nodes - 1] - g.start;
  g.velocitySpacing = std::max(2.0 * g.knotSpacing, reach / kVelocityKnots);
  g.velocityKnots = static_cast<int>(std::ceil(reach / g.velocitySpacing - 1e-9)) + 1;
  return g;
}

}  // namespace strikeplate
