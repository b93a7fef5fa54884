#pragma once

#include "core/base/progress.h"
#include "core/line/line.h"
#include "core/section/section.h"
#include "core/traveltime/arrivals.h"

namespace strikeplate {

struct SectionOptions {
  int layers = 0;                   ///< 2 to 6; 0 lets the evidence decide
  bool solveTriggerDelays = false;  ///< one delay for each shot as a nuisance parameter
  std::vector<Borehole> boreholes;  ///< those with `used` enter as data
  double outputSpacing = 1.0;       ///< m, largest distance between neighbouring positions of the answer
};

/// The full solve: starts, labels, hyperparameters, number of layers, bands. Arrivals with layerByHand keep their
/// layer. Never throws for bad data: an answer it does not stand by comes back with determined == false and the
/// reason.
Section solveSection(const TravelTimes& times, const SectionOptions& options, const Progress& progress = {});

/// The live solve after a pick moved or a label changed: hyperparameters and number of layers from `memory`, bands
/// included. Falls back to solveSection when the memory does not fit the data.
Section resolveSection(const TravelTimes& times, const SectionOptions& options, const SectionMemory& memory);

}  // namespace strikeplate
