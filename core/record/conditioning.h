#pragma once

#include <span>
#include <vector>

#include "core/record/butterworth.h"

namespace strikeplate {

/// What is done to a trace for the eye, in the order of the members; stored samples are never changed.
struct Conditioning {
  bool removeDc = true;
  double humFrequency = 0.0;  ///< Hz, 50 or 60; 0 leaves hum in. Fitted on what was recorded before `noiseUntil`,
                              ///< or, where that is less than two periods, on the quiet parts of the whole trace
  double noiseUntil = 0.0;    ///< s, recorder time before which there is noise only
  PassBand band;              ///< Hz, zero-phase
  bool reversePolarity = false;
  double gainPower = 0.0;  ///< amplitudes grow as the time after the blow to this power; 0 is none
  double agcWindow = 0.0;  ///< s, automatic gain over this length; 0 is none
  bool normalise = false;  ///< largest amplitude becomes 1
  bool operator==(const Conditioning&) const = default;
};

/// The trace with all that done to it. sampleInterval in s, > 0; start: recorder time of the first sample, s.
std::vector<float> conditioned(std::span<const float> samples, double sampleInterval, double start,
                               const Conditioning& settings);

/// Without its mean.
std::vector<float> withoutDc(std::span<const float> samples);

/// Divided by its largest amplitude, which becomes 1; a trace of zeros stays as it is.
std::vector<float> normalised(std::span<const float> samples);

/// Times (t / 0.1 s) to the given power for recorder times t after 0; samples before the blow get the gain of 1 ms.
std::vector<float> withTimeGain(std::span<const float> samples, double sampleInterval, double start, double power);

/// Automatic gain: divided by the rms over `window` s centred at each sample, but by no less than a hundredth of the
/// rms of the whole trace, so that noise before the break is not blown up without bound. Common practice, no source.
std::vector<float> withAutomaticGain(std::span<const float> samples, double sampleInterval, double window);

}  // namespace strikeplate
