#pragma once

#include <vector>

#include "core/line/line.h"
#include "core/line/shared_samples.h"
#include "core/record/record.h"

namespace strikeplate {

/// One shot point's traces as they are picked: the aligned stack of its blows, one trace for each geophone, all on
/// one time axis (recorder time; no trigger correction). Sample values are relative.
struct Gather {
  ShotPoint shot;
  std::vector<Geophone> geophones;    ///< place of each trace
  double sampleInterval = 0.0;        ///< s
  double start = 0.0;                 ///< s, recorder time of the first sample
  std::vector<SharedSamples> traces;  ///< one row of samples for each geophone, equal lengths
  std::vector<TraceState> states;     ///< one for each geophone

  [[nodiscard]] double timeOf(double sample) const { return start + sample * sampleInterval; }
  [[nodiscard]] double offset(std::size_t trace) const {
    const double d = geophones[trace].x - shot.x;
    return d < 0.0 ? -d : d;
  }
};

}  // namespace strikeplate
