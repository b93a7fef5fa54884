#include "core/report/sheet.h"

#include <limits>

#include "core/report/sheet_parts.h"

namespace strikeplate {
namespace {

double shallowest(const Survey& survey, const Section& section) {
  double depth = std::numeric_limits<double>::infinity();
  for (const SectionInterface& interface : section.interfaces) {
    if (const auto along = depthAlongLine(survey, section, interface.layer)) {
      depth = std::min(depth, along->least.value);
    }
  }
  return depth;
}

std::string titleOf(const SurveyInfo& info) {
  if (!info.title.empty()) {
    return info.title;
  }
  return info.line.empty() ? "Seismic refraction line" : "Seismic refraction, line " + info.line;
}

void addStrongestDoubt(SheetContent& sheet, int all) {
  if (sheet.doubts.empty()) {
    return;
  }
  const SheetDoubt& strongest = sheet.doubts.front().doubts.front();
  sheet.strongestDoubt = strongest.says;
  sheet.strongestDoubtMore = strongest.restsOn;
  if (!strongest.settles.empty()) {
    sheet.strongestDoubtMore +=
        std::string(strongest.restsOn.empty() ? "" : " ") + "To settle it: " + strongest.settles;
  }
  if (all > 1) {
    sheet.strongestDoubtMore += " " + counted(all - 1, "other doubt stands", "other doubts stand") + " on page 2.";
  }
}

}  // namespace

SheetOptions sheetOptionsOf(const Survey& survey) {
  const SheetChoices& kept = survey.info.sheet;
  SheetOptions options;
  options.question = kept.question;
  options.answer = kept.answer;
  options.answerTo = kept.answerTo;
  options.signatory = kept.signatory;
  options.records = kept.records;
  options.tables = kept.tables;
  options.places = kept.places;
  return options;
}

SheetChoices sheetChoicesOf(const SheetOptions& options) {
  return {options.question, options.answer, options.answerTo, options.signatory,
          options.records,  options.tables, options.places};
}

std::string sheetDraft(const Survey& survey, const Interpretation& interpretation) {
  Survey metric;
  metric.geophones = survey.geophones;
  const SheetOptions none;
  return sheetAnswer(
      {metric, interpretation, none, SheetWords::of(metric, shallowest(metric, interpretation.section))});
}

bool answerIsOld(const Survey& survey, const Interpretation& interpretation, const SheetOptions& options) {
  return !options.answer.empty() && !options.answerTo.empty() &&
         options.answerTo != sheetDraft(survey, interpretation);
}

SheetContent sheetContent(const Survey& survey, const Interpretation& interpretation, const SheetOptions& options) {
  const SheetSource source{survey, interpretation, options,
                           SheetWords::of(survey, shallowest(survey, interpretation.section))};
  SheetContent sheet;
  sheet.title = titleOf(survey.info);
  sheet.head = sheetHead(source);
  for (const SheetField& field : sheet.head) {
    if (field.value == kNotGiven) {
      sheet.missing.push_back(field.label);
    }
  }
  sheet.answer = options.answer.empty() ? sheetAnswer(source) : options.answer;
  sheet.warnings = sheetWarnings(source);
  if (answerIsOld(survey, interpretation, options)) {
    sheet.warnings.insert(sheet.warnings.begin(), "The answer below was written before the interpretation changed. " +
                                                      sentence("The section now says: " + sheetAnswer(source)));
  }
  sheet.question = options.question.empty() ? sheetQuestion(source) : sentence(options.question);
  sheet.layers = sheetLayers(source);
  sheet.materials = sheetMaterials(source);
  sheet.boreholeMarks = sheetBoreholeMarks(source);
  sheet.boreholes = sheetBoreholes(source);
  sheet.opinions = sheetOpinions(source);
  sheet.reciprocals = sheetReciprocals(source);
  sheet.shots = sheetShots(source);
  sheet.noDoubts = noDoubts(interpretation.section);
  sheet.allDoubts = sheetDoubtTable(sheetDoubts(source), sheet.noDoubts);
  sheet.geophonePlaces = sheetGeophonePlaces(source);
  sheet.shotPlaces = sheetShotPlaces(source);
  sheet.doubts = sheetDoubts(source);
  addStrongestDoubt(sheet, static_cast<int>(interpretation.doubts.size()));
  sheet.triggers = sheetTriggers(source);
  sheet.picks = sheetPicks(source);
  sheet.fit = sheetFit(source);
  sheet.limitations = sheetLimitations(source);
  sheet.methods = sheetMethods(source);
  sheet.cautionShort = sheetCautionShort();
  sheet.cautions = sheetCautions();
  sheet.signatory = options.signatory;
  sheet.program = "Strikeplate " STRIKEPLATE_VERSION;
  sheet.builtOn = options.builtOn;
  sheet.files = sheetFiles(source);
  sheet.allFiles = sheetFileTable(sheet.files);
  sheet.blackAndWhite = options.blackAndWhite;
  sheet.tablePages = options.tables;
  sheet.recordPages = options.records;
  sheet.placePages = options.places;
  sheet.feet = survey.settings.feet;
  return sheet;
}

}  // namespace strikeplate
