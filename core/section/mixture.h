#pragma once

#include <vector>

#include "core/base/estimate.h"

namespace strikeplate {

/// A mixture of normal distributions of one quantity.
class NormalMixture {
 public:
  void add(double weight, double mean, double variance);

  [[nodiscard]] double mean() const;
  [[nodiscard]] double sigma() const;
  /// Probability of a value below q.
  [[nodiscard]] double below(double q) const;
  /// The value below which lies probability p, 0 < p < 1.
  [[nodiscard]] double quantile(double p) const;
  /// Mean, standard deviation and central 68 and 95 % intervals; undetermined when anything is not finite.
  [[nodiscard]] Estimate estimate() const;

 private:
  struct Part {
    double weight;
    double mean;
    double sigma;
  };
  std::vector<Part> parts_;
  double sum_ = 0.0;
};

}  // namespace strikeplate
