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

}  // namespace

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
  if (!interpretation.doubts.empty()) {
    sheet.strongestDoubt = sentence(interpretation.doubts.front().says);
  }
  sheet.layers = sheetLayers(source);
  sheet.boreholes = sheetBoreholes(source);
  sheet.opinions = sheetOpinions(source);
  sheet.reciprocals = sheetReciprocals(source);
  sheet.shots = sheetShots(source);
  sheet.doubts = sheetDoubts(source);
  sheet.picks = sheetPicks(source);
  sheet.fit = sheetFit(source);
  sheet.limitations = sheetLimitations(source);
  sheet.methods = sheetMethods(source);
  sheet.cautionShort = sheetCautionShort();
  sheet.cautions = sheetCautions();
  sheet.signatory = options.signatory;
  sheet.program = "Strikeplate " STRIKEPLATE_VERSION;
  sheet.files = sheetFiles(source);
  sheet.feet = survey.settings.feet;
  return sheet;
}

}  // namespace strikeplate
