#include "core/section/posterior.h"

#include <cmath>
#include <utility>

namespace strikeplate {

void NormalEquations::add(const SparseRow& row, double datum, double weight) {
  const std::size_t n = row.index.size();
  for (std::size_t i = 0; i < n; ++i) {
    const double wi = weight * row.value[i];
    b[row.index[i]] += wi * datum;
    for (std::size_t j = 0; j <= i; ++j) {
      const int r = std::max(row.index[i], row.index[j]);
      const int s = std::min(row.index[i], row.index[j]);
      h(r, s) += wi * row.value[j];
    }
  }
  c += weight * datum * datum;
  ++count;
}

Eigen::VectorXd SectionFit::variances(const SectionPrior& prior, const Eigen::MatrixXd& transposedRows) const {
  const Eigen::VectorXd scales = prior.scales(choice);
  Eigen::MatrixXd v = scales(active).asDiagonal() * transposedRows(active, Eigen::all);
  factor.matrixL().solveInPlace(v);
  return v.colwise().squaredNorm().transpose();
}

Eigen::MatrixXd SectionFit::covariance(const SectionPrior& prior) const {
  const int unknowns = static_cast<int>(prior.mean().size());
  const Eigen::MatrixXd rows = prior.transposed(choice, Eigen::MatrixXd::Identity(unknowns, unknowns));
  const Eigen::VectorXd scales = prior.scales(choice);
  Eigen::MatrixXd v = scales(active).asDiagonal() * rows(active, Eigen::all);
  factor.matrixL().solveInPlace(v);
  return v.transpose() * v;
}

LinearisedPosterior::LinearisedPosterior(const SectionPrior& prior, NormalEquations picks, NormalEquations exact)
    : prior_(&prior), picks_(std::move(picks)), exact_(std::move(exact)) {
  picks_.mirror();
  exact_.mirror();
}

const LinearisedPosterior::Projected& LinearisedPosterior::projected(const HyperChoice& choice) const {
  const auto found = byLength_.find(choice.length);
  if (found != byLength_.end()) {
    return found->second;
  }
  const auto twice = [&](const Eigen::MatrixXd& h) {
    return prior_->transposed(choice, prior_->transposed(choice, h).transpose());
  };
  Projected p;
  p.picks = twice(picks_.h);
  p.b = prior_->transposed(choice, picks_.b);
  if (exact_.count > 0) {
    p.exact = twice(exact_.h);
    p.bExact = prior_->transposed(choice, exact_.b);
  }
  return byLength_.emplace(choice.length, std::move(p)).first->second;
}

SectionFit LinearisedPosterior::fit(const HyperChoice& choice) const {
  const Projected& p = projected(choice);
  const Eigen::VectorXd scales = prior_->scales(choice);
  SectionFit out;
  out.choice = choice;
  for (int i = 0; i < prior_->columns(); ++i) {
    if (scales[i] != 0.0) {
      out.active.push_back(i);
    }
  }
  const double s = SectionPrior::noise(choice.noise);
  const double perVariance = 1.0 / (s * s);
  const Eigen::VectorXd d = scales(out.active);
  const auto n = static_cast<Eigen::Index>(out.active.size());
  Eigen::MatrixXd b(n, n);
  for (Eigen::Index j = 0; j < n; ++j) {
    for (Eigen::Index i = j; i < n; ++i) {
      double h = p.picks(out.active[i], out.active[j]) * perVariance;
      if (exact_.count > 0) {
        h += p.exact(out.active[i], out.active[j]);
      }
      b(i, j) = d[i] * d[j] * h;
    }
    b(j, j) += 1.0;
  }
  Eigen::VectorXd v = p.b(out.active) * perVariance;
  if (exact_.count > 0) {
    v += p.bExact(out.active);
  }
  v.array() *= d.array();
  out.factor.compute(b);
  const Eigen::VectorXd xi = out.factor.solve(v);
  out.halfLogDet = out.factor.matrixLLT().diagonal().array().log().sum();
  out.logEvidence = -0.5 * (picks_.c * perVariance + exact_.c - xi.dot(v)) - out.halfLogDet -
                    picks_.count * std::log(s) + SectionPrior::logDensity(choice);
  out.xi = Eigen::VectorXd::Zero(prior_->columns());
  out.xi(out.active) = xi;
  return out;
}

}  // namespace strikeplate
