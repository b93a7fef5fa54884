#pragma once

#include <optional>

#include "core/line/gather.h"
#include "core/survey/edit.h"

namespace strikeplate {

/// How a hand's picks become picks. `gather` and `shot` are the same shot's, `trace` is valid, times are recorder
/// times in s.

/// The time a hand means by pointing at `time`: the onset within `halfWidth` s of it, or exactly there when `free` or
/// when there is no onset. Kept within the record and after the blow.
double meantTime(const Gather& gather, const Shot& shot, int trace, double time, double halfWidth, bool free);

/// The pick of a trace set to `time` by hand. Layer and a sigma that was given by hand or came from a table are kept;
/// otherwise sigma is what an onset there deserves (sigmaAt).
Pick handPick(const Gather& gather, const Shot& shot, int trace, double time);

/// "shot 3, trace 17", as edits name it.
std::string pickName(int shot, int trace);

/// Edits on one trace of the survey by hand; none when there is nothing to change.
std::optional<Edit> nudgedPick(const Survey& survey, const Gather& gather, int shot, int trace, int samples);
std::optional<Edit> scaledSigma(const Survey& survey, int shot, int trace, double factor);
std::optional<Edit> deletedPicks(const Survey& survey, int shot, int first, int last);
/// The pick that the signal of this trace alone suggests; near the present or predicted time where one is known
/// (`near`, recorder time in s), anywhere after the blow otherwise.
std::optional<Edit> signalPick(const Survey& survey, const Gather& gather, int shot, int trace,
                               std::optional<double> near);

}  // namespace strikeplate
