#include <algorithm>
#include <cmath>
#include <cstdlib>
#include <filesystem>
#include <fstream>
#include <iterator>
#include <regex>
#include <set>
#include <string>

#include <gtest/gtest.h>
#include <nlohmann/json.hpp>

#include "core/record/seg2_reader.h"

namespace strikeplate {
namespace {

namespace fs = std::filesystem;

const fs::path kSamples = STRIKEPLATE_SAMPLE_DATA;

nlohmann::json truthOf(const fs::path& folder) {
  return nlohmann::json::parse(std::ifstream(folder / "truth.json"));
}

ShotRecord recordOf(const fs::path& file) {
  const auto read = readSeg2(file.string());
  EXPECT_TRUE(read.ok()) << file;
  return read.ok() ? *read : ShotRecord{};
}

/// Every file under sample_data that is data, with its folder.
std::set<std::string> dataFiles() {
  std::set<std::string> found;
  for (const auto& entry : fs::recursive_directory_iterator(kSamples)) {
    const std::string extension = entry.path().extension().string();
    if (extension == ".sg2" || extension == ".json") {
      found.insert(fs::relative(entry.path(), kSamples).generic_string());
    }
  }
  return found;
}

TEST(SampleData, CatalogueNamesEveryFileAndNoOther) {
  std::ifstream in(kSamples / "README.md");
  const std::string text((std::istreambuf_iterator<char>(in)), std::istreambuf_iterator<char>());
  std::set<std::string> named;
  const std::regex row("\\| `([a-z0-9_/.]+\\.(?:sg2|json))` \\|");
  for (std::sregex_iterator it(text.begin(), text.end(), row), end; it != end; ++it)
    named.insert((*it)[1]);
  EXPECT_EQ(named, dataFiles());
}

TEST(SampleData, DemoLineIsAsTheTruthFileSays) {
  const fs::path folder = kSamples / "demo_line";
  const nlohmann::json truth = truthOf(folder);
  const auto& variant = truth.at("variants").at("faults");
  for (const auto& file : variant.at("files")) {
    const ShotRecord record = recordOf(kSamples / file.at("file").get<std::string>());
    ASSERT_EQ(record.traces.size(), truth.at("geophones").size());
    ASSERT_TRUE(record.source && record.source->z);
    EXPECT_NEAR(record.source->x, file.at("shot_x").get<double>(), 1e-9);
    for (std::size_t g = 0; g < record.traces.size(); ++g) {
      EXPECT_NEAR(record.traces[g].receiver->x, truth["geophones"][g]["x"].get<double>(), 1e-9);
      EXPECT_DOUBLE_EQ(record.traces[g].delay, file.at("delay_s").get<double>());
      EXPECT_DOUBLE_EQ(record.traces[g].sampleInterval, truth.at("sampling").at("dt_s").get<double>());
    }
  }
}

TEST(SampleData, TheProgramMakesTheTinySceneAgain) {
  const fs::path out = fs::path(STRIKEPLATE_BINARY_DIR) / "sample_data_test" / "tiny";
  fs::remove_all(out);
  const std::string command = std::string("\"") + STRIKEPLATE_MAKE_DEMO + "\" \"" +
                              (kSamples / "scenes" / "tiny.json").string() + "\" \"" + out.string() +
                              "\" > /dev/null";
  ASSERT_EQ(std::system(command.c_str()), 0);
  const ShotRecord made = recordOf(out / "1001.sg2");
  const ShotRecord kept = recordOf(kSamples / "tiny" / "1001.sg2");
  ASSERT_EQ(made.traces.size(), kept.traces.size());
  for (std::size_t g = 0; g < made.traces.size(); ++g) {
    const auto& a = made.traces[g].samples;
    const auto& b = kept.traces[g].samples;
    ASSERT_EQ(a.size(), b.size());
    float largest = 0.0F;
    for (const float v : b)
      largest = std::max(largest, std::abs(v));
    for (std::size_t k = 0; k < a.size(); ++k)
      ASSERT_NEAR(a[k], b[k], 1e-3F * largest) << "trace " << g + 1;
  }
  EXPECT_EQ(truthOf(out).at("shots").at(0).at("layer"), truthOf(kSamples / "tiny").at("shots").at(0).at("layer"));
}

TEST(SampleData, TrueTimesOfTheTinySceneAreTheExactOnes) {
  const nlohmann::json truth = truthOf(kSamples / "tiny");
  const double v1 = truth["layers"][0]["vp"].get<double>();
  const double v2 = truth["layers"][1]["vp"].get<double>();
  const double lag = 2.0 * 2.0 * std::sqrt(1.0 / (v1 * v1) - 1.0 / (v2 * v2));  // 2 m of soil, twice
  const auto& shot = truth["shots"][0];
  for (std::size_t g = 0; g < truth["geophones"].size(); ++g) {
    const double x = truth["geophones"][g]["x"].get<double>() - shot["x"].get<double>();
    EXPECT_NEAR(shot["t_s"][g].get<double>(), std::min(x / v1, x / v2 + lag), 3e-5) << x;
  }
}

TEST(SampleData, WavesOfTheTinySceneLeaveZeroAtTheTrueTimeUpwards) {
  const ShotRecord record = recordOf(kSamples / "tiny" / "1001.sg2");
  const nlohmann::json shot = truthOf(kSamples / "tiny")["shots"][0];
  for (std::size_t g = 0; g < record.traces.size(); ++g) {
    const Trace& trace = record.traces[g];
    const double onset = shot["t_s"][g].get<double>();
    const auto at = [&](double t) {
      return trace.samples[static_cast<std::size_t>(std::ceil((t - trace.delay) / trace.sampleInterval))];
    };
    float peak = 0.0F;
    for (double t = onset; t < onset + 4e-3; t += trace.sampleInterval)
      peak = std::min(peak, at(t));
    ASSERT_LT(peak, 0.0F) << "upward motion is a negative number";
    EXPECT_LT(std::abs(at(onset - 6e-4)), 0.03F * -peak) << "trace " << g + 1;
    EXPECT_GT(-at(onset + 5e-4), 0.10F * -peak) << "trace " << g + 1;
  }
}

}  // namespace
}  // namespace strikeplate
