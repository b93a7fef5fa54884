#include "core/line/geometry_table.h"

#include <array>
#include <map>
#include <utility>

#include "core/base/csv.h"
#include "core/base/numbers.h"

namespace strikeplate {
namespace {

constexpr double kFoot = 0.3048;

struct Column {
  const char* name;  // without its unit
  std::optional<double> GeometryRow::*field;
};
constexpr std::array<Column, 5> kColumns = {{{"shot_x", &GeometryRow::shotX},
                                             {"shot_elevation", &GeometryRow::shotElevation},
                                             {"shot_depth", &GeometryRow::shotDepth},
                                             {"geophone_x", &GeometryRow::geophoneX},
                                             {"geophone_elevation", &GeometryRow::geophoneElevation}}};

// Where a column stands in the file, and the factor to metres.
struct Found {
  std::optional<std::size_t> at;
  double metres = 1.0;
};

Found find(const CsvTable& csv, const Column& column) {
  if (const auto at = csv.column(std::string(column.name) + "_m")) {
    return {at, 1.0};
  }
  return {csv.column(std::string(column.name) + "_ft"), kFoot};
}

std::string allColumns() {
  std::string text = "file, trace";
  for (const Column& column : kColumns) {
    text += std::string(", ") + column.name + "_m";
  }
  return text;
}

class TableReader {
 public:
  explicit TableReader(const CsvTable& csv) : csv_(csv), file_(csv.column("file")), trace_(csv.column("trace")) {
    for (std::size_t i = 0; i < kColumns.size(); ++i) {
      columns_[i] = find(csv, kColumns[i]);
    }
  }

  Result<GeometryTable> read() {
    bool any = false;
    for (const Found& column : columns_) {
      any = any || column.at.has_value();
    }
    if (!any) {
      std::string have;
      for (const std::string& column : csv_.columns) {
        have += (have.empty() ? "" : ", ") + column;
      }
      return Failure{csv_.name + " has no column of positions (it has " + have + "); a geometry table has some of " +
                     allColumns() + "."};
    }
    GeometryTable table;
    table.name = csv_.name;
    for (std::size_t r = 0; r < csv_.rows.size(); ++r) {
      auto row = readRow(r);
      if (!row) {
        return row.failure();
      }
      table.rows.push_back(std::move(*row));
    }
    return table;
  }

 private:
  Result<GeometryRow> readRow(std::size_t r) {
    const auto& cells = csv_.rows[r];
    GeometryRow row;
    row.line = csv_.lines[r];
    row.file = file_ ? std::string(trimmed(cells[*file_])) : std::string();
    for (std::size_t i = 0; i < kColumns.size(); ++i) {
      if (!columns_[i].at || trimmed(cells[*columns_[i].at]).empty()) {
        continue;
      }
      const std::string& cell = cells[*columns_[i].at];
      const auto value = parseNumber(cell);
      if (!value) {
        return Failure{csv_.columns[*columns_[i].at] + " in " + csv_.placeOf(r) + " is \"" +
                       std::string(trimmed(cell)) + "\", which is not a number with a decimal point."};
      }
      row.*kColumns[i].field = *value * columns_[i].metres;
    }
    return withTrace(std::move(row), r);
  }

  Result<GeometryRow> withTrace(GeometryRow row, std::size_t r) {
    const bool hasGeophone = row.geophoneX || row.geophoneElevation;
    if (!trace_) {
      if (hasGeophone) {
        row.trace = ++counted_[row.file];
      }
      return row;
    }
    const std::string& cell = csv_.rows[r][*trace_];
    if (trimmed(cell).empty()) {
      if (hasGeophone) {
        return Failure{csv_.placeOf(r) + " gives a geophone but no trace that it belongs to; fill in the trace."};
      }
      return row;
    }
    const auto number = parseInteger(cell);
    if (!number || *number < 1 || *number > 1000000) {
      return Failure{"trace in " + csv_.placeOf(r) + " is \"" + std::string(trimmed(cell)) +
                     "\", which is not a trace number (1, 2, ...)."};
    }
    row.trace = static_cast<int>(*number);
    return row;
  }

  const CsvTable& csv_;
  std::optional<std::size_t> file_;
  std::optional<std::size_t> trace_;
  std::array<Found, kColumns.size()> columns_{};
  std::map<std::string, int> counted_;
};

}  // namespace

Result<GeometryTable> parseGeometryTable(std::string_view csv, const std::string& name) {
  const auto table = parseCsv(csv, name);
  return table ? TableReader(*table).read() : Result<GeometryTable>(table.failure());
}

Result<GeometryTable> readGeometryTable(const std::string& path) {
  const auto table = readCsv(path);
  return table ? TableReader(*table).read() : Result<GeometryTable>(table.failure());
}

std::string geometryCsv(const GeometryTable& table) {
  std::vector<std::string> header = {"file", "trace"};
  for (const Column& column : kColumns) {
    header.push_back(std::string(column.name) + "_m");
  }
  std::vector<std::vector<std::string>> rows;
  for (const GeometryRow& row : table.rows) {
    std::vector<std::string> cells = {row.file, row.trace ? std::to_string(*row.trace) : std::string()};
    for (const Column& column : kColumns) {
      const std::optional<double>& value = row.*column.field;
      cells.push_back(value ? fullPrecision(*value) : std::string());
    }
    rows.push_back(std::move(cells));
  }
  return csvText(header, rows);
}

GeometryTable geometryOf(const std::vector<const ShotRecord*>& records) {
  GeometryTable table;
  for (const ShotRecord* record : records) {
    for (std::size_t i = 0; i < record->traces.size(); ++i) {
      GeometryRow row;
      row.file = record->file;
      row.trace = record->firstTraceInFile + static_cast<int>(i);
      row.shotDepth = record->sourceDepth;
      if (record->source) {
        row.shotX = record->source->x;
        row.shotElevation = record->source->z;
      }
      if (record->traces[i].receiver) {
        row.geophoneX = record->traces[i].receiver->x;
        row.geophoneElevation = record->traces[i].receiver->z;
      }
      table.rows.push_back(std::move(row));
    }
  }
  return table;
}

}  // namespace strikeplate
