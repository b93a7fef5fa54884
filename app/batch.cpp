#include "app/batch.h"

#include <functional>
#include <string>
#include <utility>

#include <QFileInfo>
#include <QString>

#include "app/versions.h"
#include "core/base/units.h"
#include "core/report/csv_out.h"
#include "core/report/geojson_out.h"
#include "core/report/section_dxf.h"
#include "core/report/tables_xlsx.h"
#include "core/survey/autopick.h"
#include "core/survey/gathers.h"
#include "core/survey/interpretation.h"
#include "core/survey/load.h"
#include "core/survey/picks_in.h"
#include "core/survey/survey_file.h"
#include "widgets/sheet_figure.h"
#include "widgets/sheet_painter.h"

namespace strikeplate {
namespace {

/// The run in the making: what was read, and whether all of it and all that was asked for worked.
class Run {
 public:
  Run(const BatchOptions& options, std::ostream& errors) : options_(options), errors_(errors) {}

  bool load() {
    LoadedLine line = loadLine(options_.records, options_.geometry);
    for (const std::string& problem : line.problems) {
      complain(problem);
    }
    survey_ = std::move(line.survey);
    start_ = survey_;
    return line.filesRead > 0 && !survey_.shots.empty();
  }

  void pick() {
    if (!options_.picksIn.empty()) {
      auto imported = importPicks(survey_, options_.picksIn);
      if (imported) {
        if (!imported->edit.changes.empty()) {
          imported->edit.changes.push_back(edits::noteTable(survey_, options_.picksIn));
        }
        carryOut(imported->edit);
        for (const std::string& problem : imported->problems) {
          complain(problem);
        }
      } else {
        complain(imported.message());
      }
    }
    if (!hasPicks()) {
      carryOut(pickAutomatically(survey_, gathersOf(survey_), {}));
    }
    if (options_.layers > 0) {
      SurveySettings settings = survey_.settings;
      settings.layers = options_.layers;
      carryOut(edits::setSettings(survey_, settings, "Set the number of layers"));
    }
    if (options_.feet && !survey_.settings.feet) {
      SurveySettings settings = survey_.settings;
      settings.feet = true;
      carryOut(edits::setSettings(survey_, settings, "Show lengths in feet"));
    }
  }

  void write() {
    interpretation_ = interpret(survey_);
    writeTable(options_.picks, [&] { return picksCsv(survey_, interpretation_); });
    writeTable(options_.depths, [&] { return depthsCsv(survey_, interpretation_); });
    writeTable(options_.layersOut, [&] { return layersCsv(interpretation_); });
    writeTable(options_.opinions, [&] { return opinionsCsv(interpretation_); });
    writeTable(options_.doubts, [&] { return doubtsCsv(interpretation_); });
    writeTo(options_.sectionDxf,
            [&](const std::string& path) { return writeSectionDxf(path, survey_, interpretation_); });
    writeTo(options_.sheet, [&](const std::string& path) {
      return writeSheetPdf(QString::fromStdString(path), survey_, interpretation_, sheetOptions(),
                           options_.letter ? QPageSize::Letter : QPageSize::A4);
    });
    writeTo(options_.xlsx, [&](const std::string& path) { return writeTablesXlsx(path, survey_, interpretation_); });
    writeTo(options_.geojson, [&](const std::string& path) -> Outcome {
      const auto text = geoJson(survey_, interpretation_);
      return text ? writeTextFile(path, *text) : Outcome(text.failure());
    });
    writeTo(options_.svg, [&](const std::string& path) { return writePlots(QString::fromStdString(path)); });
    writeTo(options_.survey, [&](const std::string& path) { return writeSurvey(path); });
  }

  [[nodiscard]] std::string summary() const {
    const Section& section = interpretation_.section;
    if (!section.determined) {
      return "No depth is determined: " + section.reason;
    }
    return answerLine(survey_, interpretation_, survey_.geophones[survey_.geophones.size() / 2].x);
  }

  [[nodiscard]] bool complained() const { return complained_; }

 private:
  void complain(const std::string& sentence) {
    errors_ << "strikeplate-batch: " << sentence << "\n";
    complained_ = true;
  }

  [[nodiscard]] bool hasPicks() const {
    for (const Shot& shot : survey_.shots) {
      for (const ShotTrace& trace : shot.traces) {
        if (trace.pick) {
          return true;
        }
      }
    }
    return false;
  }

  void carryOut(const Edit& edit) {
    if (!edit.changes.empty()) {
      survey_ = applied(survey_, edit);
      edits_.push_back(edit);
    }
  }

  void writeTo(const std::string& path, const std::function<Outcome(const std::string&)>& writer) {
    if (path.empty()) {
      return;
    }
    if (const Outcome outcome = writer(path); !outcome) {
      complain(outcome.message());
    }
  }

  void writeTable(const std::string& path, const std::function<std::string()>& table) {
    writeTo(path, [&table](const std::string& file) { return writeTextFile(file, table()); });
  }

  [[nodiscard]] SheetOptions sheetOptions() const {
    SheetOptions sheet = sheetOptionsOf(survey_);
    sheet.edits = static_cast<int>(edits_.size());
    sheet.builtOn = libraryVersions();
    sheet.blackAndWhite = options_.blackAndWhite;
    sheet.records = sheet.records || options_.recordPages;
    sheet.tables = sheet.tables || options_.tablePages;
    return sheet;
  }

  // The section under the name given, the other plots beside it.
  Outcome writePlots(const QString& path) {
    const QFileInfo named(path);
    const QString stem = named.path() + "/" + named.completeBaseName();
    const QString ending = "." + named.suffix();
    std::vector<std::pair<SheetFigure::Kind, QString>> plots = {
        {SheetFigure::Kind::Section, path}, {SheetFigure::Kind::TravelTimes, stem + "-travel-times" + ending}};
    if (interpretation_.section.determined) {
      plots.emplace_back(SheetFigure::Kind::Residuals, stem + "-residuals" + ending);
    }
    for (const auto& [kind, file] : plots) {
      SheetFigure figure;
      figure.kind = kind;
      if (Outcome written = writeSheetFigure(file, figure, survey_, interpretation_, sheetOptions()); !written) {
        return written;
      }
    }
    return Done{};
  }

  Outcome writeSurvey(const std::string& path) {
    auto file = SurveyFile::create(path, start_);
    if (!file) {
      return file.failure();
    }
    for (const Edit& edit : edits_) {
      if (const Outcome outcome = file->append(edit); !outcome) {
        return outcome;
      }
    }
    return Done{};
  }

  const BatchOptions& options_;
  std::ostream& errors_;
  Survey start_, survey_;
  std::vector<Edit> edits_;
  Interpretation interpretation_;
  bool complained_ = false;
};

}  // namespace

BatchStatus runBatch(const BatchOptions& options, std::ostream& out, std::ostream& errors) {
  Run run(options, errors);
  if (!run.load()) {
    errors << "strikeplate-batch: None of the files could be used; nothing was written.\n";
    return BatchStatus::NothingRead;
  }
  run.pick();
  run.write();
  out << run.summary() << "\n";
  return run.complained() ? BatchStatus::PartUnusable : BatchStatus::Done;
}

}  // namespace strikeplate
