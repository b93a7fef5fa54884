#pragma once

#include <vector>

#include "core/section/inversion.h"
#include "core/traveltime/arrivals.h"

namespace strikeplate {

/// What a trigger is expected to be out by, s; common practice, no source.
constexpr double kTriggerSigma = 3e-3;

/// The trigger delays (s, for each shot; 0 for none) that the picks ask for where the inversion stands: those solved
/// for already, and, one after the other, the shot whose delay raises the evidence of the linearised problem most, as
/// long as it is raised by more than its share and the delay is at least 1 ms. At most a third of the shots: were
/// more of them late, nothing would tell which.
///
/// With the other unknowns' posterior precision B = LL', a delay with prior sd s and data precision c that shares
/// the curvature g with them has S = c - |L^-1 g|^2 left of its own, and gains b^2 / (2 (S + 1/s^2)) -
/// ln(1 + S s^2) / 2, b being what the residuals pull (Schur complement of the normal equations).
std::vector<double> delaysAskedFor(const SectionInversion& inversion);

/// The problem with trigger delays solved for where `delays` (s, for each shot) is not 0, starting there.
SectionProblem withDelays(const SectionProblem& problem, const std::vector<double>& delays);

/// The times with those delays taken off.
TravelTimes withoutDelays(TravelTimes times, const std::vector<double>& delays);

}  // namespace strikeplate
