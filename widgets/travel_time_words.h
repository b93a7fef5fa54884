#pragma once

#include <QString>

#include "widgets/branch_marks.h"
#include "widgets/scene.h"

namespace strikeplate {

/// What an arrival is, with its numbers: shot, trace, place, time, what the section has there, and its layer.
QString arrivalWords(const Scene& scene, int arrival);

/// "Layer 2 branch of shot 3, forward: 1620 ± 30 m/s, intercept 12.1 ± 0.4 ms, 14 picks, rms 0.4 ms", 95 %.
QString branchWords(const Scene& scene, const Branch& branch);

/// "Crossover distance from layer 1 to 2, shot 3: 12.4 ± 0.6 m", 95 %.
QString markWords(const Scene& scene, const BranchMark& mark);

/// "Shots 1 and 5: 61.2 and 61.9 ms at each other's place, difference 0.7 ms, at most 1.1 ms is expected".
QString reciprocalWords(const ReciprocalPair& pair);

}  // namespace strikeplate
