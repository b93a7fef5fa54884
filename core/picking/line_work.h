#pragma once

#include <optional>
#include <vector>

#include "core/line/gather.h"
#include "core/picking/line_picker.h"
#include "core/picking/noise_model.h"
#include "core/picking/onset_likelihood.h"

namespace strikeplate {

/// What the line picker knows of one trace.
struct LineTrace {
  std::size_t gather = 0, trace = 0;
  std::size_t setting = 0;      ///< of the recorder; traces that share it share a noise model
  double shotX = 0.0, x = 0.0;  ///< m
  bool usable = true;           ///< holds ground motion
  double start = 0.0;           ///< s, recorder time of the first work sample
  std::vector<float> samples;   ///< work samples
  std::size_t noiseEnd = 0;     ///< work samples that hold noise only
  double rms = 0.0;             ///< of the noise
  std::vector<float> white;     ///< whitened, unit noise
  std::optional<Onset> trusted, predicted;
  double belief = 0.0, beliefSigma = 0.0;          ///< s, the present idea of the first break
  std::vector<double> evidence;                    ///< bounded log evidence of the coarse pass, without any prior
  double evidenceStart = 0.0, evidenceStep = 0.0;  ///< s, recorder time of its first position, s between positions
  double curveMean = 0.0, curveScale = 0.0;        ///< s, from the line's curve over offset; scale 0 = no curve
  std::vector<double> posterior;                   ///< probability of each onset position
  double posteriorStart = 0.0;                     ///< s, recorder time of the first position
  double step = 0.0;                               ///< s between positions
  bool reversed = false;
  double upness = 0.0;                       ///< ln p(first swing up) - ln p(down)
  double support = 0.0;                      ///< ln p(an arrival) - ln p(noise alone), of it and its neighbours
  double sureness = 0.0;                     ///< support, less what this trace's noise alone can pretend
  int polarity = 0;                          ///< expected sign of the first swing, 0 = not known
  double priorMean = 0.0, priorScale = 0.0;  ///< s, from the other shots; scale 0 = no prior

  [[nodiscard]] double offset() const { return x < shotX ? shotX - x : x - shotX; }
  /// Recorder time of an onset just before work sample i, s.
  [[nodiscard]] double onsetTime(double i) const;
};

/// A line being picked.
struct LineWork {
  std::vector<LineTrace> traces;                ///< gather by gather
  std::size_t settings = 0;                     ///< of the recorder: different sample intervals
  std::vector<std::vector<std::size_t>> sides;  ///< indices of usable traces on one side of one shot, nearest first
};

/// Work traces, sides and given picks of a line; noise is looked at by `findNoise`.
LineWork makeLineWork(const std::vector<Gather>& gathers, const LinePickOptions& options);

/// Where the noise of a trace looked at alone ends (work samples): 2.5 ms before the onset by Akaike's criterion
/// ahead of the largest swing, and not before the fastest wave could come.
std::size_t noiseEndOf(const LineTrace& trace);

/// Takes mains hum out of every usable trace, if the line has any (hum.h).
void removeHumAll(LineWork& work);

/// Fits a noise model to the usable traces' noise, one for each setting of the recorder (what a long sample interval
/// has cut off is no noise to be whitened), with `floor` of white noise as a share of its variance; levels each trace
/// by its noise and whitens it.
std::vector<NoiseModel> whitenAll(LineWork& work, double floor);

}  // namespace strikeplate
