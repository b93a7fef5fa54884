#include "core/survey/geometry_edit.h"

#include <algorithm>
#include <memory>
#include <utility>

#include "core/base/checksum.h"
#include "core/survey/assemble.h"
#include "core/survey/merge.h"

namespace strikeplate {
namespace {

bool leftOut(const Survey& survey, int record) {
  return std::any_of(survey.shots.begin(), survey.shots.end(), [record](const Shot& shot) {
    return std::any_of(shot.blows.begin(), shot.blows.end(),
                       [record](const Blow& blow) { return blow.record == record && !blow.used; });
  });
}

/// The shots whose times came without records, with the geophones that they need.
Survey withoutRecords(const Survey& survey) {
  Survey out;
  std::vector<int> place(survey.geophones.size(), -1);
  for (const Shot& shot : survey.shots) {
    if (shot.blows.empty()) {
      out.shots.push_back(shot);
      for (const ShotTrace& trace : shot.traces) {
        place[static_cast<std::size_t>(trace.geophone)] = 0;
      }
    }
  }
  for (std::size_t g = 0; g < place.size(); ++g) {
    if (place[g] == 0) {
      place[g] = static_cast<int>(out.geophones.size());
      out.geophones.push_back(survey.geophones[g]);
    }
  }
  for (Shot& shot : out.shots) {
    for (ShotTrace& trace : shot.traces) {
      trace.geophone = place[static_cast<std::size_t>(trace.geophone)];
    }
  }
  return out;
}

/// Picks and states of the shot that held a record before, for the shot that holds it now.
void carryOver(const Survey& before, Survey& after) {
  for (Shot& shot : after.shots) {
    for (Blow& blow : shot.blows) {
      blow.used = !leftOut(before, blow.record);
    }
    if (std::none_of(shot.blows.begin(), shot.blows.end(), [](const Blow& blow) { return blow.used; })) {
      shot.blows.front().used = true;  // a shot point that was split keeps something to be picked on
    }
    const int record = shot.blows.front().record;
    for (const Shot& old : before.shots) {
      for (const Blow& blow : old.blows) {
        if (blow.record != record || old.traces.size() != shot.traces.size()) {
          continue;
        }
        shot.triggerCorrection = old.triggerCorrection;
        shot.marks = old.marks;
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

Result<GeometryTable> geometryTableOf(const Survey& survey) {
  GeometryTable table;
  for (const Shot& shot : survey.shots) {
    for (const Blow& blow : shot.blows) {
      const ShotRecord& record = *survey.records[static_cast<std::size_t>(blow.record)];
      for (std::size_t t = 0; t < shot.traces.size(); ++t) {
        const Geophone& geophone = survey.geophones[static_cast<std::size_t>(shot.traces[t].geophone)];
        table.rows.push_back({record.file, record.firstTraceInFile + static_cast<int>(t), shot.point.x,
                              shot.point.elevation, shot.point.depth, geophone.x, geophone.elevation, 0});
      }
    }
  }
  if (table.rows.empty()) {
    return Failure{"This line has no records to write a geometry table for; its places stand with its times."};
  }
  return table;
}

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
  Survey after = *withBlowsAligned(assemble(std::move(records)));
  carryOver(survey, after);
  after = merged(std::move(after), withoutRecords(survey));
  after.info = survey.info;
  after.info.tables.push_back({tablePath, fileChecksum(tablePath).value_or("")});
  after.settings = survey.settings;
  after.boreholes = survey.boreholes;
  after.otherLines = survey.otherLines;
  after.lineAtHand = survey.lineAtHand;
  after.doubtAnswers = survey.doubtAnswers;
  after.remarks = std::move(remarks);
  return Edit{"Lay a geometry table over the headers", {ContentChange{survey, std::move(after)}}};
}

}  // namespace strikeplate
