#pragma once

#include <optional>
#include <string_view>
#include <vector>

#include "core/record/oddity_list.h"
#include "core/record/record.h"

namespace strikeplate::seg2 {

/// What the keywords of one trace say.
struct TraceWords {
  std::optional<double> sampleInterval;  ///< s, > 0
  double delay = 0.0;                    ///< s, DELAY + SKEW
  std::optional<HeaderPosition> receiver;
  std::optional<HeaderPosition> source;
  double descaling = 1.0;
  int stack = 1;
  TraceState state = TraceState::Live;
};

/// Factor from the file's UNITS to metres; says what it does not understand.
double metresPerUnit(const std::vector<HeaderEntry>& fileWords, OddityList& odd);

/// Reads the keywords of trace number `trace`; what cannot be understood is said and left at its default.
TraceWords readTraceWords(const std::vector<HeaderEntry>& words, double metres, int trace, OddityList& odd);

/// A position "x [y [z]]", numbers parted by blanks or commas, times `metres`; nothing unless x is a number.
std::optional<HeaderPosition> parsePosition(std::string_view text, double metres);

}  // namespace strikeplate::seg2
