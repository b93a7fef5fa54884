#pragma once

#include <vector>

#include <Eigen/Dense>

#include "core/picking/noise_model.h"

namespace strikeplate {

/// One shape that the start of an arrival may have: (u^p exp(1-u))-like up to its first peak, after that anything.
///
///   w(t) = ((t/T) exp(1 - t/T))^p,     t after the onset, T the time of the first peak, w(T) = 1            (1)
///
/// p = 1 leaves zero at once, 2 as the square of time (a force that grows smoothly from zero), 3 later still. The
/// arrival's deviation from (1) is a Gaussian process: a few per cent before the peak, as large as the peak soon
/// after it, where other waves come in.
struct Pulse {
  double power = 2.0;   ///< p
  double peak = 0.002;  ///< T, s
};

/// A pulse seen through the whitener, at one scale of amplitude: everything that the likelihood of an onset needs.
/// With S = I + scale^2 (0.35^2 m m' + D), m the whitened pulse and D the whitened covariance of its deviation,
/// S = L L'.
struct PulseFilter {
  std::size_t pulse = 0;            ///< index into PulseBank::pulses
  double scale = 1.0;               ///< amplitude of the first peak, in noise rms
  Eigen::MatrixXf inverse;          ///< L^-1, lower triangular
  std::vector<double> logDiagonal;  ///< running sums of ln L_ii
  Eigen::VectorXf mean;             ///< scale L^-1 m
  std::vector<double> meanSquare;   ///< running sums of mean^2
};

/// All pulses at all scales, for one noise model.
struct PulseBank {
  std::vector<Pulse> pulses;
  std::vector<double> weights;                    ///< how common each pulse is, adding to 1
  std::vector<double> scales;                     ///< rising
  std::vector<std::vector<PulseFilter>> filters;  ///< [pulse][scale]
};

/// Samples before and after the onset that a bank looks at.
inline constexpr int kLeadSamples = 3;
inline constexpr int kPulseSamples = kLeadSamples + 44;

/// The pulses between 0.8 and 5.6 ms, powers 1 to 3, equally likely.
PulseBank makePulseBank(const NoiseModel& noise);

}  // namespace strikeplate
