// The spreadsheet read back by another reader (Python's own zip and XML) holds what the CSV tables hold.
#include "core/report/tables_xlsx.h"

#include <array>
#include <cmath>
#include <cstdio>
#include <filesystem>
#include <fstream>
#include <memory>

#include <gtest/gtest.h>

#include "core/base/csv.h"
#include "core/base/numbers.h"
#include "core/report/csv_out.h"
#include "tests/core/report/sheet_sample.h"

namespace strikeplate {
namespace {

// Prints every cell of one worksheet as: row, tab, column, tab, n or s for number or words, tab, value.
constexpr const char* kReader = R"(
import sys, re, zipfile, xml.etree.ElementTree as et
n = '{http://schemas.openxmlformats.org/spreadsheetml/2006/main}'
z = zipfile.ZipFile(sys.argv[1])
shared = [''.join(t.text or '' for t in s.iter(n + 't')) for s in et.fromstring(z.read('xl/sharedStrings.xml'))]
names = [s.get('name') for s in et.fromstring(z.read('xl/workbook.xml')).iter(n + 'sheet')]
sheet = et.fromstring(z.read('xl/worksheets/sheet%d.xml' % (names.index(sys.argv[2]) + 1)))
for c in sheet.iter(n + 'c'):
    letters, row = re.match('([A-Z]+)([0-9]+)', c.get('r')).groups()
    v = c.find(n + 'v').text
    words = c.get('t') == 's'
    print(row, ord(letters) - 65, 's' if words else 'n', shared[int(v)] if words else v, sep='\t')
)";

class TablesXlsx : public ::testing::Test {
 protected:
  void TearDown() override {
    std::filesystem::remove(path_);
    std::filesystem::remove(script_);
  }

  std::vector<std::vector<std::string>> cellsOf(const std::string& sheet) {
    std::ofstream(script_) << kReader;
    const std::string command = "python3 '" + script_ + "' '" + path_ + "' " + sheet;
    const std::unique_ptr<FILE, int (*)(FILE*)> pipe(::popen(command.c_str(), "r"), &::pclose);
    std::string text = "row\tcolumn\tkind\tvalue\n";
    std::array<char, 4096> buffer{};
    for (std::size_t n = 1; pipe && n > 0;) {
      n = std::fread(buffer.data(), 1, buffer.size(), pipe.get());
      text.append(buffer.data(), n);
    }
    return parseCsv(text, sheet).value().rows;
  }

  void compare(const std::string& sheet, const std::string& csv) {
    const CsvTable table = parseCsv(csv, sheet).value();
    std::size_t full = 0;
    for (const auto& row : table.rows) {
      full +=
          static_cast<std::size_t>(std::count_if(row.begin(), row.end(), [](const auto& c) { return !c.empty(); }));
    }
    const auto cells = cellsOf(sheet);
    EXPECT_EQ(cells.size(), full + table.columns.size()) << sheet << ": an empty cell stays empty";
    for (const auto& cell : cells) {
      const std::size_t row = std::stoul(cell[0]), column = std::stoul(cell[1]);
      const std::string& expected = row == 1 ? table.columns[column] : table.rows[row - 2][column];
      const auto number = parseNumber(expected);
      if (cell[2] == "n") {
        // The library writes 16 digits, one less than every double needs.
        ASSERT_TRUE(number) << expected;
        EXPECT_NEAR(parseNumber(cell[3]).value_or(1e99), *number, 1e-14 * std::abs(*number)) << sheet;
      } else {
        EXPECT_EQ(cell[3], expected) << sheet;
      }
    }
  }

  // Tests run side by side, each with files of its own.
  static std::string pathOf(const std::string& ending) {
    const std::string test = ::testing::UnitTest::GetInstance()->current_test_info()->name();
    return (std::filesystem::path(::testing::TempDir()) / (test + ending)).string();
  }

  const testing::SheetSample sample_ = testing::sheetSample();
  const std::string path_ = pathOf(" tables.xlsx");
  const std::string script_ = pathOf(".py");
};

TEST_F(TablesXlsx, EveryTableIsThatOfTheCsvFile) {
  ASSERT_TRUE(writeTablesXlsx(path_, sample_.survey, sample_.interpretation).ok());
  compare("picks", picksCsv(sample_.survey, sample_.interpretation));
  compare("depths", depthsCsv(sample_.survey, sample_.interpretation));
  compare("layers", layersCsv(sample_.interpretation));
  compare("opinions", opinionsCsv(sample_.interpretation));
  compare("doubts", doubtsCsv(sample_.interpretation));
  compare("boreholes", boreholesCsv(sample_.survey, sample_.interpretation));
}

TEST_F(TablesXlsx, NumbersAreNumbersAndWordsAreWords) {
  ASSERT_TRUE(writeTablesXlsx(path_, sample_.survey, sample_.interpretation).ok());
  for (const auto& cell : cellsOf("layers")) {
    EXPECT_EQ(cell[2], cell[0] == "1" ? "s" : "n");
  }
}

TEST_F(TablesXlsx, WordsThatLookLikeAFormulaStayWords) {
  auto sample = testing::sheetSample();
  sample.interpretation.doubts[0].says = "=1+1";
  ASSERT_TRUE(writeTablesXlsx(path_, sample.survey, sample.interpretation).ok());
  bool found = false;
  for (const auto& cell : cellsOf("doubts")) {
    found = found || (cell[3] == "=1+1" && cell[2] == "s");
  }
  EXPECT_TRUE(found);
}

TEST_F(TablesXlsx, AnEmptySurveyHasHeadersAlone) {
  const auto sample = testing::emptySheetSample();
  ASSERT_TRUE(writeTablesXlsx(path_, sample.survey, sample.interpretation).ok());
  EXPECT_EQ(cellsOf("picks").size(), 9U);
}

TEST_F(TablesXlsx, AFolderThatDoesNotExistIsOneSentence) {
  const Outcome outcome = writeTablesXlsx("/no/such/folder/tables.xlsx", sample_.survey, sample_.interpretation);
  ASSERT_FALSE(outcome.ok());
  EXPECT_TRUE(outcome.message().starts_with("/no/such/folder/tables.xlsx could not be written"));
}

}  // namespace
}  // namespace strikeplate
