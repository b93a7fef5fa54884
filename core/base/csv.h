#pragma once

#include <cstddef>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "core/base/result.h"

namespace strikeplate {

/// A table read from CSV: a header row and rows of as many cells.
///
/// Cells are texts as the file has them, without quotes. `lines[i]` is the line of the file (from 1) where row i
/// starts.
struct CsvTable {
  std::string name;  ///< the file as named by the user, for messages
  std::vector<std::string> columns;
  std::vector<std::vector<std::string>> rows;
  std::vector<int> lines;

  /// Number of the column with this name, whatever its case and the blanks around it.
  [[nodiscard]] std::optional<std::size_t> column(std::string_view header) const;

  /// The same, or one sentence that names the file, the column and the columns there are.
  [[nodiscard]] Result<std::size_t> neededColumn(std::string_view header) const;

  /// "line 7 of picks.csv", for messages.
  [[nodiscard]] std::string placeOf(std::size_t row) const;
};

/// Reads CSV: RFC 4180 (quotes, doubled quotes, line ends inside quotes), also with line feeds alone, a byte order
/// mark, semicolons or tabs instead of commas (whichever the header row has most of outside quotes), and empty lines,
/// which are passed over. Rows that are shorter than the header are filled with empty cells; further cells must be
/// empty. Fails, in one sentence with `name`, on an empty text, a text that is no text (zero bytes), a quote that
/// never ends, two columns of one name, and a row with more cells than the header.
Result<CsvTable> parseCsv(std::string_view text, const std::string& name);

/// Reads a CSV file; fails also when it cannot be opened, and above 256 MB.
Result<CsvTable> readCsv(const std::string& path);

/// One row of CSV with its line end (CR LF as RFC 4180 has it); cells are quoted where they must be.
std::string csvRow(const std::vector<std::string>& cells);

/// Header and rows as CSV. Needs rows as long as the header.
std::string csvText(const std::vector<std::string>& columns, const std::vector<std::vector<std::string>>& rows);

}  // namespace strikeplate
