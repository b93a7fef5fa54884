#pragma once

#include <span>
#include <string>
#include <vector>

#include "core/line/gather.h"
#include "core/survey/survey.h"
#include "widgets/record_display.h"

namespace strikeplate {

/// A shot's traces as the eye is to see them: filtered and with their gain, resting at 0 before the first break;
/// reversed traces are turned over.
class ShownTraces {
 public:
  ShownTraces() = default;
  /// `gather` and `shot` are the same shot's; values that are not finite count as 0.
  ShownTraces(const Gather& gather, const Shot& shot, const RecordDisplay& display);

  [[nodiscard]] std::span<const float> trace(std::size_t t) const { return traces_[t]; }
  [[nodiscard]] std::size_t count() const { return traces_.size(); }
  /// The amplitude of each trace that shall fill one trace spacing: its own largest between two recorder times in s,
  /// or for TraceScale::Shot the median of those for all. 0 for a trace of zeros.
  [[nodiscard]] std::vector<float> units(double from, double to, TraceScale scale) const;

 private:
  std::vector<std::vector<float>> traces_;
  double start_ = 0.0, interval_ = 1.0;
};

/// True when both displays show the same amplitudes, but for gain and clip.
bool sameConditioning(const RecordDisplay& a, const RecordDisplay& b);

/// What the display does to the traces, in words: "low cut 10 Hz, gain over 50 ms"; empty when nothing.
std::vector<std::string> conditioningWords(const RecordDisplay& display);

}  // namespace strikeplate
