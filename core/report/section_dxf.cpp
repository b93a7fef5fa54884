#include "core/report/section_dxf.h"

#include <cmath>
#include <filesystem>
#include <functional>
#include <memory>
#include <vector>

#include <dxflib/dl_dxf.h>

#include "core/base/units.h"

namespace strikeplate {
namespace {

struct Point {
  double x, y;
};

class Drawing {
 public:
  explicit Drawing(const std::string& path) : writer_(dxf_.out(path.c_str(), DL_Codes::AC1015)) {}

  [[nodiscard]] bool open() const { return writer_ != nullptr; }

  void head(const std::vector<std::string>& layers) {
    dxf_.writeHeader(*writer_);
    writer_->sectionEnd();
    writer_->sectionTables();
    dxf_.writeVPort(*writer_);
    writer_->tableLinetypes(3);
    dxf_.writeLinetype(*writer_, DL_LinetypeData("BYBLOCK", "BYBLOCK", 0, 0, 0.0));
    dxf_.writeLinetype(*writer_, DL_LinetypeData("BYLAYER", "BYLAYER", 0, 0, 0.0));
    dxf_.writeLinetype(*writer_, DL_LinetypeData("CONTINUOUS", "Continuous", 0, 0, 0.0));
    writer_->tableEnd();
    writer_->tableLayers(static_cast<int>(layers.size()) + 1);
    dxf_.writeLayer(*writer_, DL_LayerData("0", 0), DL_Attributes("", DL_Codes::black, 25, "CONTINUOUS", 1.0));
    int colour = 1;
    for (const std::string& layer : layers) {
      dxf_.writeLayer(*writer_, DL_LayerData(layer, 0), DL_Attributes("", colour, 25, "CONTINUOUS", 1.0));
      colour = colour % 6 + 1;
    }
    writer_->tableEnd();
    writer_->tableStyle(1);
    dxf_.writeStyle(*writer_, DL_StyleData("Standard", 0, 0.0, 1.0, 0.0, 0, 2.5, "txt", ""));
    writer_->tableEnd();
    dxf_.writeView(*writer_);
    dxf_.writeUcs(*writer_);
    writer_->tableAppid(1);
    dxf_.writeAppid(*writer_, "ACAD");
    writer_->tableEnd();
    dxf_.writeDimStyle(*writer_, 1, 1, 1, 1, 1);
    dxf_.writeBlockRecord(*writer_);
    writer_->tableEnd();
    writer_->sectionEnd();
    writer_->sectionBlocks();
    for (const char* block : {"*Model_Space", "*Paper_Space", "*Paper_Space0"}) {
      dxf_.writeBlock(*writer_, DL_BlockData(block, 0, 0.0, 0.0, 0.0));
      dxf_.writeEndBlock(*writer_, block);
    }
    writer_->sectionEnd();
    writer_->sectionEntities();
  }

  void polyline(const std::string& layer, const std::vector<Point>& points) {
    if (points.size() < 2) {
      return;
    }
    const DL_Attributes attributes(layer, 256, -1, "BYLAYER", 1.0);
    dxf_.writePolyline(*writer_, DL_PolylineData(static_cast<int>(points.size()), 0, 0, 0), attributes);
    for (const Point& p : points) {
      dxf_.writeVertex(*writer_, DL_VertexData(p.x, p.y, 0.0, 0.0));
    }
    dxf_.writePolylineEnd(*writer_);
  }

  void point(const std::string& layer, const Point& p) {
    dxf_.writePoint(*writer_, DL_PointData(p.x, p.y, 0.0), DL_Attributes(layer, 256, -1, "BYLAYER", 1.0));
  }

  void text(const Point& p, double height, const std::string& words) {
    dxf_.writeText(*writer_, DL_TextData(p.x, p.y, 0.0, p.x, p.y, 0.0, height, 1.0, 0, 0, 0, words, "Standard", 0.0),
                   DL_Attributes("TEXT", 256, -1, "BYLAYER", 1.0));
  }

  void end() {
    writer_->sectionEnd();
    dxf_.writeObjects(*writer_);
    dxf_.writeObjectsEnd(*writer_);
    writer_->dxfEOF();
    writer_->close();
  }

 private:
  DL_Dxf dxf_;
  std::unique_ptr<DL_WriterA> writer_;
};

std::string layerTop(int layer) {
  return "LAYER_" + std::to_string(layer) + "_TOP";
}

/// One interface and the bounds of its band. The depth's bounds turn into elevations below the ground above.
void drawInterface(Drawing& drawing, const Section& section, const SectionInterface& interface) {
  std::vector<Point> middle, deep, shallow;
  for (std::size_t i = 0; i < section.x.size(); ++i) {
    const Estimate& d = interface.depth[i];
    if (d.determined) {
      middle.push_back({section.x[i], section.ground[i] - d.value});
      deep.push_back({section.x[i], section.ground[i] - d.high95});
      shallow.push_back({section.x[i], section.ground[i] - d.low95});
    }
  }
  drawing.polyline(layerTop(interface.layer), middle);
  drawing.polyline(layerTop(interface.layer) + "_LOW95", deep);
  drawing.polyline(layerTop(interface.layer) + "_HIGH95", shallow);
  if (!middle.empty()) {
    const Estimate& v = section.velocities[static_cast<std::size_t>(interface.layer - 1)];
    drawing.text({middle.front().x, middle.front().y - 1.0}, 0.6,
                 "Layer " + std::to_string(interface.layer) + ", " + Units{}.velocity(v.value));
  }
}

void drawPlaces(Drawing& drawing, const Survey& survey, const Ground& ground) {
  std::vector<Point> surface;
  for (const Geophone& p : ground.points()) {
    surface.push_back({p.x, p.elevation});
  }
  drawing.polyline("GROUND", surface);
  for (const Geophone& geophone : survey.geophones) {
    drawing.point("GEOPHONES", {geophone.x, geophone.elevation});
  }
  for (const Shot& shot : survey.shots) {
    drawing.point("SHOTS", {shot.point.x, shot.point.elevation - shot.point.depth});
  }
  for (const Borehole& borehole : survey.boreholes) {
    const double top = ground.at(borehole.x);
    drawing.polyline("BOREHOLES", {{borehole.x, top}, {borehole.x, top - borehole.depth}});
    drawing.text({borehole.x, top + 0.5}, 0.6, borehole.name);
  }
}

}  // namespace

Outcome writeSectionDxf(const std::string& path, const Survey& survey, const Interpretation& interpretation) {
  Drawing drawing(path);
  if (!drawing.open()) {
    return Failure{path +
                   ": the drawing cannot be written there; check that the folder exists and may be written to."};
  }
  const Section& section = interpretation.section;
  std::vector<std::string> layers = {"GROUND", "GEOPHONES", "SHOTS", "BOREHOLES", "TEXT"};
  for (const SectionInterface& interface : section.interfaces) {
    for (const char* end : {"", "_LOW95", "_HIGH95"}) {
      layers.push_back(layerTop(interface.layer) + end);
    }
  }
  drawing.head(layers);
  drawPlaces(drawing, survey, Ground(survey.geophones, interpretation.times.shots));
  if (section.determined) {
    for (const SectionInterface& interface : section.interfaces) {
      drawInterface(drawing, section, interface);
    }
  }
  drawing.end();
  std::error_code error;
  if (std::filesystem::file_size(path, error) == 0 || error) {
    return Failure{path + ": the drawing could not be written whole; check the free space there."};
  }
  return Done{};
}

}  // namespace strikeplate
