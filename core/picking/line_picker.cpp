#include "core/picking/line_picker.h"

#include <algorithm>
#include <cassert>
#include <cmath>
#include <limits>

#include "core/picking/coarse_pass.h"
#include "core/picking/crosstalk.h"
#include "core/picking/fine_pass.h"
#include "core/picking/line_prior.h"
#include "core/picking/line_work.h"
#include "core/picking/offset_curve.h"
#include "core/picking/pick_decision.h"
#include "core/picking/polarity.h"

namespace strikeplate {
namespace {

constexpr int kCoarseRounds = 3, kFineRounds = 2;
constexpr double kCertain = 10.0;  // in log probability
// White noise that is assumed beside the noise (share of its variance). Sharp whitening finds an onset to a fraction
// of a millisecond; to find the right wave at all, a later and stronger one must not gain too much by it.
constexpr double kCoarseFloor = 0.03, kFineFloor = 1e-4;

LinePicks emptyPicks(const std::vector<Gather>& gathers) {
  LinePicks picks;
  for (const Gather& gather : gathers) {
    picks.onsets.emplace_back(gather.traces.size());
    picks.sureness.emplace_back(gather.traces.size(), 0.0);
    picks.reversed.emplace_back(gather.traces.size(), false);
    picks.dead.emplace_back(gather.traces.size(), false);
  }
  return picks;
}

LinePicks picksOf(const std::vector<Gather>& gathers, const LineWork& work, bool finished) {
  LinePicks picks = emptyPicks(gathers);
  for (const LineTrace& t : work.traces) {
    picks.dead[t.gather][t.trace] = !t.usable;
    picks.reversed[t.gather][t.trace] = t.reversed;
    picks.sureness[t.gather][t.trace] = t.trusted ? kCertain : t.sureness;
    picks.onsets[t.gather][t.trace] = t.trusted ? t.trusted : decide(t);
  }
  picks.finished = finished;
  return picks;
}

}  // namespace

LinePicks pickLine(const std::vector<Gather>& gathers, const LinePickOptions& options, const Progress& progress) {
  LineWork work = makeLineWork(gathers, options);
  removeHumAll(work);
  for (int round = 0; round < kCoarseRounds; ++round) {
    if (round > 0)
      updateNoise(work);
    if (round > 1)
      findLinePrior(work);
    const std::vector<NoiseModel> noise = whitenAll(work, kCoarseFloor);
    silenceCrosstalk(work);
    const auto report = [&](double f) { return goOn(progress, 0.5 * (round + f) / kCoarseRounds); };
    if (!coarsePass(work, noise, report))
      return picksOf(gathers, work, false);
    if (round > 0)
      findOffsetCurve(work);
  }
  for (int round = 0; round < kFineRounds; ++round) {
    updateNoise(work);
    findLinePrior(work);
    std::vector<PulseBank> banks;
    for (const NoiseModel& noise : whitenAll(work, kFineFloor))
      banks.push_back(makePulseBank(noise));
    silenceCrosstalk(work);
    const auto report = [&](double f) { return goOn(progress, 0.5 + 0.5 * (round + f) / kFineRounds); };
    if (!finePass(work, banks, report))
      return picksOf(gathers, work, false);
    // With a prediction the picks are led already; nobody builds upon their sureness.
    if (round + 1 == kFineRounds && options.predicted.empty())
      judgeSureness(work, banks);
    findPolarity(work);
  }
  return picksOf(gathers, work, goOn(progress, 1.0));
}

}  // namespace strikeplate
