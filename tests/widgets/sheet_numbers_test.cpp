// The numbers on paper are those of the tables and of the interpretation: read back from the PDF and compared.
#include <array>
#include <cmath>
#include <cstdio>
#include <memory>
#include <regex>
#include <sstream>

#include <QTableWidget>
#include <QTemporaryDir>
#include <gtest/gtest.h>

#include "core/report/csv_out.h"
#include "core/report/geojson_out.h"
#include "core/report/tables_xlsx.h"
#include "tests/core/report/sheet_sample.h"
#include "widgets/layer_table.h"
#include "widgets/sheet_painter.h"

namespace strikeplate {
namespace {

std::string outputOf(const std::string& command) {
  const std::unique_ptr<FILE, int (*)(FILE*)> pipe(::popen(command.c_str(), "r"), &::pclose);
  std::string text;
  std::array<char, 4096> buffer{};
  for (std::size_t n = 1; pipe && n > 0;) {
    n = std::fread(buffer.data(), 1, buffer.size(), pipe.get());
    text.append(buffer.data(), n);
  }
  return text;
}

// Words of both pages in the order of painting, with single blanks between them.
std::string textOfPdf(const testing::SheetSample& sample) {
  const QTemporaryDir folder;  // tests run side by side
  const std::string path = folder.filePath("sheet.pdf").toStdString();
  EXPECT_TRUE(writeSheetPdf(QString::fromStdString(path), sample.survey, sample.interpretation, {}).ok());
  return std::regex_replace(outputOf("pdftotext -raw '" + path + "' -"), std::regex("(\\s|\xC2\xA0)+"), " ");
}

std::vector<std::vector<std::string>> rowsOf(const std::string& csv) {
  std::vector<std::vector<std::string>> rows;
  std::istringstream lines(csv);
  for (std::string line; std::getline(lines, line);) {
    std::istringstream cells(line);
    rows.emplace_back();
    for (std::string cell; std::getline(cells, cell, ',');) {
      rows.back().push_back(cell);
    }
  }
  rows.erase(rows.begin());
  return rows;
}

// What one row of the layer table says: numbers in the user's unit.
struct PaperLayer {
  double velocity = 0.0, low = 0.0, high = 0.0;
  double least = 0.0, leastLow = 0.0, leastHigh = 0.0, leastAt = 0.0;
  double mean = 0.0, most = 0.0, mostAt = 0.0;
};

std::vector<PaperLayer> layersOnPaper(const std::string& text, const std::string& unit) {
  const std::string n = "(-?[0-9.]+)";
  const std::string depth = n + " " + unit + " \\(" + n + " to " + n + " " + unit + "\\)";
  const std::regex row("[2-6] " + n + " " + unit + "/s " + n + " to " + n + " " + unit + "/s " + depth + " at " + n +
                       " " + unit + " " + depth + " " + depth + " at " + n + " " + unit);
  std::vector<PaperLayer> layers;
  for (std::sregex_iterator m(text.begin(), text.end(), row), end; m != end; ++m) {
    const auto number = [&](std::size_t group) { return std::stod((*m)[group].str()); };
    layers.push_back({number(1), number(2), number(3), number(4), number(5), number(6), number(7), number(8),
                      number(11), number(14)});
  }
  return layers;
}

void compareWithTables(bool feet) {
  auto sample = testing::sheetSample();
  sample.survey.settings.feet = feet;
  const double metre = feet ? 1.0 / 0.3048 : 1.0;
  const std::vector<PaperLayer> paper = layersOnPaper(textOfPdf(sample), feet ? "ft" : "m");
  const auto layerRows = rowsOf(layersCsv(sample.interpretation));
  const auto depthRows = rowsOf(depthsCsv(sample.survey, sample.interpretation));
  ASSERT_EQ(paper.size(), 2U);
  for (std::size_t i = 0; i < paper.size(); ++i) {
    const std::vector<std::string>& row = layerRows[i + 1];  // the first layer has no depth
    // Velocities on paper are whole, and to 10 above 1000.
    EXPECT_NEAR(paper[i].velocity, std::stod(row[1]) * metre, 5.01);
    EXPECT_NEAR(paper[i].low, std::stod(row[3]) * metre, 5.01);
    EXPECT_NEAR(paper[i].high, std::stod(row[4]) * metre, 5.01);
    double least = 1e9, leastLow = 0.0, leastHigh = 0.0, leastAt = 0.0, most = 0.0, mostAt = 0.0, sum = 0.0;
    int count = 0;
    for (const auto& at : depthRows) {
      if (at[1] != row[0]) {
        continue;
      }
      const double depth = std::stod(at[2]);
      if (depth < least) {
        least = depth;
        leastLow = std::stod(at[4]);
        leastHigh = std::stod(at[5]);
        leastAt = std::stod(at[0]);
      }
      if (depth > most) {
        most = depth;
        mostAt = std::stod(at[0]);
      }
      sum += depth;
      ++count;
    }
    const double half = feet ? 0.0501 : 0.00501;  // one decimal of a foot, two of a metre
    EXPECT_NEAR(paper[i].least, least * metre, half);
    EXPECT_NEAR(paper[i].leastLow, leastLow * metre, half);
    EXPECT_NEAR(paper[i].leastHigh, leastHigh * metre, half);
    EXPECT_NEAR(paper[i].leastAt, leastAt * metre, 0.0501);
    EXPECT_NEAR(paper[i].mean, sum / count * metre, half);
    EXPECT_NEAR(paper[i].most, most * metre, half);
    EXPECT_NEAR(paper[i].mostAt, mostAt * metre, 0.0501);
    const Estimate& velocity = sample.interpretation.section.velocities[i + 1];
    EXPECT_NEAR(paper[i].velocity, velocity.value * metre, 5.01) << "and those of the interpretation";
    const Estimate there = sample.interpretation.section.depthAt(static_cast<int>(i) + 2, leastAt);
    EXPECT_NEAR(paper[i].least, there.value * metre, half);
  }
}

TEST(SheetNumbers, LayersOnPaperAreThoseOfTheTablesInMetres) {
  compareWithTables(false);
}

TEST(SheetNumbers, LayersOnPaperAreThoseOfTheTablesInFeet) {
  compareWithTables(true);
}

// Least, mean and most of the depths to the top of a layer, m.
struct Spread {
  double least = 1e9, sum = 0.0, most = -1e9;
  int count = 0;
  void take(double depth) {
    least = std::min(least, depth);
    most = std::max(most, depth);
    sum += depth;
    ++count;
  }
};

Spread spreadOf(const std::vector<std::vector<std::string>>& rows, const std::string& layer) {
  Spread spread;
  for (const auto& row : rows) {
    if (row[1] == layer) {
      spread.take(std::stod(row[2]));
    }
  }
  return spread;
}

// x, layer and depth of every geophone, by Python's own readers of zip, XML and JSON.
constexpr const char* kSpreadsheetDepths = R"(
import sys, zipfile, xml.etree.ElementTree as et
n = '{http://schemas.openxmlformats.org/spreadsheetml/2006/main}'
z = zipfile.ZipFile(sys.argv[1])
names = [s.get('name') for s in et.fromstring(z.read('xl/workbook.xml')).iter(n + 'sheet')]
sheet = et.fromstring(z.read('xl/worksheets/sheet%d.xml' % (names.index('depths') + 1)))
for row in list(sheet.iter(n + 'row'))[1:]:
    print(','.join(c.find(n + 'v').text for c in row))
)";
constexpr const char* kMapDepths = R"(
import json, sys
for f in json.load(open(sys.argv[1]))['features']:
    p = f['properties']
    for layer in (2, 3) if p['kind'] == 'geophone' else ():
        print(p['x_m'], layer, repr(p['layer_%d_depth_m' % layer]), sep=',')
)";

