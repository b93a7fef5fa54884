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

}  // namespace

SectionFunctionals functionalsOf(const SectionProblem& problem, int layers) {
  const SectionGrid& grid = problem.grid;
  SectionFunctionals f;
  f.layout = problem.layout(layers);
  f.firstNode = std::max(0, static_cast<int>(std::floor(grid.coordinate(grid.lineStart) + 1e-9)));
  const int last = std::min(grid.nodes - 1, static_cast<int>(std::ceil(grid.coordinate(grid.lineEnd) - 1e-9)));
  f.nodeCount = last - f.firstNode + 1;
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
  Eigen::MatrixXd out = Eigen::MatrixXd::Zero(f.layout.size(), f.count());
  for (int k = 1; k <= f.layout.interfaces(); ++k) {
    for (int j = 0; j < f.nodeCount; ++j) {
      const int node = f.firstNode + j;
      const SectionGrid::Weights& t = grid.toKnots[node];
      for (int l = 1; l <= k; ++l) {
        for (int i = 0; i < 4; ++i) {
          const double d = model.chain[k][l][node] * t.w[i];
          out(f.layout.elevation(l) + t.first + i, f.elevation(k, node)) += d;
          out(f.layout.elevation(l) + t.first + i, f.slope(k)) += slope[j] * d;
        }
      }
    }
  }
  for (int layer = 1; layer <= f.layout.layers; ++layer) {
    out(f.layout.logVelocity(layer), f.logVelocity(layer)) = 1.0;
    if (f.layout.varies(layer)) {
      out.col(f.logVelocity(layer)).segment(f.layout.deviation(layer), f.layout.velocityKnots) = mean;
    }
  }
  for (int s = 0; s < f.layout.delays; ++s) {
    out(f.layout.delay(s), f.delay(s)) = 1.0;
  }
  return out;
}

}  // namespace strikeplate
