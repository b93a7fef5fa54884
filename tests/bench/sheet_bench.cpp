// The sheet of a line of 31 shots and 96 geophones as PDF: words, plots, file. Wanted: under 2 s for the two pages.
#include <QApplication>
#include <QTemporaryDir>
#include <benchmark/benchmark.h>

#include "tests/core/report/sheet_sample.h"
#include "widgets/sheet_painter.h"

namespace {

using namespace strikeplate;

void write(benchmark::State& state, bool furtherPages) {
  const auto sample = testing::sheetSample({96, 31, 4, 6});
  SheetOptions options;
  options.records = options.tables = options.places = furtherPages;
  const QTemporaryDir folder;
  const QString path = folder.filePath("sheet.pdf");
  for (auto _ : state) {
    if (!writeSheetPdf(path, sample.survey, sample.interpretation, options)) {
      state.SkipWithError("The sheet could not be written.");
    }
  }
}

}  // namespace

int main(int argc, char** argv) {
  qputenv("QT_QPA_PLATFORM", "offscreen");
  const QApplication application(argc, argv);
  benchmark::RegisterBenchmark("two pages", write, false)->Unit(benchmark::kMillisecond);
  benchmark::RegisterBenchmark("with records, tables and places", write, true)->Unit(benchmark::kMillisecond);
  benchmark::Initialize(&argc, argv);
  benchmark::RunSpecifiedBenchmarks();
  return 0;
}
