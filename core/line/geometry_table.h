#pragma once

#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "core/base/result.h"
#include "core/record/record.h"

namespace strikeplate {

/// One row of a geometry table: what it says about a shot, a geophone, or both; lengths in m.
struct GeometryRow {
  std::string file;          ///< empty: every file
  std::optional<int> trace;  ///< number in the file, from 1; none: the row is about the shot only
  std::optional<double> shotX;
  std::optional<double> shotElevation;  ///< of the ground at the shot
  std::optional<double> shotDepth;      ///< below the ground
  std::optional<double> geophoneX;
  std::optional<double> geophoneElevation;
  int line = 0;  ///< in the table's file, 0 when it came from elsewhere
};

/// Positions that go over those in the files' headers.
struct GeometryTable {
  std::string name;  ///< the file as named by the user, for messages
  std::vector<GeometryRow> rows;
};

/// Reads a geometry table from CSV text. Columns, by name in any case and order, any of them may be missing:
///   file, trace, shot_x_m, shot_elevation_m, shot_depth_m, geophone_x_m, geophone_elevation_m;
/// lengths may be in feet instead, in columns that end in _ft. Empty cells leave what the header says. A row without
/// a file holds for every file; without a trace it is about the shot only. In a table without a trace column the rows
/// with a geophone count the traces of their file from 1.
/// Fails, in one sentence with the line, when there is no column of positions, a cell is no number, or a geophone has
/// no trace.
Result<GeometryTable> parseGeometryTable(std::string_view csv, const std::string& name);

/// The same from a file.
Result<GeometryTable> readGeometryTable(const std::string& path);

/// The table as CSV, all seven columns, lengths in m with full precision.
std::string geometryCsv(const GeometryTable& table);

/// What the records' headers say, as a table: one row for each trace.
GeometryTable geometryOf(const std::vector<const ShotRecord*>& records);

/// A record with a table's positions put over its own, and what that changed.
struct GeometryApplied {
  ShotRecord record;
  bool matched = false;              ///< at least one row was about this record
  std::vector<std::string> remarks;  ///< where table and header contradict each other, one sentence each
};

/// Puts the rows about this record over its headers, later rows over earlier ones. A row's file matches by the whole
/// name or by the last part of the path. A row with a trace speaks of a record that has that trace, so the shots of
/// one SEG-Y file are told apart by their traces.
GeometryApplied applyGeometry(const GeometryTable& table, const ShotRecord& record);

/// Rows that are about no trace of any record, one sentence for each file that they name.
std::vector<std::string> unusedRows(const GeometryTable& table, const std::vector<const ShotRecord*>& records);

}  // namespace strikeplate
