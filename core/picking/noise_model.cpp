#include "core/picking/noise_model.h"

#include <algorithm>
#include <cmath>

#include <Eigen/Dense>

namespace strikeplate {
namespace {

constexpr std::size_t kOrder = 14;
constexpr std::size_t kLeastStretch = 40;
constexpr std::size_t kLongestStretch = 1200;

/// Adds the products of a stretch with itself shifted, forwards and backwards, per unit variance.
void addProducts(std::span<const float> noise, const NoiseLevel& level, Eigen::MatrixXd& products) {
  const std::size_t n = noise.size();
  Eigen::VectorXd ahead(kOrder + 1), back(kOrder + 1);
  for (std::size_t i = kOrder; i < n; ++i) {
    for (std::size_t lag = 0; lag <= kOrder; ++lag) {
      const auto k = static_cast<Eigen::Index>(lag);
      ahead(k) = (noise[i - lag] - level.mean) / level.rms;
      back(k) = (noise[i - kOrder + lag] - level.mean) / level.rms;
    }
    products.noalias() += 0.5 * ahead * ahead.transpose();
    products.noalias() += 0.5 * back * back.transpose();
  }
}

}  // namespace

NoiseLevel noiseLevel(std::span<const float> noise) {
  NoiseLevel level;
  if (noise.empty())
    return level;
  for (const float x : noise)
    level.mean += x;
  level.mean /= static_cast<double>(noise.size());
  for (const float x : noise)
    level.rms += (x - level.mean) * (x - level.mean);
  level.rms = std::sqrt(level.rms / static_cast<double>(noise.size()));
  return level;
}

NoiseModel fitNoise(const std::vector<std::vector<float>>& traces, const std::vector<std::size_t>& noiseEnds,
                    double floor) {
  Eigen::MatrixXd products = Eigen::MatrixXd::Zero(kOrder + 1, kOrder + 1);
  double count = 0.0;
  for (std::size_t t = 0; t < traces.size(); ++t) {
    if (noiseEnds[t] < kLeastStretch)
      continue;
    const std::size_t first = noiseEnds[t] > kLongestStretch ? noiseEnds[t] - kLongestStretch : 0;
    const std::span<const float> noise(traces[t].data() + first, noiseEnds[t] - first);
    const NoiseLevel level = noiseLevel(noise);
    if (!(level.rms > 0.0))
      continue;
    addProducts(noise, level, products);
    count += static_cast<double>(noise.size() - kOrder);
  }
  if (!(count > 0.0))
    return {{1.0}};
  products /= count;
  products.diagonal().array() += floor;
  const Eigen::VectorXd right = products.col(0).tail(kOrder);
  const Eigen::VectorXd weights = products.bottomRightCorner(kOrder, kOrder).ldlt().solve(-right);
  const double error = products(0, 0) + right.dot(weights);
  NoiseModel model;
  model.whitener.push_back(1.0 / std::sqrt(error));
  for (const double w : weights)
    model.whitener.push_back(w / std::sqrt(error));
  return model;
}

std::vector<float> whitened(const NoiseModel& model, std::span<const float> samples) {
  std::vector<float> out(samples.size());
  for (std::size_t i = 0; i < samples.size(); ++i) {
    double sum = 0.0;
    for (std::size_t k = 0; k < model.whitener.size(); ++k)
      sum += model.whitener[k] * samples[i >= k ? i - k : 0];
    out[i] = static_cast<float>(sum);
  }
  return out;
}

}  // namespace strikeplate
