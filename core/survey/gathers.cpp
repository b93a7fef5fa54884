#include "core/survey/gathers.h"

#include <utility>

#include "core/line/make_gather.h"

namespace strikeplate {
namespace {

Gather withoutSamples(const Shot& shot, const std::vector<Geophone>& geophones) {
  Gather gather;
  gather.shot = shot.point;
  gather.geophones = geophones;
  gather.sampleInterval = 1e-3;
  gather.traces.resize(geophones.size());
  gather.states.assign(geophones.size(), TraceState::Live);
  return gather;
}

}  // namespace

Gather gatherOf(const Survey& survey, int shotIndex) {
  const Shot& shot = survey.shots[static_cast<std::size_t>(shotIndex)];
  std::vector<const ShotRecord*> blows;
  std::vector<double> lags;
  RecordPtr last;
  for (const Blow& blow : shot.blows) {
    if (blow.used) {
      last = survey.records[static_cast<std::size_t>(blow.record)];
      blows.push_back(survey.records[static_cast<std::size_t>(blow.record)].get());
      lags.push_back(blow.lag);
    }
  }
  std::vector<Geophone> geophones;
  for (const ShotTrace& trace : shot.traces) {
    geophones.push_back(survey.geophones[static_cast<std::size_t>(trace.geophone)]);
  }
  Gather gather = withoutSamples(shot, geophones);
  if (blows.empty()) {
    return gather;
  }
  if (auto single =
          blows.size() == 1 && lags.front() == 0.0 ? gatherOfOneBlow(last, shot.point, geophones) : std::nullopt) {
    gather = std::move(*single);
  } else if (auto stacked = makeGather(blows, lags, shot.point, geophones)) {
    gather = std::move(*stacked);
  } else if (auto first = makeGather({blows.front()}, {0.0}, shot.point, geophones)) {
    // Blows that cannot be summed leave the first one to be picked.
    gather = std::move(*first);
  }
  for (std::size_t t = 0; t < shot.traces.size() && t < gather.states.size(); ++t) {
    gather.states[t] = shot.traces[t].state;
  }
  return gather;
}

std::vector<Gather> gathersOf(const Survey& survey) {
  std::vector<Gather> gathers;
  for (std::size_t s = 0; s < survey.shots.size(); ++s) {
    gathers.push_back(gatherOf(survey, static_cast<int>(s)));
  }
  return gathers;
}

bool sameStack(const Survey& a, const Survey& b, int shotIndex) {
  const Shot& p = a.shots[static_cast<std::size_t>(shotIndex)];
  const Shot& q = b.shots[static_cast<std::size_t>(shotIndex)];
  if (p.blows != q.blows || p.traces.size() != q.traces.size()) {
    return false;
  }
  for (std::size_t t = 0; t < p.traces.size(); ++t) {
    if (p.traces[t].geophone != q.traces[t].geophone || p.traces[t].state != q.traces[t].state) {
      return false;
    }
  }
  for (const Blow& blow : p.blows) {
    const auto r = static_cast<std::size_t>(blow.record);
    if (a.records[r] != b.records[r]) {
      return false;
    }
  }
  return true;
}

}  // namespace strikeplate
