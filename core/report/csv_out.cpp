#include "core/report/csv_out.h"

#include <cstddef>
#include <fstream>
#include <vector>

#include "core/base/csv.h"
#include "core/base/numbers.h"
#include "core/survey/times.h"

namespace strikeplate {
namespace {

using Row = std::vector<std::string>;

const char* originName(PickOrigin origin) {
  switch (origin) {
    case PickOrigin::Hand:
      return "hand";
    case PickOrigin::Imported:
      return "imported";
    case PickOrigin::Automatic:
      break;
  }
  return "automatic";
}

// One trace as one blow recorded it.
struct BlowTrace {
  std::string file;
  int number = 1;
  double lag = 0.0;
};

Row pickRow(const Survey& survey, const Interpretation& interpretation, int shotIndex, int traceIndex,
            const BlowTrace& blow) {
  const Shot& shot = survey.shots[static_cast<std::size_t>(shotIndex)];
  const ShotTrace& trace = shot.traces[static_cast<std::size_t>(traceIndex)];
  Row row = {blow.file, std::to_string(blow.number), fullPrecision(shot.point.x),
             fullPrecision(survey.geophones[static_cast<std::size_t>(trace.geophone)].x)};
  if (trace.pick && trace.state != TraceState::Dead) {
    const int arrival = arrivalIndex(interpretation.times, shotIndex, traceIndex);
    const int layer =
        arrival >= 0 ? interpretation.times.arrivals[static_cast<std::size_t>(arrival)].layer : trace.pick->layer;
    row.insert(row.end(), {fullPrecision(trace.pick->time + blow.lag), fullPrecision(trace.pick->sigma),
                           layer > 0 ? std::to_string(layer) : "", originName(trace.pick->origin)});
  } else {
    row.insert(row.end(), 4, "");
  }
  row.push_back(fullPrecision(shot.triggerCorrection));
  return row;
}

void addShot(const Survey& survey, const Interpretation& interpretation, int shotIndex, std::vector<Row>& rows) {
  const Shot& shot = survey.shots[static_cast<std::size_t>(shotIndex)];
  const int traces = static_cast<int>(shot.traces.size());
  for (int t = 0; shot.blows.empty() && t < traces; ++t) {
    rows.push_back(pickRow(survey, interpretation, shotIndex, t, {"", t + 1, 0.0}));
  }
  for (const Blow& blow : shot.blows) {
    const ShotRecord& record = *survey.records[static_cast<std::size_t>(blow.record)];
    for (int t = 0; t < traces; ++t) {
      rows.push_back(
          pickRow(survey, interpretation, shotIndex, t, {record.file, record.firstTraceInFile + t, blow.lag}));
    }
  }
}

}  // namespace

std::string picksCsv(const Survey& survey, const Interpretation& interpretation) {
  std::vector<Row> rows;
  for (std::size_t s = 0; s < survey.shots.size(); ++s) {
    addShot(survey, interpretation, static_cast<int>(s), rows);
  }
  return csvText(
      {"file", "trace", "shot_x_m", "geophone_x_m", "time_s", "sigma_s", "layer", "origin", "trigger_correction_s"},
      rows);
}

std::string depthsCsv(const Survey& survey, const Interpretation& interpretation) {
  const Section& section = interpretation.section;
  std::vector<ShotPoint> shots;
  for (const Shot& shot : survey.shots) {
    shots.push_back(shot.point);
  }
  const Ground ground(survey.geophones, shots);
  std::vector<Row> rows;
  for (const Geophone& geophone : survey.geophones) {
    for (const SectionInterface& interface : section.interfaces) {
      const Estimate depth = section.depthAt(interface.layer, geophone.x);
      rows.push_back({fullPrecision(geophone.x), std::to_string(interface.layer), fullPrecision(depth.value),
                      fullPrecision(depth.sigma), fullPrecision(depth.low95), fullPrecision(depth.high95),
                      fullPrecision(ground.at(geophone.x) - depth.value)});
    }
  }
  return csvText({"x_m", "layer", "depth_m", "depth_sigma_m", "depth_low95_m", "depth_high95_m", "elevation_m"},
                 rows);
}

std::string layersCsv(const Interpretation& interpretation) {
  std::vector<Row> rows;
  const std::vector<Estimate>& velocities = interpretation.section.velocities;
  for (std::size_t i = 0; i < velocities.size(); ++i) {
    const Estimate& v = velocities[i];
    rows.push_back({std::to_string(i + 1), fullPrecision(v.value), fullPrecision(v.sigma), fullPrecision(v.low95),
                    fullPrecision(v.high95)});
  }
  return csvText({"layer", "velocity_m_s", "velocity_sigma_m_s", "velocity_low95_m_s", "velocity_high95_m_s"}, rows);
}

std::string opinionsCsv(const Interpretation& interpretation) {
  std::vector<Row> rows;
  for (const Opinion& o : interpretation.opinions) {
    rows.push_back({o.route, std::to_string(o.layer), o.shot >= 0 ? std::to_string(o.shot + 1) : "",
                    fullPrecision(o.x), fullPrecision(o.depth.value), fullPrecision(o.depth.sigma), o.assumes});
  }
  return csvText({"route", "layer", "shot", "x_m", "depth_m", "depth_sigma_m", "assumes"}, rows);
}

std::string doubtsCsv(const Interpretation& interpretation) {
  std::vector<Row> rows;
  for (const Doubt& d : interpretation.doubts) {
    rows.push_back({d.kind, d.where, d.says, d.restsOn, d.wouldSettle});
  }
  return csvText({"kind", "where", "says", "rests_on", "would_settle"}, rows);
}

std::string boreholesCsv(const Survey& survey, const Interpretation& interpretation) {
  std::vector<Row> rows;
  for (const Borehole& hole : survey.boreholes) {
    const Estimate depth = interpretation.section.depthAt(hole.layer, hole.x);
    rows.push_back({hole.name, fullPrecision(hole.x), std::to_string(hole.layer), fullPrecision(hole.depth),
                    fullPrecision(hole.sigma), hole.used ? "used" : "compared", fullPrecision(depth.value),
                    fullPrecision(depth.low95), fullPrecision(depth.high95),
                    fullPrecision(depth.determined ? depth.value - hole.depth : Estimate::kNaN)});
  }
  return csvText({"borehole", "x_m", "layer", "drilled_depth_m", "drilled_sigma_m", "in_section", "section_depth_m",
                  "section_low95_m", "section_high95_m", "difference_m"},
                 rows);
}

Outcome writeTextFile(const std::string& path, const std::string& text) {
  std::ofstream file(path, std::ios::binary | std::ios::trunc);
  file << text;
  file.close();
  if (!file) {
    return Failure{path + " could not be written; check its folder, your right to write there, and the room left."};
  }
  return Done{};
}

}  // namespace strikeplate
