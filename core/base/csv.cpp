#include "core/base/csv.h"

#include <algorithm>
#include <array>
#include <cassert>
#include <fstream>
#include <iterator>
#include <utility>

#include "core/base/numbers.h"

namespace strikeplate {
namespace {

constexpr std::string_view kByteOrderMark = "\xEF\xBB\xBF";

// The separator that stands most often in the first line, outside quotes; the comma when there is none.
char separatorOf(std::string_view text) {
  constexpr std::array<char, 3> kSeparators = {',', ';', '\t'};
  std::array<int, 3> counts{};
  bool quoted = false;
  for (const char c : text) {
    quoted = quoted != (c == '"');
    if (!quoted && (c == '\n' || c == '\r')) {
      break;
    }
    for (std::size_t s = 0; s < kSeparators.size(); ++s) {
      counts[s] += !quoted && c == kSeparators[s] ? 1 : 0;
    }
  }
  const auto most = std::max_element(counts.begin(), counts.end());
  return *most == 0 ? ',' : kSeparators[static_cast<std::size_t>(most - counts.begin())];
}

class CsvReader {
 public:
  CsvReader(std::string_view text, char separator) : text_(text), separator_(separator) {}

  // The next row that is not empty; false at the end.
  bool next(std::vector<std::string>& cells) {
    while (at_ < text_.size()) {
      rowLine_ = line_;
      readRow(cells);
      const bool empty =
          std::all_of(cells.begin(), cells.end(), [](const std::string& cell) { return trimmed(cell).empty(); });
      if (!empty) {
        return true;
      }
    }
    return false;
  }

  [[nodiscard]] int line() const { return rowLine_; }
  [[nodiscard]] bool brokenQuote() const { return brokenQuote_; }

 private:
  void readRow(std::vector<std::string>& cells) {
    cells.clear();
    do {
      cells.push_back(readCell());
    } while (at_ < text_.size() && text_[at_++] == separator_);
    // What stopped the row was a line end, of which a carriage return may have a line feed behind it.
    if (at_ > 0 && at_ < text_.size() && text_[at_ - 1] == '\r' && text_[at_] == '\n') {
      ++at_;
    }
    ++line_;
  }

  std::string readCell() {
    if (at_ < text_.size() && text_[at_] == '"') {
      return readQuoted();
    }
    const std::size_t from = at_;
    while (at_ < text_.size() && text_[at_] != separator_ && text_[at_] != '\n' && text_[at_] != '\r') {
      ++at_;
    }
    return std::string(text_.substr(from, at_ - from));
  }

  std::string readQuoted() {
    std::string cell;
    for (++at_; at_ < text_.size(); ++at_) {
      if (text_[at_] != '"') {
        line_ += text_[at_] == '\n' ? 1 : 0;
        cell += text_[at_];
      } else if (at_ + 1 < text_.size() && text_[at_ + 1] == '"') {
        cell += '"';
        ++at_;
      } else {
        ++at_;
        // What stands between the closing quote and the separator belongs to the cell, as written.
        while (at_ < text_.size() && text_[at_] != separator_ && text_[at_] != '\n' && text_[at_] != '\r') {
          cell += text_[at_++];
        }
        return cell;
      }
    }
    brokenQuote_ = true;
    return cell;
  }

