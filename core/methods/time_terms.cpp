#include "core/methods/time_terms.h"

#include <algorithm>
#include <cmath>
#include <map>
#include <utility>

#include <Eigen/Dense>

namespace strikeplate {
namespace {

constexpr double kSamePlace = 1e-6;  // m
constexpr double kZero = 1e-10;      // of the largest eigenvalue of the scaled normal matrix
constexpr double kFree = 1e-6;       // of a unit vector

/// An unknown and its factor.
using Part = std::pair<Eigen::Index, double>;

struct Layout {
  std::map<int, Eigen::Index> geophone;     ///< unknown of each
  std::map<int, std::vector<Part>> source;  ///< what each shot's term is made of
};

/// The shot's term out of the geophones' terms, or nothing when it needs one of its own.
std::vector<Part> tied(const TravelTimes& times, const Layout& layout, double x, TimeTerms::Sources sources) {
  const std::pair<const int, Eigen::Index>* before = nullptr;
  for (const auto& entry : layout.geophone) {
    const double at = times.geophones[static_cast<std::size_t>(entry.first)].x;
    if (std::abs(at - x) <= kSamePlace) {
      return {{entry.second, 1.0}};
    }
    if (at > x) {
      if (sources == TimeTerms::Sources::Own || before == nullptr) {
        return {};
      }
      const double from = times.geophones[static_cast<std::size_t>(before->first)].x;
      const double part = (x - from) / (at - from);
      return {{before->second, 1.0 - part}, {entry.second, part}};
    }
    before = &entry;
  }
  return {};
}

void describe(TimeTerms& terms) {
  const Eigen::Index slowness = terms.unknowns - 1;
  const Eigen::Index free = terms.nullSpace.cols();
  if (free == 0) {
    return;
  }
  const bool velocity = terms.nullSpace.row(slowness).norm() > kFree;
  if (velocity) {
    terms.freedom.emplace_back("the refractor's velocity against a trend of the terms along the line");
  }
  if (free > (velocity ? 1 : 0)) {
    terms.freedom.emplace_back("a constant between the terms of shots and of geophones that share no place");
  }
}

}  // namespace

bool TimeTerms::isFixed(Eigen::Index unknown) const {
  return determined && (nullSpace.cols() == 0 || nullSpace.row(unknown).norm() <= kFree);
}

Delay TimeTerms::delay(std::size_t i) const {
  const auto term = static_cast<Eigen::Index>(i);
  const Eigen::Index slowness = unknowns - 1;
  return {{solution(term), std::sqrt(covariance(term, term))},
          {solution(slowness), std::sqrt(covariance(slowness, slowness))},
          covariance(term, slowness)};
}

TimeTerms timeTerms(const TravelTimes& times, int layer, TimeTerms::Sources sources) {
  TimeTerms terms;
  Layout layout;
  std::vector<const Arrival*> picks;
  double farthest = 0.0;
  for (const Arrival& a : times.arrivals) {
    if (a.layer == layer && times.offset(a) > 0.0) {
      picks.push_back(&a);
      layout.geophone.emplace(a.geophone, 0);
      farthest = std::max(farthest, times.offset(a));
    }
  }
  if (layer < 2 || picks.size() < 3) {
    terms.reason = "fewer than three picks through this layer";
    return terms;
  }
  for (auto& [geophone, unknown] : layout.geophone) {
    unknown = static_cast<Eigen::Index>(terms.geophones.size());
    terms.geophones.push_back(geophone);
  }
  auto next = static_cast<Eigen::Index>(terms.geophones.size());
  for (const Arrival* a : picks) {
    if (layout.source.contains(a->shot)) {
      continue;
    }
    auto parts = tied(times, layout, times.shots[static_cast<std::size_t>(a->shot)].x, sources);
    if (parts.empty()) {
      parts = {{next++, 1.0}};
      terms.ownShots.push_back(a->shot);
    }
    layout.source[a->shot] = std::move(parts);
  }
  terms.unknowns = static_cast<int>(next) + 1;

  // The slowness is sought times the largest distance, so that all unknowns are times.
  const Eigen::Index rows = static_cast<Eigen::Index>(picks.size());
  Eigen::MatrixXd design = Eigen::MatrixXd::Zero(rows, terms.unknowns);
  Eigen::VectorXd observed(rows), weight(rows);
  for (Eigen::Index i = 0; i < rows; ++i) {
    const Arrival& a = *picks[static_cast<std::size_t>(i)];
    design(i, layout.geophone.at(a.geophone)) += 1.0;
    for (const auto& [unknown, factor] : layout.source.at(a.shot)) {
      design(i, unknown) += factor;
    }
    design(i, next) = times.offset(a) / farthest;
    observed(i) = a.time;
    weight(i) = 1.0 / (a.sigma * a.sigma);
  }
  const Eigen::MatrixXd normal = design.transpose() * weight.asDiagonal() * design;
  const Eigen::SelfAdjointEigenSolver<Eigen::MatrixXd> eigen(normal);
  const Eigen::VectorXd& values = eigen.eigenvalues();
  const auto isZero = [&values](Eigen::Index i) { return !(values(i) > kZero * values(values.size() - 1)); };
  Eigen::Index zeros = 0;
  while (zeros < values.size() && isZero(zeros)) {
    ++zeros;
  }
  const Eigen::Index rank = terms.unknowns - zeros;
  const Eigen::MatrixXd kept = eigen.eigenvectors().rightCols(rank);
  terms.rank = static_cast<int>(rank);
  terms.nullSpace = eigen.eigenvectors().leftCols(zeros);
  terms.covariance = kept * values.tail(rank).cwiseInverse().asDiagonal() * kept.transpose();
  terms.solution = terms.covariance * (design.transpose() * weight.cwiseProduct(observed));
  terms.rms = std::sqrt((observed - design * terms.solution).squaredNorm() / static_cast<double>(rows));
  terms.solution(next) /= farthest;
  terms.covariance.row(next) /= farthest;
  terms.covariance.col(next) /= farthest;
  terms.determined = true;
  describe(terms);
  return terms;
}

}  // namespace strikeplate
