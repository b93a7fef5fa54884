#include "core/report/tables_xlsx.h"

#include <algorithm>
#include <filesystem>
#include <vector>

#include <xlsxwriter.h>

#include "core/base/csv.h"
#include "core/base/numbers.h"
#include "core/report/csv_out.h"

namespace strikeplate {
namespace {

constexpr std::size_t kLongestCell = 32767;  // characters that a cell may hold, by the file format
constexpr double kWidest = 60.0;             // characters

// Columns of words; what stands in any other is a number.
bool isWords(const std::string& column) {
  static const std::vector<std::string> kWords = {"file", "origin",   "route",       "assumes",
                                                  "kind", "borehole", "in_section",  "where",
                                                  "says", "rests_on", "would_settle"};
  return std::find(kWords.begin(), kWords.end(), column) != kWords.end();
}

// A cell of words is cut where the format ends, at the start of a character.
std::string fitting(std::string text) {
  if (text.size() > kLongestCell) {
    std::size_t end = kLongestCell;
    while (end > 0 && (static_cast<unsigned char>(text[end]) & 0xC0U) == 0x80U) {
      --end;
    }
    text.resize(end);
  }
  return text;
}

void addTable(lxw_workbook* book, lxw_format* header, const char* name, const std::string& csv) {
  const CsvTable table = parseCsv(csv, name).value();
  lxw_worksheet* sheet = workbook_add_worksheet(book, name);
  worksheet_freeze_panes(sheet, 1, 0);
  for (std::size_t c = 0; c < table.columns.size(); ++c) {
    const auto column = static_cast<lxw_col_t>(c);
    std::size_t longest = table.columns[c].size();
    worksheet_write_string(sheet, 0, column, table.columns[c].c_str(), header);
    for (std::size_t r = 0; r < table.rows.size(); ++r) {
      const std::string& cell = table.rows[r][c];
      const auto row = static_cast<lxw_row_t>(r + 1);
      const auto number = isWords(table.columns[c]) ? std::nullopt : parseNumber(cell);
      if (number) {
        worksheet_write_number(sheet, row, column, *number, nullptr);
      } else if (!cell.empty()) {
        worksheet_write_string(sheet, row, column, fitting(cell).c_str(), nullptr);
        longest = std::max(longest, cell.size());
      }
    }
    worksheet_set_column(sheet, column, column, std::min(kWidest, 2.0 + static_cast<double>(longest)), nullptr);
  }
}

}  // namespace

Outcome writeTablesXlsx(const std::string& path, const Survey& survey, const Interpretation& interpretation) {
  const std::string part = path + ".part";
  lxw_workbook* book = workbook_new(part.c_str());
  if (book == nullptr) {
    return Failure{path + " could not be written: there is not enough memory."};
  }
  lxw_format* header = workbook_add_format(book);
  format_set_bold(header);
  addTable(book, header, "picks", picksCsv(survey, interpretation));
  addTable(book, header, "depths", depthsCsv(survey, interpretation));
  addTable(book, header, "layers", layersCsv(interpretation));
  addTable(book, header, "opinions", opinionsCsv(interpretation));
  addTable(book, header, "doubts", doubtsCsv(interpretation));
  addTable(book, header, "boreholes", boreholesCsv(survey, interpretation));
  std::error_code error;
  const bool closed = workbook_close(book) == LXW_NO_ERROR;
  if (closed) {
    std::filesystem::rename(part, path, error);
  }
  if (!closed || error) {
    std::filesystem::remove(part, error);
    return Failure{path + " could not be written; check its folder, your right to write there, and the room left."};
  }
  return Done{};
}

}  // namespace strikeplate
