#include "core/survey/geometry_edit.h"

#include <memory>
#include <utility>

#include "core/line/geometry_table.h"
#include "core/survey/assemble.h"

namespace strikeplate {
namespace {

/// Picks and states of the shot that held a record before, for the shot that holds it now.
void carryOver(const Survey& before, Survey& after) {
  for (Shot& shot : after.shots) {
    const int record = shot.blows.front().record;
    for (const Shot& old : before.shots) {
      for (const Blow& blow : old.blows) {
        if (blow.record != record || old.traces.size() != shot.traces.size()) {
          continue;
        }
        shot.triggerCorrection = old.triggerCorrection;
        for (std::size_t t = 0; t < shot.traces.size(); ++t) {
          shot.traces[t].pick = old.traces[t].pick;
          shot.traces[t].state = old.traces[t].state;
          shot.traces[t].stateReason = old.traces[t].stateReason;
        }
      }
    }
  }
}

}  // namespace

Result<Edit> geometryEdit(const Survey& survey, const std::string& tablePath) {
  const auto table = readGeometryTable(tablePath);
  if (!table) {
    return table.failure();
  }
  std::vector<RecordPtr> records;
  bool matched = false;
  std::vector<std::string> remarks = survey.remarks;
  for (const RecordPtr& record : survey.records) {
    GeometryApplied applied = applyGeometry(*table, *record);
    matched = matched || applied.matched;
    remarks.insert(remarks.end(), applied.remarks.begin(), applied.remarks.end());
    records.push_back(applied.matched ? std::make_shared<const ShotRecord>(std::move(applied.record)) : record);
  }
  if (!matched) {
    return Failure{tablePath +
                   ": none of its rows is about a record of this line; check the names in its file column."};
  }
  Survey after = withBlowsAligned(assemble(std::move(records)));
  carryOver(survey, after);
  after.info = survey.info;
  after.settings = survey.settings;
  after.boreholes = survey.boreholes;
  after.doubtAnswers = survey.doubtAnswers;
  after.remarks = std::move(remarks);
  return Edit{"Lay a geometry table over the headers", {ContentChange{survey, std::move(after)}}};
}

}  // namespace strikeplate