std::vector<std::vector<std::string>> rowsByScript(const char* script, const std::string& file) {
  const QTemporaryDir folder;
  const std::string path = folder.filePath("read.py").toStdString();
  EXPECT_TRUE(writeTextFile(path, script).ok());
  return rowsOf("header\n" + outputOf("python3 '" + path + "' '" + file + "'"));
}

double numberIn(const QString& words) {
  static const std::regex kNumber("-?[0-9]+(\\.[0-9]+)?");
  const std::string text = words.toStdString();
  std::smatch match;
  return std::regex_search(text, match, kNumber) ? std::stod(match[0].str()) : Estimate::kNaN;
}

TEST(SheetNumbers, PaperTableSpreadsheetMapAndScreenSayTheSame) {
  auto sample = testing::sheetSample();
  sample.survey.info.map = testing::sampleMap();
  const QTemporaryDir folder;
  const std::string xlsx = folder.filePath("tables.xlsx").toStdString();
  const std::string geojson = folder.filePath("line.geojson").toStdString();
  ASSERT_TRUE(writeTablesXlsx(xlsx, sample.survey, sample.interpretation).ok());
  ASSERT_TRUE(writeTextFile(geojson, geoJson(sample.survey, sample.interpretation).value()).ok());
  const std::vector<PaperLayer> paper = layersOnPaper(textOfPdf(sample), "m");
  const auto csv = rowsOf(depthsCsv(sample.survey, sample.interpretation));
  const auto spreadsheet = rowsByScript(kSpreadsheetDepths, xlsx);
  const auto map = rowsByScript(kMapDepths, geojson);
  ASSERT_EQ(csv.size(), 48U * 2U);
  ASSERT_EQ(spreadsheet.size(), csv.size());
  ASSERT_EQ(map.size(), csv.size());
  for (std::size_t i = 0; i < csv.size(); ++i) {
    for (const std::size_t column : {0U, 1U, 2U}) {
      EXPECT_NEAR(std::stod(spreadsheet[i][column]), std::stod(csv[i][column]), 1e-12);
      EXPECT_EQ(std::stod(map[i][column]), std::stod(csv[i][column]));
    }
  }
  LayerTable screen;
  screen.showScene({std::make_shared<Survey>(sample.survey),
                    std::make_shared<Interpretation>(sample.interpretation),
                    std::make_shared<std::vector<Gather>>(),
                    {}});
  const auto* table = screen.findChild<QTableWidget*>();
  ASSERT_EQ(table->rowCount(), 3);
  ASSERT_EQ(paper.size(), 2U);
  constexpr double kPaper = 0.00501, kScreen = 0.0501;  // half of the last digit shown
  for (int layer = 2; layer <= 3; ++layer) {
    const PaperLayer& on = paper[static_cast<std::size_t>(layer) - 2];
    const Spread all = spreadOf(csv, std::to_string(layer));
    const double mean = all.sum / all.count;
    EXPECT_NEAR(on.least, all.least, kPaper);
    EXPECT_NEAR(on.mean, mean, kPaper);
    EXPECT_NEAR(on.most, all.most, kPaper);
    EXPECT_NEAR(numberIn(table->item(layer - 1, 1)->text()), on.velocity, 5.01);
    EXPECT_NEAR(numberIn(table->item(layer - 1, 2)->text()), all.least, kScreen);
    EXPECT_NEAR(numberIn(table->item(layer - 1, 3)->text()), mean, kScreen);
    EXPECT_NEAR(numberIn(table->item(layer - 1, 4)->text()), all.most, kScreen);
  }
}

