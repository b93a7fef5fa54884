#pragma once

#include <span>
#include <vector>

namespace strikeplate {

/// What the noise of a survey sounds like: the filter that makes it white with unit variance, for noise of unit rms.
struct NoiseModel {
  std::vector<double> whitener;  ///< weights of the present and the earlier samples
};

/// Fits an autoregression of order 14 to the noise by least squares, forwards and backwards (the modified covariance
/// method: Marple 1980, IEEE Trans. ASSP 28, 441-454; on short stretches of smooth noise, autocorrelations would
/// leave it far from white), each trace scaled to unit variance, with `floor` of white noise (a share of the
/// variance) added. `traces` are work traces, the first `noiseEnds` samples of each hold noise only; stretches under
/// 40 samples are passed over. Without any stretch the noise is taken as white.
NoiseModel fitNoise(const std::vector<std::vector<float>>& traces, const std::vector<std::size_t>& noiseEnds,
                    double floor);

/// Applies the filter; samples before the first count as equal to it.
std::vector<float> whitened(const NoiseModel& model, std::span<const float> samples);

/// Mean and standard deviation of the noise-only samples.
struct NoiseLevel {
  double mean = 0.0;
  double rms = 0.0;
};
NoiseLevel noiseLevel(std::span<const float> noise);

}  // namespace strikeplate
