#include "core/picking/offset_path.h"

#include <algorithm>
#include <array>
#include <cmath>

#include <Eigen/Dense>

namespace strikeplate {
namespace {

// s/m; steps widen with slowness, as the ground's do.
constexpr std::array<double, 22> kSlowness{-0.0004, -0.0002, 0.0,    0.00015, 0.00025, 0.00034, 0.00042, 0.0005,
                                           0.0006,  0.0007,  0.0008, 0.00095, 0.00115, 0.0014,  0.0017,  0.00205,
                                           0.0025,  0.003,   0.0036, 0.0043,  0.0053,  0.0067};
constexpr auto kStates = static_cast<Eigen::Index>(kSlowness.size());

constexpr double kRises = 0.05, kRigidRises = 1e-20;
constexpr double kRiseFade = 0.5;  // by state: how much rarer a rise is the steeper it is

using Table = Eigen::ArrayXXd;  // [position][slowness state]

/// Probability of going from state i (row) to j, outwards: keep 0.7, neighbours 0.1 together, fall 0.15,
/// rise `rises`, the steeper the rarer.
Eigen::MatrixXd transitions(double rises) {
  Eigen::MatrixXd t = Eigen::MatrixXd::Zero(kStates, kStates);
  for (Eigen::Index i = 0; i < kStates; ++i) {
    t(i, i) += 0.70;
    t(i, std::max<Eigen::Index>(i - 1, 0)) += 0.06;
    t(i, std::min(i + 1, kStates - 1)) += 0.04;
    for (Eigen::Index j = 0; j <= i; ++j)
      t(i, j) += 0.15 / static_cast<double>(i + 1);
    double sum = 0.0;
    for (Eigen::Index j = i; j < kStates; ++j)
      sum += std::exp(-kRiseFade * static_cast<double>(j - i));
    for (Eigen::Index j = i; j < kStates; ++j) {
      t(i, j) += rises * std::exp(-kRiseFade * static_cast<double>(j - i)) / sum;
    }
  }
  return t;
}

double gapAround(Eigen::Index state) {
  const auto i = static_cast<std::size_t>(state);
  const std::size_t low = i > 0 ? i - 1 : 0, high = std::min(i + 1, kSlowness.size() - 1);
  return (kSlowness[high] - kSlowness[low]) / static_cast<double>(high - low);
}

/// Two-sided exponential blur with mean absolute width `width` (positions), in place, keeping the sum but for the
/// ends.
void blur(Eigen::Ref<Eigen::ArrayXd> column, double width) {
  const double keep = width / (1.0 + width);
  double last = 0.0;
  Eigen::ArrayXd left(column.size());
  for (Eigen::Index i = 0; i < column.size(); ++i)
    last = left(i) = (1.0 - keep) * column(i) + keep * last;
  last = 0.0;
  for (Eigen::Index i = column.size(); i-- > 0;) {
    last = (1.0 - keep) * left(i) + keep * last;
    column(i) = last;
  }
}

/// `column` moved by `shift` positions (fractions shared between neighbours), nothing coming in at the ends.
Eigen::ArrayXd moved(const Eigen::ArrayXd& column, double shift) {
  const double whole = std::floor(shift);
  const double part = shift - whole;
  const auto by = static_cast<Eigen::Index>(whole);
  const Eigen::Index n = column.size();
  Eigen::ArrayXd out = Eigen::ArrayXd::Zero(n);
  const Eigen::Index from = std::max<Eigen::Index>(0, by), to = std::min(n, n + by);
  if (to > from)
    out.segment(from, to - from) += (1.0 - part) * column.segment(from - by, to - from);
  const Eigen::Index from1 = std::max<Eigen::Index>(0, by + 1), to1 = std::min(n, n + by + 1);
  if (to1 > from1)
    out.segment(from1, to1 - from1) += part * column.segment(from1 - by - 1, to1 - from1);
  return out;
}

/// From one trace to the next outward one.
struct Stride {
  double dx;      ///< m
  double origin;  ///< s by which position 0 comes later
  double step;    ///< s

