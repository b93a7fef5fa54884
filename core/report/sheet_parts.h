#pragma once

#include <optional>
#include <vector>

#include "core/report/sheet.h"
#include "core/report/sheet_words.h"

namespace strikeplate {

/// What the parts of the sheet are written from.
struct SheetSource {
  const Survey& survey;
  const Interpretation& interpretation;
  const SheetOptions& options;
  SheetWords words;
};

/// Depth to one interface along the geophones, m.
struct DepthAlongLine {
  int layer = 2;
  int determined = 0;   ///< geophones with a depth
  double leastX = 0.0;  ///< m, where it is least
  double mostX = 0.0;   ///< m, where it is most
  Estimate least, mean, most;
  double low95 = 0.0;   ///< m, lowest bound of all geophones
  double high95 = 0.0;  ///< m, highest bound of all geophones
};

/// Nothing when the interface has no depth under any geophone. The interval of the mean is the mean of the intervals:
/// neighbouring depths err together, and the section does not say how far, so nothing is gained by averaging.
std::optional<DepthAlongLine> depthAlongLine(const Survey& survey, const Section& section, int layer);

std::vector<SheetField> sheetHead(const SheetSource& source);
std::string sheetAnswer(const SheetSource& source);
SheetTable sheetLayers(const SheetSource& source);
/// Published materials for the layers' velocities, marked as a hint; empty without a section.
std::string sheetMaterials(const SheetSource& source);
std::vector<std::string> sheetBoreholeMarks(const SheetSource& source);
SheetTable sheetBoreholes(const SheetSource& source);
SheetTable sheetOpinions(const SheetSource& source);
SheetTable sheetReciprocals(const SheetSource& source);
SheetTable sheetShots(const SheetSource& source);
SheetTable sheetGeophonePlaces(const SheetSource& source);
SheetTable sheetShotPlaces(const SheetSource& source);
std::vector<SheetDoubtKind> sheetDoubts(const SheetSource& source);
std::vector<std::string> sheetWarnings(const SheetSource& source);
std::string sheetQuestion(const SheetSource& source);
std::vector<std::string> sheetPicks(const SheetSource& source);
std::vector<std::string> sheetTriggers(const SheetSource& source);
std::vector<std::string> sheetFit(const SheetSource& source);
std::vector<std::string> sheetLimitations(const SheetSource& source);
std::vector<std::string> sheetMethods(const SheetSource& source);
std::vector<std::string> sheetReach(const SheetSource& source);
std::vector<SheetFile> sheetFiles(const SheetSource& source);
/// Every one of them, a row each.
SheetTable sheetFileTable(const std::vector<SheetFile>& files);
SheetTable sheetDoubtTable(const std::vector<SheetDoubtKind>& kinds, const std::string& none);

/// What stands in the place of doubts when there are none: without a section that is no praise.
std::string noDoubts(const Section& section);

std::string sheetCautionShort();
std::vector<std::string> sheetCautions();

}  // namespace strikeplate
