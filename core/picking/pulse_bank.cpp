#include "core/picking/pulse_bank.h"

#include <algorithm>
#include <cmath>

#include "core/picking/work_trace.h"

namespace strikeplate {
namespace {

constexpr double kPrecursor = 0.012;       // of the first peak: what filters and interpolation leak
constexpr double kAmplitudeSpread = 0.35;  // of the scale

double shapeAt(const Pulse& pulse, double time) {
  const double u = time / pulse.peak;
  return u <= 0.0 ? 0.0 : std::pow(u * std::exp(1.0 - u), pulse.power);
}

/// Standard deviation of the deviation at a time after the onset, relative to the first peak.
double deviationAt(const Pulse& pulse, double time) {
  if (time <= 0.0)
    return kPrecursor;
  const double u = time / pulse.peak;
  const double early = 0.12 * (u < 1.0 ? shapeAt(pulse, time) : 1.0);
  const double late = u < 0.9 ? 0.0 : 0.4 * std::pow(u - 0.9, 1.3);
  return std::min(early + late, 3.0);
}

double timeOfSample(int i) {
  return (i - kLeadSamples + 0.5) * kWorkInterval;
}

Eigen::MatrixXd deviationCovariance(const Pulse& pulse) {
  const double length = 0.8 * pulse.peak;  // s over which the deviation keeps its sign
  Eigen::MatrixXd covariance(kPulseSamples, kPulseSamples);
  for (int i = 0; i < kPulseSamples; ++i) {
    for (int j = 0; j < kPulseSamples; ++j) {
      const double ti = timeOfSample(i), tj = timeOfSample(j);
      const double z = std::sqrt(3.0) * std::abs(ti - tj) / length;
      covariance(i, j) = deviationAt(pulse, ti) * deviationAt(pulse, tj) * (1.0 + z) * std::exp(-z);
    }
    covariance(i, i) += kPrecursor * kPrecursor;
  }
  return covariance;
}

Eigen::MatrixXd whiteningMatrix(const NoiseModel& noise) {
  Eigen::MatrixXd w = Eigen::MatrixXd::Zero(kPulseSamples, kPulseSamples);
  for (int i = 0; i < kPulseSamples; ++i) {
    for (int k = 0; k <= i && k < static_cast<int>(noise.whitener.size()); ++k) {
      w(i, i - k) = noise.whitener[static_cast<std::size_t>(k)];
    }
  }
  return w;
}

PulseFilter makeFilter(const Eigen::VectorXd& mean, const Eigen::MatrixXd& deviation, double scale) {
  const Eigen::MatrixXd s =
      Eigen::MatrixXd::Identity(kPulseSamples, kPulseSamples) +
      scale * scale * (kAmplitudeSpread * kAmplitudeSpread * mean * mean.transpose() + deviation);
  const Eigen::LLT<Eigen::MatrixXd> factor(s);
  const Eigen::MatrixXd lower = factor.matrixL();
  const Eigen::MatrixXd inverse =
      lower.triangularView<Eigen::Lower>().solve(Eigen::MatrixXd::Identity(kPulseSamples, kPulseSamples));
  PulseFilter filter;
  filter.scale = scale;
  filter.inverse = inverse.cast<float>();
  filter.mean = (scale * inverse * mean).cast<float>();
  filter.logDiagonal.push_back(0.0);
  filter.meanSquare.push_back(0.0);
  for (int i = 0; i < kPulseSamples; ++i) {
    filter.logDiagonal.push_back(filter.logDiagonal.back() + std::log(lower(i, i)));
    const double z = filter.mean(i);
    filter.meanSquare.push_back(filter.meanSquare.back() + z * z);
  }
  return filter;
}

}  // namespace

PulseBank makePulseBank(const NoiseModel& noise) {
  PulseBank bank;
  for (const double power : {1.0, 2.0, 3.0}) {
    for (const double peak : {0.0008, 0.0011, 0.0015, 0.002, 0.0028, 0.004, 0.0056}) {
      bank.pulses.push_back({power, peak});
    }
  }
  bank.weights.assign(bank.pulses.size(), 1.0 / static_cast<double>(bank.pulses.size()));
  for (double scale = 1.0; scale < 3e4; scale *= 2.0)
    bank.scales.push_back(scale);
  const Eigen::MatrixXd white = whiteningMatrix(noise);
  for (std::size_t p = 0; p < bank.pulses.size(); ++p) {
    Eigen::VectorXd mean(kPulseSamples);
    for (int i = 0; i < kPulseSamples; ++i)
      mean(i) = shapeAt(bank.pulses[p], timeOfSample(i));
    const Eigen::VectorXd whiteMean = white * mean;
    const Eigen::MatrixXd deviation = white * deviationCovariance(bank.pulses[p]) * white.transpose();
    bank.filters.emplace_back();
    for (const double scale : bank.scales) {
      bank.filters.back().push_back(makeFilter(whiteMean, deviation, scale));
      bank.filters.back().back().pulse = p;
    }
  }
  return bank;
}

}  // namespace strikeplate
