#pragma once

#include <optional>
#include <vector>

#include "core/base/progress.h"
#include "core/line/gather.h"
#include "core/picking/onset.h"

namespace strikeplate {

/// What the line picker may be told beforehand. Empty tables mean "nothing known"; otherwise one row for each gather
/// with one entry for each trace.
struct LinePickOptions {
  /// First breaks that are known, such as picks by hand: kept as they are, and strong information for the others.
  std::vector<std::vector<std::optional<Onset>>> trusted;
  /// First breaks that are expected, such as the section's prediction with its sigma: a prior, never a pick.
  std::vector<std::vector<std::optional<Onset>>> predicted;
};

/// First breaks of a whole line.
struct LinePicks {
  std::vector<std::vector<std::optional<Onset>>> onsets;  ///< [gather][trace]; none where no onset is usable
  /// [gather][trace]; ln p(an arrival) - ln p(noise alone) of the trace and its neighbours, at most 10, less where
  /// the trace's own noise looks like arrivals; tells which picks can be built
  /// upon. Not judged (0) when predictions were given.
  std::vector<std::vector<double>> sureness;
  std::vector<std::vector<bool>> reversed;  ///< [gather][trace]; the trace's polarity is the wrong way round
  std::vector<std::vector<bool>> dead;      ///< [gather][trace]; the trace has recorded no ground motion
  bool finished = false;                    ///< false when the computation was asked to stop early
};

/// Picks all gathers of a line together: what a trace leaves open is settled by its neighbours, by the pulse that the
/// line's arrivals share, and by the other shots.
///
/// Deterministic. Shifting all recorder times shifts the picks, scaling a trace changes nothing. Traces whose state
/// is Dead get no pick. Needs every gather to have as many traces and states as geophones and a sample interval > 0.
/// When `progress` asks to stop, the best answer so far is returned with `finished` false.
LinePicks pickLine(const std::vector<Gather>& gathers, const LinePickOptions& options = {},
                   const Progress& progress = {});

}  // namespace strikeplate
