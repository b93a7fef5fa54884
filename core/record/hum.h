#pragma once

#include <cstddef>
#include <span>
#include <vector>

namespace strikeplate {

/// Mains hum on a trace: a sine at the mains frequency and one at three times that, with a constant.
struct Hum {
  double frequency = 0.0;  ///< Hz, 50 or 60
  double cosine = 0.0;     ///< amplitudes at time 0 of the trace's first sample
  double sine = 0.0;
  double cosine3 = 0.0;
  double sine3 = 0.0;
  double share = 0.0;  ///< of the noise's variance that it explains, 0 to 1
};

/// Fits hum to the first `noiseSamples` samples, which should hold noise only, by least squares. All amplitudes are
/// zero when they last less than one period of the mains, for then a fit would follow the noise.
/// frequency in Hz > 0; sampleInterval in s > 0. Common practice, no source.
Hum fitHum(std::span<const float> samples, double sampleInterval, std::size_t noiseSamples, double frequency);

/// Fits hum where there is hardly any noise before the first break: to the whole trace, by least squares in which
/// each sample weighs as little as the trace is loud around it once the hum is gone (within half a period either
/// side, found by iteration). So the quiet stretches before the break and after the waves decide. All amplitudes are
/// zero when the trace lasts less than three periods. Where the waves ring at the mains frequency to the end of the
/// record some of them go with the hum. Common practice (iteratively reweighted least squares), no source.
Hum fitHumThroughout(std::span<const float> samples, double sampleInterval, double frequency);

/// The trace without the hum; the constant stays.
std::vector<float> withoutHum(std::span<const float> samples, double sampleInterval, const Hum& hum);

/// Whether a record's traces carry hum: the median share explained at `frequency` is above 0.35 and above that at
/// frequencies a fifth lower and higher. The rows of `noise` hold noise only.
bool carriesHum(const std::vector<std::span<const float>>& noise, double sampleInterval, double frequency);

}  // namespace strikeplate
