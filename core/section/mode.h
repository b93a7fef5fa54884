#pragma once

#include <memory>
#include <string>
#include <vector>

#include "core/section/hyper_search.h"
#include "core/section/inversion.h"
#include "core/section/start_lines.h"

namespace strikeplate {

/// One way to explain the picks: a maximum of the posterior, with the hyperparameters around it.
struct SectionMode {
  std::shared_ptr<const SectionPrior> prior;
  std::shared_ptr<SectionInversion> inversion;
  std::vector<WeightedFit> fits;
  double logEvidence = 0.0;
  double weight = 1.0;  ///< among the modes of one number of layers
  bool converged = false;
};

/// All that was found for one number of layers, best mode first.
struct SectionCandidate {
  int layers = 0;
  std::vector<SectionMode> modes;
  std::string rejected;  ///< why it cannot stand, if so
  PriorCentre centre;
  bool finished = true;

  [[nodiscard]] bool stands() const { return rejected.empty() && !modes.empty(); }
  [[nodiscard]] double logEvidence() const { return modes.front().logEvidence; }
};

/// Share of the whole work, for progress.
struct ProgressPart {
  const Progress* progress = nullptr;
  double from = 0.0;
  double to = 1.0;

  /// True when the work shall go on.
  [[nodiscard]] bool at(double fraction) const {
    return progress == nullptr || goOn(*progress, from + fraction * (to - from));
  }
};

/// Inverts for one number of layers from several starts. One layer means: no refractor at all. What falls far short
/// of the log evidence `toBeat` is left unfinished, without fits.
SectionCandidate solveLayers(const SectionProblem& problem, const TravelTimes& times, int layers, double toBeat,
                             const ProgressPart& progress);

/// Lets velocity grow with depth in the first layer of a finished candidate. When the evidence asks for that (a
/// gradient costs ln 3, and must gain by more), what comes of it joins the candidate's modes.
void addGradient(const SectionProblem& problem, SectionCandidate& candidate);

}  // namespace strikeplate
