#include "core/picking/hum.h"

#include <algorithm>
#include <cmath>
#include <numbers>

#include <Eigen/Dense>

#include "core/picking/work_trace.h"

namespace strikeplate {
namespace {

constexpr double kLeastShare = 0.35;
constexpr double kBeside = 7.0;            // Hz
constexpr std::size_t kLongestFit = 1200;  // samples; a mains frequency drifts over longer stretches
constexpr int kColumns = 5;                // constant, hum, third harmonic

Eigen::RowVectorXd wavesAt(std::size_t sample, double frequency) {
  const double phase = 2.0 * std::numbers::pi * frequency * kWorkInterval * static_cast<double>(sample);
  Eigen::RowVectorXd row(kColumns);
  row << 1.0, std::cos(phase), std::sin(phase), std::cos(3.0 * phase), std::sin(3.0 * phase);
  return row;
}

struct HumFit {
  Eigen::VectorXd weights;
  double share = 0.0;  ///< of the variance that the waves explain
};

HumFit fitHum(const std::vector<float>& samples, std::size_t noiseEnd, double frequency) {
  const std::size_t first = noiseEnd > kLongestFit ? noiseEnd - kLongestFit : 0;
  const auto count = static_cast<Eigen::Index>(noiseEnd - first);
  Eigen::MatrixXd waves(count, kColumns);
  Eigen::VectorXd data(count);
  for (Eigen::Index i = 0; i < count; ++i) {
    waves.row(i) = wavesAt(first + static_cast<std::size_t>(i), frequency);
    data(i) = samples[first + static_cast<std::size_t>(i)];
  }
  Eigen::MatrixXd normal = waves.transpose() * waves;
  normal.diagonal().array() += 1e-3 * static_cast<double>(count);
  HumFit fit;
  fit.weights = normal.ldlt().solve(waves.transpose() * data);
  const double mean = data.mean();
  const double variance = (data.array() - mean).square().sum();
  const double left = (data - waves * fit.weights).squaredNorm();
  fit.share = variance > 0.0 ? 1.0 - left / variance : 0.0;
  return fit;
}

bool longEnough(std::size_t noiseEnd, double frequency) {
  return static_cast<double>(noiseEnd) * kWorkInterval >= 1.0 / frequency;
}

double medianShare(const std::vector<std::vector<float>>& traces, const std::vector<std::size_t>& ends,
                   double frequency) {
  std::vector<double> shares;
  for (std::size_t i = 0; i < traces.size(); ++i) {
    // Two periods, so that five columns do not explain just anything.
    if (longEnough(ends[i], 0.5 * frequency))
      shares.push_back(fitHum(traces[i], ends[i], frequency).share);
  }
  if (shares.size() < 3)
    return 0.0;
  const auto middle = shares.begin() + static_cast<std::ptrdiff_t>(shares.size() / 2);
  std::nth_element(shares.begin(), middle, shares.end());
  return *middle;
}

}  // namespace

double humFrequency(const std::vector<std::vector<float>>& traces, const std::vector<std::size_t>& noiseEnds) {
  double found = 0.0, best = kLeastShare;
  for (const double frequency : {50.0, 60.0}) {
    const double share = medianShare(traces, noiseEnds, frequency);
    const double beside = std::max(medianShare(traces, noiseEnds, frequency - kBeside),
                                   medianShare(traces, noiseEnds, frequency + kBeside));
    if (share > best && share > beside) {
      best = share;
      found = frequency;
    }
  }
  return found;
}

void removeHum(std::vector<float>& samples, std::size_t noiseEnd, double frequency) {
  if (!longEnough(noiseEnd, frequency))
    return;
  Eigen::VectorXd weights = fitHum(samples, noiseEnd, frequency).weights;
  for (std::size_t i = 0; i < samples.size(); ++i) {
    samples[i] -= static_cast<float>(wavesAt(i, frequency).dot(weights));
  }
}

}  // namespace strikeplate
