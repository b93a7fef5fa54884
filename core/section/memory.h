#pragma once

#include <optional>

#include "core/section/mode.h"
#include "core/section/section.h"

namespace strikeplate {

/// Packs the best mode of a candidate into plain numbers: grid, prior, whitened unknowns and the hyperparameters
/// that matter with their weights.
SectionMemory remember(const SectionProblem& problem, const SectionCandidate& candidate);

/// What a live solve starts from.
struct Recalled {
  PriorCentre centre;
  bool gradient = false;
  HyperChoice choice;
  Eigen::VectorXd xi;
  std::vector<std::pair<HyperChoice, double>> choices;  ///< with weights, heaviest first
};

/// Nothing when the memory does not fit the problem.
std::optional<Recalled> recall(const SectionProblem& problem, const SectionMemory& memory);

}  // namespace strikeplate
