#include "core/section/prior.h"

#include <algorithm>
#include <cmath>

#include <Eigen/Cholesky>

namespace strikeplate {
namespace {

constexpr double kPlaneDepthSigma = 0.2;  // line lengths
constexpr double kSlopeSigma = 0.15;
constexpr double kGradientMean = 20.0;   // 1/s
constexpr double kGradientSigma = 40.0;  // 1/s
constexpr double kLogNoiseSigma = 0.7;
constexpr double kNoiseStep = 1.15;
constexpr int kNoiseUnit = 23;       // choice at which the stated sigmas are right
constexpr double kSoilLength = 0.2;  // correlation lengths of the deviations, line lengths
constexpr double kRockLength = 0.2;
constexpr double kJitter = 1e-8;

enum class Kernel { kMatern12, kMatern32 };

Eigen::MatrixXd factor(const Eigen::VectorXd& x, double length, Kernel kernel) {
  const Eigen::Index n = x.size();
  Eigen::MatrixXd c(n, n);
  for (Eigen::Index j = 0; j < n; ++j) {
    for (Eigen::Index i = 0; i < n; ++i) {
      const double r = std::abs(x[i] - x[j]) / length;
      const double q = std::sqrt(3.0) * r;
      c(i, j) = kernel == Kernel::kMatern12 ? std::exp(-r) : (1.0 + q) * std::exp(-q);
    }
    c(j, j) += kJitter;
  }
  return c.llt().matrixL();
}

Eigen::VectorXd groundTrend(const SectionGrid& grid) {
  double sx = 0.0;
  double sy = 0.0;
  double sxx = 0.0;
  double sxy = 0.0;
  double n = 0.0;
  for (int j = 0; j < grid.nodes; ++j) {
    const double x = grid.nodeX[j];
    if (x < grid.lineStart || x > grid.lineEnd) {
      continue;
    }
    n += 1.0;
    sx += x;
    sy += grid.ground[j];
    sxx += x * x;
    sxy += x * grid.ground[j];
  }
  const double slope = (n * sxy - sx * sy) / (n * sxx - sx * sx);
  return ((grid.knotX.array() - sx / n) * slope + sy / n).matrix();
}

}  // namespace

SectionPrior::SectionPrior(const SectionGrid& grid, const SectionLayout& layout, const PriorCentre& centre)
    : layout_(layout),
      lineLength_(grid.length()),
      knotSpacing_(grid.knotSpacing),
      firstSigma_(centre.firstSigma),
      otherSigma_(centre.logVelocitySigma),
      delaySigma_(Eigen::VectorXd::Map(centre.delaySigma.data(), layout.delays)),
      knotX_(grid.knotX),
      centre_(0.5 * (grid.lineStart + grid.lineEnd)) {
  columns_ = velocityColumn(1) + layout.layers + 2 * layout.velocityKnots + layout.delays + (layout.gradient ? 1 : 0);
  mean_ = Eigen::VectorXd::Zero(layout.size());
  const Eigen::VectorXd trend = groundTrend(grid);
  for (int k = 1; k <= layout.interfaces(); ++k) {
    mean_.segment(layout.elevation(k), layout.knots) = trend.array() - centre.depth[k - 1];
  }
  for (int layer = 1; layer <= layout.layers; ++layer) {
    mean_[layout.logVelocity(layer)] = centre.logVelocity[layer - 1];
  }
  if (layout.gradient) {
    mean_[layout.gradientIndex()] = kGradientMean;
  }
  const Eigen::VectorXd x =
      Eigen::VectorXd::LinSpaced(layout.velocityKnots, 0.0, (layout.velocityKnots - 1) * grid.velocitySpacing);
  soil_ = factor(x, kSoilLength * lineLength_, Kernel::kMatern32);
  rock_ = factor(x, kRockLength * lineLength_, Kernel::kMatern12);
}

const Eigen::MatrixXd& SectionPrior::interfaceFactor(int lengthChoice) const {
  Eigen::MatrixXd& unit = interface_[lengthChoice];
  if (unit.size() == 0) {
    unit.resize(layout_.knots, layout_.knots + 2);
    unit.col(0).setOnes();
    unit.col(1) = knotX_.array() - centre_;
    unit.rightCols(layout_.knots) = factor(knotX_, length(lengthChoice), Kernel::kMatern32);
  }
  return unit;
}

double SectionPrior::roughness(int choice) const {
  return 0.01 * std::max(1.0, 0.5 * knotSpacing_) * std::pow(2.0, choice);
}

double SectionPrior::length(int choice) const {
  return 1.25 * knotSpacing_ * std::pow(2.0, choice);
}

double SectionPrior::deviation(int choice) {
  constexpr std::array<double, kDeviations> kAmplitudes{0.0, 0.03, 0.06, 0.12, 0.25, 0.5};
  return kAmplitudes[choice];
}

double SectionPrior::noise(int choice) {
  return std::pow(kNoiseStep, choice - kNoiseUnit);
}

int SectionPrior::noiseNearest(double factor) {
  const double c = std::log(std::max(factor, 1e-12)) / std::log(kNoiseStep) + kNoiseUnit;
  return static_cast<int>(std::lround(std::clamp(c, 0.0, kNoises - 1.0)));
}

double SectionPrior::logDensity(const HyperChoice& choice) {
  const double s = std::log(noise(choice.noise)) / kLogNoiseSigma;
  return -0.5 * s * s;
}

Eigen::VectorXd SectionPrior::scales(const HyperChoice& choice) const {
  Eigen::VectorXd s(columns_);
  for (int k = 1; k <= layout_.interfaces(); ++k) {
    s[firstColumn(k)] = kPlaneDepthSigma * lineLength_;
    s[firstColumn(k) + 1] = kSlopeSigma;
    s.segment(firstColumn(k) + 2, layout_.knots).setConstant(roughness(choice.roughness[k - 1]));
  }
  int at = velocityColumn(1);
  s.segment(at, layout_.layers).setConstant(otherSigma_);
  s[at] = firstSigma_;
  at += layout_.layers;
  s.segment(at, layout_.velocityKnots).setConstant(deviation(choice.soil));
  s.segment(at + layout_.velocityKnots, layout_.velocityKnots).setConstant(deviation(choice.rock));
  s.segment(at + 2 * layout_.velocityKnots, layout_.delays) = delaySigma_;
  if (layout_.gradient) {
    s[columns_ - 1] = kGradientSigma;
  }
  return s;
}

Eigen::VectorXd SectionPrior::apply(const HyperChoice& choice, const Eigen::VectorXd& xi) const {
  const Eigen::VectorXd y = scales(choice).cwiseProduct(xi);
  Eigen::VectorXd theta = mean_;
  const int knots = layout_.knots;
  for (int k = 1; k <= layout_.interfaces(); ++k) {
    theta.segment(layout_.elevation(k), knots) +=
        interfaceFactor(choice.length[k - 1]) * y.segment(firstColumn(k), knots + 2);
  }
  const int n = layout_.velocityKnots;
  int at = velocityColumn(1);
  theta.segment(layout_.logVelocity(1), layout_.layers) += y.segment(at, layout_.layers);
  at += layout_.layers;
  const int deviations = layout_.logVelocity(layout_.layers) + 1;
  theta.segment(deviations, n) += soil_ * y.segment(at, n);
  theta.segment(deviations + n, n) += rock_ * y.segment(at + n, n);
  const int rest = layout_.delays + (layout_.gradient ? 1 : 0);
  theta.tail(rest) += y.tail(rest);
  return theta;
}

Eigen::MatrixXd SectionPrior::transposed(const HyperChoice& choice, const Eigen::MatrixXd& v) const {
  Eigen::MatrixXd out(columns_, v.cols());
  const int knots = layout_.knots;
  for (int k = 1; k <= layout_.interfaces(); ++k) {
    out.middleRows(firstColumn(k), knots + 2).noalias() =
        interfaceFactor(choice.length[k - 1]).transpose() * v.middleRows(layout_.elevation(k), knots);
  }
  const int n = layout_.velocityKnots;
  int at = velocityColumn(1);
  out.middleRows(at, layout_.layers) = v.middleRows(layout_.logVelocity(1), layout_.layers);
  at += layout_.layers;
  const int deviations = layout_.logVelocity(layout_.layers) + 1;
  out.middleRows(at, n).noalias() = soil_.transpose() * v.middleRows(deviations, n);
  out.middleRows(at + n, n).noalias() = rock_.transpose() * v.middleRows(deviations + n, n);
  const int rest = layout_.delays + (layout_.gradient ? 1 : 0);
  out.bottomRows(rest) = v.bottomRows(rest);
  return out;
}

}  // namespace strikeplate
