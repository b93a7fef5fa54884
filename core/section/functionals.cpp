#include "core/section/functionals.h"

#include <algorithm>
#include <cmath>

#include "core/section/hats.h"

namespace strikeplate {
namespace {

/// Weights that turn elevations at the nodes into the slope of their regression line.
Eigen::VectorXd slopeWeights(const SectionProblem& problem, const SectionFunctionals& f) {
  const Eigen::VectorXd x = problem.grid.nodeX.segment(f.firstNode, f.nodeCount);
  const Eigen::VectorXd centred = x.array() - x.mean();
  return centred / centred.squaredNorm();
}

/// Mean over the line of a deviation at velocity knots.
Eigen::VectorXd meanWeights(const SectionGrid& grid) {
  Eigen::VectorXd w = Eigen::VectorXd::Zero(grid.velocityKnots);
  meanOfHats(grid, grid.lineStart, grid.lineEnd, 1.0, [&w](int knot, double value) { w[knot] += value; });
  return w;
}

/// Depth half-way down the first layer, mean over the line, m.
double halfWay(const SectionFunctionals& f, const SectionModel& model) {
  return 0.5 * (model.z[0] - model.z[1]).segment(f.firstNode, f.nodeCount).mean();
}

}  // namespace

SectionFunctionals functionalsOf(const SectionProblem& problem, const SectionLayout& layout) {
  const SectionGrid& grid = problem.grid;
  SectionFunctionals f;
  f.layout = layout;
  f.firstNode = std::max(0, static_cast<int>(std::floor(grid.coordinate(grid.lineStart) + 1e-9)));
  const int last = std::min(grid.nodes - 1, static_cast<int>(std::ceil(grid.coordinate(grid.lineEnd) - 1e-9)));
  f.nodeCount = last - f.firstNode + 1;
  f.anchors.push_back(f.firstNode);
  for (const int node : grid.knotNode) {
    if (node > f.firstNode && node < last) {
      f.anchors.push_back(node);
    }
  }
  f.anchors.push_back(last);
  return f;
}

Eigen::VectorXd functionalValues(const SectionProblem& problem, const SectionFunctionals& f,
                                 const Eigen::VectorXd& theta) {
  const SectionModel model = makeSectionModel(problem.grid, f.layout, theta);
  const Eigen::VectorXd slope = slopeWeights(problem, f);
  const Eigen::VectorXd mean = meanWeights(problem.grid);
  Eigen::VectorXd out(f.count());
  for (int k = 1; k <= f.layout.interfaces(); ++k) {
    const auto z = model.z[k].segment(f.firstNode, f.nodeCount);
    out.segment(f.elevation(k, f.firstNode), f.nodeCount) = z;
    out[f.slope(k)] = slope.dot(z);
  }
  for (int layer = 1; layer <= f.layout.layers; ++layer) {
    double v = theta[f.layout.logVelocity(layer)];
    if (f.layout.varies(layer)) {
      v += mean.dot(theta.segment(f.layout.deviation(layer), f.layout.velocityKnots));
    }
    if (layer == 1 && f.layout.gradient) {
      v += std::log1p(model.gradient * halfWay(f, model) * std::exp(-v));
    }
    out[f.logVelocity(layer)] = v;
  }
  for (int s = 0; s < f.layout.delays; ++s) {
    out[f.delay(s)] = theta[f.layout.delay(s)];
  }
  return out;
}

Eigen::MatrixXd functionalDerivatives(const SectionProblem& problem, const SectionFunctionals& f,
                                      const SectionModel& model) {
  const SectionGrid& grid = problem.grid;
  const Eigen::VectorXd slope = slopeWeights(problem, f);
  const Eigen::VectorXd mean = meanWeights(grid);
  const int anchors = static_cast<int>(f.anchors.size());
  const int shift = f.layout.interfaces() * (anchors - f.nodeCount);  // columns behind the elevations move by this
  Eigen::MatrixXd out = Eigen::MatrixXd::Zero(f.layout.size(), f.count() + shift);
  const auto node = [&](int k, int j, int column, double weight) {
    const SectionGrid::Weights& t = grid.toKnots[j];
    for (int l = 1; l <= k; ++l) {
      for (int i = 0; i < 4; ++i) {
        out(f.layout.elevation(l) + t.first + i, column) += weight * model.chain[k][l][j] * t.w[i];
      }
    }
  };
  for (int k = 1; k <= f.layout.interfaces(); ++k) {
    for (int a = 0; a < anchors; ++a) {
      node(k, f.anchors[a], (k - 1) * anchors + a, 1.0);
    }
    for (int j = 0; j < f.nodeCount; ++j) {
      node(k, f.firstNode + j, f.slope(k) + shift, slope[j]);
    }
  }
  for (int layer = 1; layer <= f.layout.layers; ++layer) {
    out(f.layout.logVelocity(layer), f.logVelocity(layer) + shift) = 1.0;
    if (f.layout.varies(layer)) {
      out.col(f.logVelocity(layer) + shift).segment(f.layout.deviation(layer), f.layout.velocityKnots) = mean;
    }
  }
  if (f.layout.gradient) {
    // ln(v_0 + k h): the share of v_0 goes to its unknowns, the rest to the gradient.
    const int column = f.logVelocity(1) + shift;
    const double grown = model.gradient * halfWay(f, model) * model.slowness[0].mean();
    out.col(column) /= 1.0 + grown;
    out(f.layout.gradientIndex(), column) = grown / (1.0 + grown) / model.gradient * model.gradientSlope;
  }
  for (int s = 0; s < f.layout.delays; ++s) {
    out(f.layout.delay(s), f.delay(s) + shift) = 1.0;
  }
  return out;
}

Eigen::VectorXd allVariances(const SectionFunctionals& f, const Eigen::VectorXd& ofColumns) {
  Eigen::VectorXd out(f.count());
  const int anchors = static_cast<int>(f.anchors.size());
  for (int k = 1; k <= f.layout.interfaces(); ++k) {
    const Eigen::VectorXd sigma = ofColumns.segment((k - 1) * anchors, anchors).cwiseSqrt();
    for (int a = 0; a + 1 < anchors; ++a) {
      const int gap = f.anchors[a + 1] - f.anchors[a];
      for (int i = 0; i <= gap; ++i) {
        const double s = sigma[a] + (sigma[a + 1] - sigma[a]) * i / gap;
        out[f.elevation(k, f.anchors[a] + i)] = s * s;
      }
    }
  }
  const int rest = f.count() - f.slope(1);
  out.tail(rest) = ofColumns.tail(rest);
  return out;
}

}  // namespace strikeplate
