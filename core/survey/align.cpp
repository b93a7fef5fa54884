#include <algorithm>
#include <utility>

#include "core/record/stack.h"
#include "core/record/trace_state.h"
#include "core/survey/assemble.h"

namespace strikeplate {
namespace {

void alignShot(const Survey& survey, Shot& shot, std::vector<std::string>& remarks) {
  if (shot.blows.size() < 2) {
    return;
  }
  std::vector<const ShotRecord*> records;
  for (const Blow& blow : shot.blows) {
    records.push_back(survey.records[static_cast<std::size_t>(blow.record)].get());
  }
  const BlowAlignment alignment = alignBlows(records);
  for (std::size_t i = 0; i < shot.blows.size(); ++i) {
    shot.blows[i].lag = alignment.blows[i].lag;
    shot.blows[i].similarity = alignment.blows[i].similarity;
  }
  remarks.insert(remarks.end(), alignment.remarks.begin(), alignment.remarks.end());
}

// The worst that is said of a trace in any blow of the shot.
void judgeShots(Survey& survey) {
  std::vector<const ShotRecord*> records;
  for (const RecordPtr& record : survey.records) {
    records.push_back(record.get());
  }
  const auto verdicts = judgeLine(records);
  for (Shot& shot : survey.shots) {
    for (const Blow& blow : shot.blows) {
      const auto& ofRecord = verdicts[static_cast<std::size_t>(blow.record)];
      for (std::size_t t = 0; t < shot.traces.size() && t < ofRecord.size(); ++t) {
        if (shot.traces[t].state == TraceState::Live && ofRecord[t].state != TraceState::Live) {
          shot.traces[t].state = ofRecord[t].state;
          shot.traces[t].stateReason = ofRecord[t].reason;
        }
      }
    }
  }
}

}  // namespace

std::optional<Survey> withBlowsAligned(Survey survey, const Progress& progress) {
  for (std::size_t s = 0; s < survey.shots.size(); ++s) {
    if (!goOn(progress, static_cast<double>(s) / static_cast<double>(survey.shots.size()))) {
      return std::nullopt;
    }
    alignShot(survey, survey.shots[s], survey.remarks);
  }
  judgeShots(survey);
  return survey;
}

}  // namespace strikeplate
