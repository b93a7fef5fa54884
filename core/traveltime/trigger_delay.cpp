#include "core/traveltime/trigger_delay.h"

#include <cmath>

#include <Eigen/Dense>

#include "core/traveltime/line_fit.h"

namespace strikeplate {
namespace {

constexpr double kExpected = 3.0e-3;         // s, spread of trigger errors
constexpr double kReciprocalFloor = 0.3e-3;  // s
constexpr double kDirectFloor = 1.0e-3;      // s

struct Normal {
  Eigen::MatrixXd matrix;
  Eigen::VectorXd right;
  std::vector<bool> spokenOf;

  explicit Normal(std::size_t shots)
      : matrix(Eigen::MatrixXd::Zero(static_cast<Eigen::Index>(shots), static_cast<Eigen::Index>(shots))),
        right(Eigen::VectorXd::Zero(static_cast<Eigen::Index>(shots))),
        spokenOf(shots, false) {}
};

void addPairs(Normal& normal, const std::vector<ReciprocalPair>& pairs) {
  for (const ReciprocalPair& pair : pairs) {
    const double sigma = std::hypot(pair.tolerance / kNormal95, kReciprocalFloor);
    const double w = 1.0 / (sigma * sigma);
    const double value = -pair.difference();
    const Eigen::Index a = pair.shotA, b = pair.shotB;
    normal.matrix(a, a) += w;
    normal.matrix(b, b) += w;
    normal.matrix(a, b) -= w;
    normal.matrix(b, a) -= w;
    normal.right(a) += w * value;
    normal.right(b) -= w * value;
    normal.spokenOf[static_cast<std::size_t>(a)] = true;
    normal.spokenOf[static_cast<std::size_t>(b)] = true;
  }
}

void addDirect(Normal& normal, const TravelTimes& times, const std::vector<Branch>& branches) {
  for (const Branch& branch : branches) {
    if (branch.layer != 1 || branch.arrivals.size() < 3) {
      continue;
    }
    std::vector<FitPoint> points;
    for (const int index : branch.arrivals) {
      const Arrival& a = times.arrivals[static_cast<std::size_t>(index)];
      points.push_back({times.offset(a), a.time, a.sigma});
    }
    const LineFit fit = fitLine(points);
    if (!fit.determined) {
      continue;
    }
    const double w = 1.0 / (fit.varIntercept + kDirectFloor * kDirectFloor);
    normal.matrix(branch.shot, branch.shot) += w;
    normal.right(branch.shot) -= w * fit.intercept;
    normal.spokenOf[static_cast<std::size_t>(branch.shot)] = true;
  }
}

}  // namespace

std::vector<Estimate> suggestedTriggerCorrections(const TravelTimes& times, const std::vector<Branch>& branches,
                                                  const std::vector<ReciprocalPair>& pairs) {
  Normal normal(times.shots.size());
  addPairs(normal, pairs);
  addDirect(normal, times, branches);
  normal.matrix.diagonal().array() += 1.0 / (kExpected * kExpected);
  const Eigen::LLT<Eigen::MatrixXd> factor(normal.matrix);
  const Eigen::VectorXd value = factor.solve(normal.right);
  const Eigen::MatrixXd covariance =
      factor.solve(Eigen::MatrixXd::Identity(normal.matrix.rows(), normal.matrix.cols()));
  std::vector<Estimate> out;
  for (Eigen::Index s = 0; s < value.size(); ++s) {
    out.push_back(normal.spokenOf[static_cast<std::size_t>(s)]
                      ? Estimate::normal(value(s), std::sqrt(covariance(s, s)))
                      : Estimate::none("neither a direct branch nor a reciprocal time speaks about this shot"));
  }
  return out;
}

}  // namespace strikeplate
