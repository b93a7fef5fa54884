#include "core/report/section_dxf.h"

#include <cstdlib>
#include <filesystem>
#include <fstream>

#include <gtest/gtest.h>

namespace strikeplate {
namespace {

Interpretation simple() {
  Interpretation interpretation;
  Section& s = interpretation.section;
  s.determined = true;
  s.layers = 2;
  s.x = {0.0, 10.0, 20.0};
  s.ground = {100.0, 101.0, 102.0};
  s.velocities = {Estimate::normal(500, 10), Estimate::normal(2000, 50)};
  SectionInterface interface;
  interface.depth = {Estimate::normal(5.0, 0.5), Estimate::normal(6.0, 0.5), Estimate::normal(7.0, 0.5)};
  s.interfaces.push_back(interface);
  return interpretation;
}

Survey survey() {
  Survey survey;
  survey.geophones = {{0.0, 100.0}, {10.0, 101.0}, {20.0, 102.0}};
  Borehole borehole;
  borehole.x = 10.0;
  borehole.depth = 6.2;
  borehole.name = "BH1";
  survey.boreholes.push_back(borehole);
  return survey;
}

// ezdxf (a general-purpose DXF library) is the second reader.
TEST(SectionDxf, IsReadByASecondReaderAtTrueScale) {
  const std::string path = ::testing::TempDir() + "section_dxf_test.dxf";
  ASSERT_TRUE(writeSectionDxf(path, survey(), simple()));
  const std::string script = path + ".py";
  std::ofstream(script)
      << "import ezdxf, sys\n"
         "d = ezdxf.readfile(sys.argv[1])\n"
         "p = [e for e in d.modelspace().query('LWPOLYLINE') if e.dxf.layer == 'LAYER_2_TOP']\n"
         "v = [(round(q[0], 6), round(q[1], 6)) for q in p[0].get_points()]\n"
         "assert v == [(0, 95), (10, 95), (20, 95)], v\n"
         "assert len([e for e in d.modelspace().query('POINT') if e.dxf.layer == 'GEOPHONES']) == 3\n"
         "assert not d.audit().has_errors\n";
  EXPECT_EQ(std::system(("/usr/bin/python3 '" + script + "' '" + path + "'").c_str()), 0);
  std::filesystem::remove(path);
  std::filesystem::remove(script);
}

TEST(SectionDxf, AFolderThatDoesNotExistIsOneSentence) {
  const Outcome outcome = writeSectionDxf("/no/such/folder/section.dxf", survey(), simple());
  ASSERT_FALSE(outcome);
  EXPECT_NE(outcome.message().find("/no/such/folder/section.dxf"), std::string::npos);
}

}  // namespace
}  // namespace strikeplate