  [[nodiscard]] double shift(Eigen::Index state) const {
    return (kSlowness[static_cast<std::size_t>(state)] * dx - origin) / step;
  }
};

Stride strideTo(const PathEvidence& evidence, std::size_t k) {
  if (k == 0)
    return {0.0, 0.0, evidence.step};
  return {evidence.offsets[k] - evidence.offsets[k - 1], evidence.origins[k] - evidence.origins[k - 1],
          evidence.step};
}

constexpr double kFreedom = 0.00015;     // s at each trace
constexpr double kFreedomPerGap = 0.30;  // of the gap between slownesses
constexpr double kTailWidth = 0.002;     // s

constexpr double kTailShare = 0.03;

void spread(Eigen::Ref<Eigen::ArrayXd> column, Eigen::Index state, const Stride& stride) {
  const double width = (kFreedom + kFreedomPerGap * gapAround(state) * stride.dx) / stride.step;
  Eigen::ArrayXd tail = column;
  blur(column, width);
  blur(tail, kTailWidth / stride.step + width);
  column = (1.0 - kTailShare) * column + kTailShare * tail;
}

Table forward(const Table& before, const Eigen::MatrixXd& transition, const Stride& stride, bool rigid) {
  Table mixed = (before.matrix() * transition).array();
  for (Eigen::Index j = 0; j < kStates; ++j) {
    mixed.col(j) = moved(mixed.col(j), stride.shift(j));
    if (!rigid)
      spread(mixed.col(j), j, stride);
  }
  return mixed;
}

Table backward(Table after, const Eigen::MatrixXd& transition, const Stride& stride, bool rigid) {
  for (Eigen::Index j = 0; j < kStates; ++j) {
    if (!rigid)
      spread(after.col(j), j, stride);
    after.col(j) = moved(after.col(j), -stride.shift(j));
  }
  return (after.matrix() * transition.transpose()).array();
}

Eigen::ArrayXd weightsOf(const std::vector<double>& logEvidence) {
  const Eigen::Map<const Eigen::ArrayXd> values(logEvidence.data(), static_cast<Eigen::Index>(logEvidence.size()));
  return (values - values.maxCoeff()).exp().max(1e-30);
}

}  // namespace

std::vector<std::vector<double>> pathPosterior(const PathEvidence& evidence) {
  const std::size_t n = evidence.offsets.size();
  std::vector<std::vector<double>> posterior(n);
  if (n == 0)
    return posterior;
  Eigen::MatrixXd transition = transitions(evidence.rigid ? kRigidRises : kRises);
  Table start = Table::Ones(static_cast<Eigen::Index>(evidence.logEvidence[0].size()), kStates);
  for (Eigen::Index j = 0; j < kStates; ++j) {
    if (!evidence.rigid || kSlowness[static_cast<std::size_t>(j)] > 0.0)
      continue;
    transition.col(j).setZero();
    start.col(j).setZero();
  }
  std::vector<Eigen::ArrayXd> weights;
  for (const auto& row : evidence.logEvidence)
    weights.push_back(weightsOf(row));
  const Eigen::Index positions = weights[0].size();
  std::vector<Table> ahead(n);
  for (std::size_t k = 0; k < n; ++k) {
    Table prior = k == 0 ? start : forward(ahead[k - 1], transition, strideTo(evidence, k), evidence.rigid);
    prior.colwise() *= weights[k];
    ahead[k] = prior / prior.sum();
  }
  Table back = Table::Ones(positions, kStates);
  for (std::size_t k = n; k-- > 0;) {
    Eigen::ArrayXd sum = (ahead[k] * back).rowwise().sum();
    sum /= sum.sum();
    posterior[k].assign(sum.begin(), sum.end());
    if (k == 0)
      break;
    back.colwise() *= weights[k];
    back = backward(back, transition, strideTo(evidence, k), evidence.rigid);
    back /= back.maxCoeff();
  }
  return posterior;
}

}  // namespace strikeplate