  std::string_view text_;
  char separator_;
  std::size_t at_ = 0;
  int line_ = 1;
  int rowLine_ = 1;
  bool brokenQuote_ = false;
};

std::string listOfColumns(const std::vector<std::string>& columns) {
  std::string text;
  for (const std::string& column : columns) {
    text += (text.empty() ? "" : ", ") + column;
  }
  return text;
}

std::optional<Failure> twiceNamed(const CsvTable& table) {
  for (std::size_t i = 0; i < table.columns.size(); ++i) {
    for (std::size_t j = i + 1; j < table.columns.size(); ++j) {
      if (!table.columns[i].empty() && lowered(table.columns[i]) == lowered(table.columns[j])) {
        return Failure{table.name + " has two columns named " + table.columns[i] + "; take one out."};
      }
    }
  }
  return std::nullopt;
}

}  // namespace

std::optional<std::size_t> CsvTable::column(std::string_view header) const {
  const std::string wanted = lowered(trimmed(header));
  for (std::size_t i = 0; i < columns.size(); ++i) {
    if (lowered(columns[i]) == wanted) {
      return i;
    }
  }
  return std::nullopt;
}

Result<std::size_t> CsvTable::neededColumn(std::string_view header) const {
  if (const auto found = column(header)) {
    return *found;
  }
  return Failure{name + " has no column " + std::string(header) + "; its columns are " + listOfColumns(columns) +
                 "."};
}

std::string CsvTable::placeOf(std::size_t row) const {
  return "line " + std::to_string(lines[row]) + " of " + name;
}

Result<CsvTable> parseCsv(std::string_view text, const std::string& name) {
  while (text.starts_with(kByteOrderMark)) {  // joined files have several
    text.remove_prefix(kByteOrderMark.size());
  }
  if (text.find('\0') != std::string_view::npos) {
    return Failure{name + " is not a text file; export the table as CSV (comma separated values)."};
  }
  CsvTable table;
  table.name = name;
  const std::size_t start = std::min(text.find_first_not_of("\r\n"), text.size());
  CsvReader reader(text, separatorOf(text.substr(start)));
  if (!reader.next(table.columns)) {
    return Failure{name + " is empty; a table with a header row is needed."};
  }
  for (std::string& column : table.columns) {
    column = std::string(trimmed(column));
  }
  while (!table.columns.empty() && table.columns.back().empty()) {
    table.columns.pop_back();
  }
  if (auto twice = twiceNamed(table)) {
    return *twice;
  }
  std::vector<std::string> cells;
  while (reader.next(cells)) {
    const bool fits =
        std::all_of(cells.begin() + static_cast<std::ptrdiff_t>(std::min(cells.size(), table.columns.size())),
                    cells.end(), [](const std::string& cell) { return trimmed(cell).empty(); });
    if (!fits && !reader.brokenQuote()) {
      return Failure{"Line " + std::to_string(reader.line()) + " of " + name + " has " +
                     std::to_string(cells.size()) + " cells but there are " + std::to_string(table.columns.size()) +
                     " columns; numbers need a decimal point, and texts with a separator in them need quotes."};
    }
    cells.resize(table.columns.size());
    table.rows.push_back(cells);
    table.lines.push_back(reader.line());
  }
  if (reader.brokenQuote()) {
    return Failure{"A quote in line " + std::to_string(reader.line()) + " of " + name + " never ends; put it right."};
  }
  return table;
}

Result<CsvTable> readCsv(const std::string& path) {
  std::ifstream file(path, std::ios::binary);
  if (!file) {
    return Failure{path + " cannot be opened; check its name, its folder and your right to read it."};
  }
  constexpr std::size_t kMost = 256u << 20;
  std::string text;
  std::array<char, 65536> buffer{};
  while (file.read(buffer.data(), buffer.size()) || file.gcount() > 0) {
    text.append(buffer.data(), static_cast<std::size_t>(file.gcount()));
    if (text.size() > kMost) {
      return Failure{path + " is larger than 256 MB, too large for a table; check that it is the right file."};
    }
  }
  if (file.bad() || (text.empty() && !file.eof())) {
    return Failure{path + " cannot be read (is it a folder?); name a CSV file."};
  }
  return parseCsv(text, path);
}

std::string csvRow(const std::vector<std::string>& cells) {
  std::string row;
  for (std::size_t i = 0; i < cells.size(); ++i) {
    row += i > 0 ? "," : "";
    if (cells[i].find_first_of(",;\t\"\r\n") == std::string::npos && !cells[i].starts_with(kByteOrderMark)) {
      row += cells[i];
      continue;
    }
    row += '"';
    for (const char c : cells[i]) {
      row += c == '"' ? "\"\"" : std::string(1, c);
    }
    row += '"';
  }
  return row + "\r\n";
}

std::string csvText(const std::vector<std::string>& columns, const std::vector<std::vector<std::string>>& rows) {
  std::string text = csvRow(columns);
  for (const auto& row : rows) {
    assert(row.size() == columns.size());
    text += csvRow(row);
  }
  return text;
}

}  // namespace strikeplate
