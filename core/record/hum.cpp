#include "core/record/hum.h"

#include <algorithm>
#include <cmath>
#include <numbers>

#include <Eigen/Dense>

namespace strikeplate {
namespace {

using Terms = Eigen::Matrix<double, 5, 1>;

// cos and sin at the mains frequency and three times it, and a constant.
Terms termsAt(double phase) {
  Terms terms;
  terms << std::cos(phase), std::sin(phase), std::cos(3.0 * phase), std::sin(3.0 * phase), 1.0;
  return terms;
}

// Least squares with a weight for each sample. The share explained is that of the weighted variance.
Hum weightedFit(std::span<const float> samples, const std::vector<double>& weights, double sampleInterval,
                double frequency) {
  Hum hum;
  hum.frequency = frequency;
  const double step = 2.0 * std::numbers::pi * frequency * sampleInterval;
  Eigen::Matrix<double, 5, 5> normal = Eigen::Matrix<double, 5, 5>::Zero();
  Terms right = Terms::Zero();
  double total = 0.0;
  double sum = 0.0;
  double squares = 0.0;
  for (std::size_t i = 0; i < samples.size(); ++i) {
    const auto value = static_cast<double>(samples[i]);
    const Terms terms = termsAt(step * static_cast<double>(i));
    normal.noalias() += weights[i] * terms * terms.transpose();
    right += weights[i] * value * terms;
    total += weights[i];
    sum += weights[i] * value;
    squares += weights[i] * value * value;
  }
  const Terms fit = normal.ldlt().solve(right);
  const double variance = squares - sum * sum / total;
  // Explained: |fit|^2 in the normal matrix less what the mean alone explains.
  const double explained = fit.dot(right) - sum * sum / total;
  if (!fit.allFinite() || !(variance > 0.0)) {
    return hum;
  }
  hum.cosine = fit[0];
  hum.sine = fit[1];
  hum.cosine3 = fit[2];
  hum.sine3 = fit[3];
  hum.share = std::clamp(explained / variance, 0.0, 1.0);
  return hum;
}

// One over the mean square around each sample, less the trace's level there, within `half` samples either side; no
// more than what a thousandth of the whole trace's mean square would give, so that silence does not weigh without
// end.
std::vector<double> quietness(const std::vector<float>& samples, double half) {
  const std::size_t n = samples.size();
  std::vector<double> sums(n + 1, 0.0), squares(n + 1, 0.0);
  for (std::size_t i = 0; i < n; ++i) {
    const auto value = static_cast<double>(samples[i]);
    sums[i + 1] = sums[i] + value;
    squares[i + 1] = squares[i] + value * value;
  }
  const auto variance = [&](std::size_t low, std::size_t high) {
    const auto count = static_cast<double>(high - low);
    const double mean = (sums[high] - sums[low]) / count;
    return std::max((squares[high] - squares[low]) / count - mean * mean, 0.0);
  };
  const double least = 1e-3 * variance(0, n);
  const auto reach = static_cast<std::size_t>(std::max(half, 1.0));
  std::vector<double> weights(n, 1.0);
  for (std::size_t i = 0; i < n && least > 0.0; ++i) {
    weights[i] = 1.0 / std::max(variance(i > reach ? i - reach : 0, std::min(n, i + reach + 1)), least);
  }
  return weights;
}

double medianShare(const std::vector<std::span<const float>>& noise, double sampleInterval, double frequency) {
  std::vector<double> shares;
  for (const std::span<const float> row : noise) {
    shares.push_back(fitHum(row, sampleInterval, row.size(), frequency).share);
  }
  const auto half = shares.begin() + static_cast<std::ptrdiff_t>(shares.size() / 2);
  std::nth_element(shares.begin(), half, shares.end());
  return *half;
}

}  // namespace

Hum fitHum(std::span<const float> samples, double sampleInterval, std::size_t noiseSamples, double frequency) {
  const std::size_t n = std::min(noiseSamples, samples.size());
  if (!(static_cast<double>(n) * sampleInterval * frequency >= 1.0)) {
    Hum none;
    none.frequency = frequency;
    return none;
  }
  return weightedFit(samples.first(n), std::vector<double>(n, 1.0), sampleInterval, frequency);
}

Hum fitHumThroughout(std::span<const float> samples, double sampleInterval, double frequency) {
  constexpr double kFewestPeriods = 3.0;
  constexpr int kRounds = 8;
  Hum hum;
  hum.frequency = frequency;
  if (!(static_cast<double>(samples.size()) * sampleInterval * frequency >= kFewestPeriods)) {
    return hum;
  }
  for (int round = 0; round < kRounds; ++round) {
    hum = weightedFit(samples, quietness(withoutHum(samples, sampleInterval, hum), 0.5 / frequency / sampleInterval),
                      sampleInterval, frequency);
  }
  return hum;
}

std::vector<float> withoutHum(std::span<const float> samples, double sampleInterval, const Hum& hum) {
  std::vector<float> out(samples.begin(), samples.end());
  const double step = 2.0 * std::numbers::pi * hum.frequency * sampleInterval;
  for (std::size_t i = 0; i < out.size(); ++i) {
    const Terms terms = termsAt(step * static_cast<double>(i));
    const double value = hum.cosine * terms[0] + hum.sine * terms[1] + hum.cosine3 * terms[2] + hum.sine3 * terms[3];
    out[i] = static_cast<float>(static_cast<double>(out[i]) - value);
  }
  return out;
}

bool carriesHum(const std::vector<std::span<const float>>& noise, double sampleInterval, double frequency) {
  if (noise.empty()) {
    return false;
  }
  constexpr double kLeastShare = 0.35;
  const double share = medianShare(noise, sampleInterval, frequency);
  return share > kLeastShare && share > medianShare(noise, sampleInterval, 0.8 * frequency) &&
         share > medianShare(noise, sampleInterval, 1.2 * frequency);
}

}  // namespace strikeplate
