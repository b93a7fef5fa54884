// Where everything stood: the optional page for whoever wants to check the geometry or set the line out again.
#include "core/base/file_names.h"
#include "core/base/numbers.h"
#include "core/base/units.h"
#include "core/report/sheet_parts.h"

namespace strikeplate {
namespace {

constexpr int kDecimals = 2;  // a tape is read to the centimetre
constexpr const char* kMapNote = "Longitude and latitude: WGS 84, straight through the line's two given points.";

std::string recordsOf(const Survey& survey, const Shot& shot) {
  std::string names;
  for (const Blow& blow : shot.blows) {
    const ShotRecord& record = *survey.records[static_cast<std::size_t>(blow.record)];
    names += (names.empty() ? "" : ", ") + lastPart(record.file) + (blow.used ? "" : " (not used)");
  }
  return names.empty() ? "none" : names;
}

// Columns and cells of a place on the map: 6 decimals of a degree are a decimetre.
void addMapColumns(SheetTable& table) {
  table.columns.insert(table.columns.end(), {"Longitude (°)", "Latitude (°)"});
}

void addMapCells(const LineOnMap& map, double x, std::vector<std::string>& row) {
  const MapPoint place = placeAt(map, x);
  row.insert(row.end(), {fixed(place.longitude, 6), fixed(place.latitude, 6)});
}

}  // namespace

SheetTable sheetGeophonePlaces(const SheetSource& source) {
  const Units& units = source.words.units;
  const std::string unit = " (" + units.lengthUnit() + ")";
  SheetTable table;
  table.title = "Geophones";
  table.columns = {"No.", "Distance" + unit, "Elevation" + unit};
  const auto& map = source.survey.info.map;
  if (map) {
    addMapColumns(table);
    table.note = kMapNote;
  }
  int number = 0;
  for (const Geophone& geophone : source.survey.geophones) {
    table.rows.push_back({std::to_string(++number), fixed(units.fromMetres(geophone.x), kDecimals),
                          fixed(units.fromMetres(geophone.elevation), kDecimals)});
    if (map) {
      addMapCells(*map, geophone.x, table.rows.back());
    }
  }
  table.summary = table.rows.empty() ? "There is no geophone." : "";
  return table;
}

SheetTable sheetShotPlaces(const SheetSource& source) {
  const Units& units = source.words.units;
  const std::string unit = " (" + units.lengthUnit() + ")";
  SheetTable table;
  table.title = "Shot points";
  table.columns = {"Shot", "Distance" + unit, "Elevation" + unit, "Depth" + unit, "Trigger correction", "Records"};
  const auto& map = source.survey.info.map;
  if (map) {
    addMapColumns(table);
  }
  int number = 0;
  for (const Shot& shot : source.survey.shots) {
    table.rows.push_back({std::to_string(++number), fixed(units.fromMetres(shot.point.x), kDecimals),
                          fixed(units.fromMetres(shot.point.elevation), kDecimals),
                          fixed(units.fromMetres(shot.point.depth), kDecimals),
                          milliseconds(shot.triggerCorrection, 2), recordsOf(source.survey, shot)});
    if (map) {
      addMapCells(*map, shot.point.x, table.rows.back());
    }
  }
  table.note = "Distance along the line; elevation of the ground; depth of the shot below it.";
  table.summary = table.rows.empty() ? "There is no shot." : "";
  return table;
}

}  // namespace strikeplate
