#pragma once

#include <limits>
#include <string>

namespace strikeplate {

/// A number with its uncertainty, in the unit of the quantity it stands for, or the reason why there is none.
///
/// sigma is one standard deviation; low95 and high95 bound the 95 % interval, low68 and high68 the 68 % one. The
/// intervals need not lie symmetrically about the value. When `determined` is false every number is NaN and `reason`
/// says in words why.
struct Estimate {
  static constexpr double kNaN = std::numeric_limits<double>::quiet_NaN();

  double value = kNaN;
  double sigma = kNaN;
  double low68 = kNaN;
  double high68 = kNaN;
  double low95 = kNaN;
  double high95 = kNaN;
  bool determined = false;
  std::string reason;

  /// Symmetric normal intervals about `value`. Needs a finite value and sigma >= 0, else the result is undetermined.
  static Estimate normal(double value, double sigma);
  /// value = 1/slowness with intervals from slowness +- 1 and 1.96 sigma, for velocities (m/s from s/m).
  /// An interval that reaches slowness <= 0 has an infinite upper bound.
  static Estimate fromSlowness(double slowness, double sigma);
  static Estimate none(std::string reason);
};

/// The standard normal quantile that bounds the central 95 %.
inline constexpr double kNormal95 = 1.959963984540054;

}  // namespace strikeplate
