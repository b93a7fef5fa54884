#pragma once

#include <span>
#include <vector>

namespace strikeplate {

/// Power-line hum to be taken out of a survey's traces: 0 when there is none, else 50 or 60 Hz.
///
/// `traces` are work traces, `noiseEnds` the number of samples of each that hold noise only. A frequency counts as
/// hum when it explains more than 35 % of the noise's variance, and more than frequencies 7 Hz beside it do. Own
/// rule.
double humFrequency(const std::vector<std::vector<float>>& traces, const std::vector<std::size_t>& noiseEnds);

/// Takes the hum and its third harmonic out of a work trace: least squares on the first `noiseEnd` samples, continued
/// over the whole trace. Nothing happens when fewer samples than one period of hum hold noise only.
void removeHum(std::vector<float>& samples, std::size_t noiseEnd, double frequency);

}  // namespace strikeplate