TEST(SheetNumbers, ReciprocalTimesAndTriggerDelaysOnPaperAreThoseOfTheInterpretation) {
  auto sample = testing::sheetSample();
  auto& delays = sample.interpretation.section.triggerDelays;
  delays.assign(7, Estimate::none("not solved for"));
  delays[4] = Estimate::normal(-0.00312, 0.0002);
  const std::string text = textOfPdf(sample);
  const std::regex row("([0-9]+) and ([0-9]+) ([0-9.]+) ms ([0-9.]+) ms (-?[0-9.]+) ms ([0-9.]+) ms (yes|no)");
  int found = 0;
  for (std::sregex_iterator m(text.begin(), text.end(), row), end; m != end; ++m) {
    const int a = std::stoi((*m)[1].str()) - 1;
    const int b = std::stoi((*m)[2].str()) - 1;
    for (const ReciprocalPair& pair : sample.interpretation.reciprocals) {
      if (pair.shotA == a && pair.shotB == b) {
        EXPECT_NEAR(std::stod((*m)[3].str()), 1e3 * pair.timeAB, 0.0501);
        EXPECT_NEAR(std::stod((*m)[4].str()), 1e3 * pair.timeBA, 0.0501);
        EXPECT_NEAR(std::stod((*m)[5].str()), 1e3 * pair.difference(), 0.00501);
        ++found;
      }
    }
  }
  EXPECT_GE(found, 4);
  EXPECT_NE(text.find(": -3.12 ms (-3.51 ms to -2.73 ms)"), std::string::npos) << text;
}

}  // namespace
}  // namespace strikeplate
