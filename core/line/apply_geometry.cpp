#include <algorithm>
#include <cmath>
#include <map>
#include <utility>

#include "core/base/file_names.h"
#include "core/base/numbers.h"
#include "core/line/geometry_table.h"
#include "core/record/oddity_list.h"

namespace strikeplate {
namespace {

constexpr double kSame = 0.01;  // m, positions closer than this do not contradict each other

bool matchesFile(const GeometryRow& row, const ShotRecord& record) {
  return row.file.empty() || row.file == record.file || lastPart(row.file) == lastPart(record.file);
}

// The trace of the record that a row names, or nothing when it is about another shot's trace.
std::optional<std::size_t> traceOf(const GeometryRow& row, const ShotRecord& record) {
  const int index = row.trace.value_or(0) - record.firstTraceInFile;
  if (!row.trace || index < 0 || index >= static_cast<int>(record.traces.size())) {
    return std::nullopt;
  }
  return static_cast<std::size_t>(index);
}

bool isAbout(const GeometryRow& row, const ShotRecord& record) {
  return matchesFile(row, record) && (!row.trace || traceOf(row, record));
}

// The last values that the rows give for the shot.
struct ShotSaid {
  std::optional<double> x, elevation, depth;
  bool differs = false;  // rows give different positions
};

ShotSaid shotSaid(const GeometryTable& table, const ShotRecord& record) {
  ShotSaid said;
  for (const GeometryRow& row : table.rows) {
    if (!isAbout(row, record)) {
      continue;
    }
    if (row.shotX) {
      // A row for every file is meant to be corrected by those for one file.
      said.differs =
          said.differs || (said.x && !row.file.empty() && row.trace && std::abs(*said.x - *row.shotX) > kSame);
      said.x = row.shotX;
    }
    said.elevation = row.shotElevation ? row.shotElevation : said.elevation;
    said.depth = row.shotDepth ? row.shotDepth : said.depth;
  }
  return said;
}

void placeShot(const ShotSaid& said, const std::string& table, GeometryApplied& out) {
  ShotRecord& record = out.record;
  if (said.differs) {
    out.remarks.push_back(table + " gives more than one shot position for " + record.file +
                          "; the last one is used.");
  }
  if (said.x) {
    if (record.source && std::abs(record.source->x - *said.x) > kSame) {
      out.remarks.push_back(record.file + ": the header puts the shot at " + fixed(record.source->x, 2) + " m, " +
                            table + " at " + fixed(*said.x, 2) + " m, which is used.");
    }
    if (!record.source) {
      record.source = HeaderPosition{};
    }
    record.source->x = *said.x;
    record.source->y.reset();
  }
  if ((said.elevation || said.depth) && !record.source) {
    out.remarks.push_back(table + " gives an elevation or depth for the shot of " + record.file +
                          " but neither it nor the header a position; give shot_x_m.");
    return;
  }
  if (said.elevation) {
    record.source->z = said.elevation;
  } else if (said.depth && !record.sourceDepth) {
    record.source->z.reset();  // whatever the header's third number meant, the table knows the depth
  }
  if (said.depth || said.elevation) {
    record.sourceDepth = said.depth.value_or(record.sourceDepth.value_or(0.0));
  }
}

void placeGeophones(const GeometryTable& table, GeometryApplied& out) {
  std::vector<int> moved;
  double farthest = 0.0;
  std::vector<int> unplaced;
  for (const GeometryRow& row : table.rows) {
    if (!isAbout(row, out.record) || !row.trace) {
      continue;
    }
    Trace& trace = out.record.traces[*traceOf(row, out.record)];
    if (row.geophoneX) {
      const double shift = trace.receiver ? std::abs(trace.receiver->x - *row.geophoneX) : 0.0;
      if (shift > kSame) {
        moved.push_back(*row.trace);
        farthest = std::max(farthest, shift);
      }
      trace.receiver = trace.receiver.value_or(HeaderPosition{});
      trace.receiver->x = *row.geophoneX;
      trace.receiver->y.reset();
    }
    if (row.geophoneElevation && trace.receiver) {
      trace.receiver->z = row.geophoneElevation;
    } else if (row.geophoneElevation) {
      unplaced.push_back(*row.trace);
    }
  }
  const auto sorted = [](std::vector<int> numbers) {
    std::sort(numbers.begin(), numbers.end());
    numbers.erase(std::unique(numbers.begin(), numbers.end()), numbers.end());
    return numbers;
  };
  if (!moved.empty()) {
    out.remarks.push_back(out.record.file + ": " + table.name + " moves the geophones of trace" +
                          (moved.size() > 1 ? "s " : " ") + listed(sorted(moved)) + " by up to " +
                          fixed(farthest, 2) + " m against the header.");
  }
  if (!unplaced.empty()) {
    out.remarks.push_back(out.record.file + ": " + table.name + " gives elevations for trace" +
                          (unplaced.size() > 1 ? "s " : " ") + listed(sorted(unplaced)) +
                          " but neither it nor the header positions; give geophone_x_m.");
  }
}

}  // namespace

GeometryApplied applyGeometry(const GeometryTable& table, const ShotRecord& record) {
  GeometryApplied out;
  out.record = record;
  out.matched =
      std::any_of(table.rows.begin(), table.rows.end(), [&](const GeometryRow& row) { return isAbout(row, record); });
  if (out.matched) {
    placeShot(shotSaid(table, record), table.name, out);
    placeGeophones(table, out);
  }
  return out;
}

std::vector<std::string> unusedRows(const GeometryTable& table, const std::vector<const ShotRecord*>& records) {
  std::map<std::string, std::vector<int>> linesOfFile;
  for (const GeometryRow& row : table.rows) {
    const bool used =
        std::any_of(records.begin(), records.end(), [&](const ShotRecord* record) { return isAbout(row, *record); });
    if (!used) {
      linesOfFile[row.file].push_back(row.line);
    }
  }
  std::vector<std::string> out;
  for (const auto& [file, lines] : linesOfFile) {
    const std::string place =
        std::string(lines.size() == 1 ? "Line " : "Lines ") + listed(lines) + " of " + table.name;
    out.push_back(place +
                  (file.empty() ? " fit no trace of any file" : " fit no trace of the files read (" + file + ")") +
                  "; check file and trace.");
  }
  return out;
}

}  // namespace strikeplate
