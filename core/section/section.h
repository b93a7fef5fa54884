#pragma once

#include <string>
#include <vector>

#include "core/base/estimate.h"
#include "core/traveltime/arrivals.h"

namespace strikeplate {

/// One interface of the section: the top of layer `layer`, at every position of Section::x.
struct SectionInterface {
  int layer = 2;
  std::vector<Estimate> depth;      ///< m below the ground at the same x
  std::vector<Estimate> elevation;  ///< m
  Estimate meanDip;                 ///< degrees, positive when it deepens towards larger x
};

/// Log evidence of an interpretation with so many layers, relative to the one chosen.
struct LayerCountEvidence {
  int layers = 0;
  double logEvidence = 0.0;  ///< natural log, minus that of the chosen count
  bool determined = false;
};

/// What a live solve keeps from a full one. Opaque to everyone but core/section: learnt hyperparameters and the last
/// solution, as plain numbers.
struct SectionMemory {
  int layers = 0;
  std::vector<double> numbers;
};

/// The interpreted ground: layers, velocities and the interface under each station, with their joint uncertainty.
struct Section {
  bool determined = false;
  std::string reason;  ///< when not determined: why, and what would help
  bool converged = false;
  bool finished = true;  ///< false when it was asked to stop early
  int layers = 0;
  std::vector<double> x;                     ///< m, rising: every geophone and shot position, and points between
  std::vector<double> ground;                ///< m, elevation at x
  std::vector<SectionInterface> interfaces;  ///< layers - 1 of them, from the top
  std::vector<Estimate> velocities;          ///< m/s, one for each layer (mean along the line)
  std::vector<std::vector<double>> velocityAlong;  ///< m/s, for each layer at each x
  std::vector<double> predicted;                   ///< s, for each arrival; NaN where none
  std::vector<int> layerOf;                        ///< layer of the earliest predicted arrival, for each arrival
  std::vector<double> layerProbability;            ///< posterior probability of that assignment, 0 to 1
  std::vector<double> inlierProbability;           ///< that the pick belongs to the well-behaved ones, 0 to 1
  std::vector<Estimate> triggerDelays;             ///< s, for each shot; empty when none was solved for
  double noiseScale = 1.0;                         ///< factor on the stated pick sigmas, learnt from the misfit
  double rms = 0.0;                                ///< s, of used picks' residuals
  std::vector<LayerCountEvidence> layerCounts;
  SectionMemory memory;

  /// Estimate of depth to the top of `layer` at x (m), straight between neighbouring positions.
  [[nodiscard]] Estimate depthAt(int layer, double x) const;
};

}  // namespace strikeplate
