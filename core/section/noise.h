#pragma once

namespace strikeplate {

/// How pick errors are spread. Residuals r are in units of the scaled sigma.
///
/// Good picks are normal; one in twenty is gross, normal with fifteen times the spread (own choice, in the manner of
/// Tukey's contaminated normal 1960). A start far from the answer uses Cauchy tails instead, which hold on to no
/// pick in particular.
class PickNoise {
 public:
  enum class Shape { kCauchy, kMixture };
  explicit PickNoise(Shape shape) : shape_(shape) {}

  /// -ln density, up to a constant.
  [[nodiscard]] double loss(double r) const;
  /// Weight w such that w r is the derivative of the loss at r, or for the mixture the mean of 1 and 1/225 over
  /// good and gross.
  [[nodiscard]] double weight(double r) const;
  /// Probability that the pick is a good one, given its residual.
  [[nodiscard]] static double inlier(double r);

 private:
  Shape shape_;
};

}  // namespace strikeplate
