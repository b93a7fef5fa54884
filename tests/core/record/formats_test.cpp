// Files that recorders and other programs wrote; what must come out is stated with them (tests/data/README.md).
#include <algorithm>
#include <cstring>

#include <gtest/gtest.h>
#include <segyio/segy.h>

#include "core/record/read_records.h"
#include "core/record/seg2_reader.h"
#include "core/record/segy_reader.h"
#include "tests/core/record/test_files.h"

namespace strikeplate {
namespace {

using Samples = std::vector<float>;

Samples firstOf(const Trace& trace, std::size_t n) {
  return {trace.samples.begin(), trace.samples.begin() + static_cast<std::ptrdiff_t>(n)};
}
Samples lastOf(const Trace& trace, std::size_t n) {
  return {trace.samples.end() - static_cast<std::ptrdiff_t>(n), trace.samples.end()};
}

std::vector<ShotRecord> readAll(const std::string& name) {
  auto records = readRecords(kFormats + name);
  EXPECT_TRUE(records) << records.message();
  return records ? std::move(*records) : std::vector<ShotRecord>(1);
}

TEST(Formats, TwentyBitFloatsOfAnEngineeringSeismograph) {
  const auto record = readSeg2(kFormats + "20180307_031245000.0.seg2");
  ASSERT_TRUE(record) << record.message();
  ASSERT_EQ(record->traces.size(), 1u);
  const Trace& trace = record->traces[0];
  ASSERT_EQ(trace.samples.size(), 2048u);
  EXPECT_EQ(firstOf(trace, 8), (Samples{-20, -22, -27, -32, -38, -35, -42, -47}));
  EXPECT_EQ(lastOf(trace, 8), (Samples{-1311, -1301, -1286, -1269, -1250, -1234, -1218, -1201}));
  EXPECT_EQ(*std::min_element(trace.samples.begin(), trace.samples.end()), -388384.0F);
  EXPECT_EQ(*std::max_element(trace.samples.begin(), trace.samples.end()), 325120.0F);
  EXPECT_EQ(trace.sampleInterval, 0.000125);
  EXPECT_NEAR(trace.delay, -0.010 - 0.00001796, 1e-12);  // DELAY and SKEW
  EXPECT_EQ(trace.descaling, 0.001199);
  EXPECT_EQ(trace.stack, 8);
  EXPECT_EQ(trace.receiver->x, 1004.0);
  EXPECT_EQ(record->source->x, 1000.0);
  EXPECT_TRUE(record->oddities.empty());
}

TEST(Formats, ThreeIntegerTracesWithoutPositions) {
  const auto record = readSeg2(kFormats + "20130107_103041000.CET.3c.cont.0.seg2");
  ASSERT_TRUE(record) << record.message();
  ASSERT_EQ(record->traces.size(), 3u);
  EXPECT_EQ(record->traces[0].samples.size(), 2000u);
  EXPECT_EQ(firstOf(record->traces[0], 10), (Samples{-11, -13, -22, -18, -11, -7, -27, -9, -14, 16}));
  EXPECT_EQ(lastOf(record->traces[2], 10), (Samples{-4, -11, -4, -9, 1, 9, 4, 6, -3, -7}));
  EXPECT_EQ(record->traces[0].descaling, 2.17378e-05);
  EXPECT_EQ(record->traces[0].sampleInterval, 0.001);
  EXPECT_EQ(record->traces[0].delay, 0.0);
  EXPECT_FALSE(record->source);
  EXPECT_EQ(record->oddities, (std::vector<std::string>{"Traces 1 to 3: without a RECEIVER_LOCATION.",
                                                        "No trace gives a SOURCE_LOCATION."}));
}

TEST(Formats, RealHammerBlowIsReadSampleForSample) {
  const auto record = readSeg2(kTestData + "/hammer_line/6.dat");
  ASSERT_TRUE(record) << record.message();
  ASSERT_EQ(record->traces.size(), 24u);
  EXPECT_EQ(record->traces[0].samples.size(), 1500u);
  EXPECT_EQ(record->traces[23].receiver->x, 46.0);
  EXPECT_EQ(record->source->x, -5.0);
  const auto cut = readSeg2(kTestData + "/hammer_line/1_cut.dat");
  ASSERT_TRUE(cut);
  EXPECT_EQ(cut->traces[0].samples.size(), 2000u);
}

// The section as 16-bit integers; the other formats hold the same numbers, 1-byte integers their lowest byte.
TEST(Formats, AllSampleFormatsHoldTheSameSection) {
  const auto wanted = readAll("f3.sgy");
  ASSERT_EQ(wanted.size(), 3u);
  for (const std::string name : {"1", "2", "3", "5", "8"}) {
    for (const std::string order : {"msb", "lsb"}) {
      const auto got = readAll("Format" + name + order + ".sgy");
      ASSERT_EQ(got.size(), wanted.size()) << name << order;
      for (std::size_t r = 0; r < got.size(); ++r) {
        ASSERT_EQ(got[r].traces.size(), 18u);
        for (std::size_t t = 0; t < 18; ++t) {
          Samples samples = wanted[r].traces[t].samples;
          if (name == "8") {
            std::transform(samples.begin(), samples.end(), samples.begin(), [](float s) {
              return static_cast<float>(static_cast<std::int8_t>(static_cast<int>(s) & 0xFF));
            });
          }
          ASSERT_EQ(got[r].traces[t].samples, samples) << name << order;
        }
      }
      EXPECT_EQ(got[0].traces[0].delay, 0.004);
      EXPECT_EQ(got[0].traces[0].sampleInterval, 0.004);
      EXPECT_NEAR(got[0].source->x, 620197.2, 1e-6);
    }
  }
}

TEST(Formats, UnsignedIntegersAreRefusedByName) {
  const auto ten = readRecords(kFormats + "Format10lsb.sgy");
  ASSERT_FALSE(ten);
  EXPECT_NE(ten.message().find("4-byte unsigned integers (SEG-Y format 10)"), std::string::npos) << ten.message();
  const auto sixteen = readRecords(kFormats + "Format16msb.sgy");
  ASSERT_FALSE(sixteen);
  EXPECT_NE(sixteen.message().find("1-byte unsigned integers (SEG-Y format 16)"), std::string::npos);
}

TEST(Formats, DelayScalarDivides) {
  EXPECT_EQ(readAll("delay-scalar.sgy")[0].traces[0].delay, 1.0);
}

TEST(Formats, FieldRecordsAreShots) {
  const auto records = readAll("shot-gather.sgy");
  ASSERT_EQ(records.size(), 4u);
  const std::string names[] = {"2", "3", "5", "8"};
  int first = 1;
  for (std::size_t r = 0; r < 4; ++r) {
    EXPECT_EQ(records[r].traces[0].header[0].value, names[r]);
    EXPECT_EQ(records[r].firstTraceInFile, first);
    EXPECT_EQ(records[r].traces[0].samples[0], std::stof(names[r]));
    first += static_cast<int>(records[r].traces.size());
  }
}

TEST(Formats, ExtendedTextHeadersAreReadPast) {
  const auto records = readAll("multi-text.sgy");
  ASSERT_EQ(records.size(), 1u);
  EXPECT_EQ(records[0].traces.size(), 1u);
}

TEST(Formats, IntervalOfTheTraceHeaderStandsInForANegativeOne) {
  EXPECT_EQ(readAll("interval-neg-bin-pos-trace.sgy")[0].traces[0].sampleInterval, 0.004);
}

TEST(Formats, BrokenFileKeepsItsWholeTracesAndSaysSo) {
  const auto records = readAll("broken.sgy");
  ASSERT_EQ(records[0].traces.size(), 3u);
  EXPECT_EQ(records[0].oddities.at(0),
            "The file ends within the header of trace 4; that trace and any behind it are missing.");
}

TEST(Formats, OneTraceWithDelayAndCoordinateScalar) {
  const auto records = readAll("one_trace_delay.sgy");
  const Trace& trace = records.at(0).traces.at(0);
  EXPECT_EQ(trace.delay, -0.1);
  EXPECT_EQ(trace.receiver->x, 3.0);
  EXPECT_EQ(trace.sampleInterval, 0.00025);
  EXPECT_EQ(firstOf(trace, 5), (Samples{-12, -31, -40, -20, -15}));
  const auto npy = fileBytes(kFormats + "one_trace_delay.npy");
  constexpr std::size_t kNpyHeader = 80;
  ASSERT_EQ(npy.size(), kNpyHeader + 8000 * sizeof(float));
  Samples wanted(8000);
  std::memcpy(wanted.data(), npy.data() + kNpyHeader, 8000 * sizeof(float));
  EXPECT_EQ(trace.samples, wanted);
}

/// Samples of a trace as the segyio library reads and converts them. The library's Python reader does the same two
/// calls and hands the numbers on as they are.
Samples librarySamples(segy_file* file, int format, int trace) {
  constexpr int kSamples = 75;
  constexpr long kFirstTrace = 3600;
  const int size = format == SEGY_SIGNED_CHAR_1_BYTE ? 1 : format == SEGY_SIGNED_SHORT_2_BYTE ? 2 : 4;
  std::vector<std::byte> raw(static_cast<std::size_t>(kSamples * size));
  EXPECT_EQ(segy_readtrace(file, trace, raw.data(), kFirstTrace, kSamples * size), SEGY_OK);
  EXPECT_EQ(segy_to_native(format, kSamples, raw.data()), SEGY_OK);
  Samples out;
  for (int i = 0; i < kSamples; ++i) {
    const std::byte* at = raw.data() + i * size;
    const auto as = [at]<class Number>(Number number) {
      std::memcpy(&number, at, sizeof number);
      return static_cast<float>(number);
    };
    out.push_back(format == SEGY_SIGNED_INTEGER_4_BYTE ? as(std::int32_t{})
                  : format == SEGY_SIGNED_SHORT_2_BYTE ? as(std::int16_t{})
                  : format == SEGY_SIGNED_CHAR_1_BYTE  ? as(std::int8_t{})
                                                       : as(float{}));
  }
  return out;
}

TEST(Formats, SamplesAreThoseOfTheSegyioLibraryInEveryFormatAndByteOrder) {
  for (const int format : {1, 2, 3, 5, 8}) {
    for (const bool little : {false, true}) {
      const std::string name = "Format" + std::to_string(format) + (little ? "lsb" : "msb") + ".sgy";
      segy_file* file = segy_open((kFormats + name).c_str(), "rb");
      ASSERT_NE(file, nullptr);
      ASSERT_EQ(segy_set_format(file, format | (little ? SEGY_LSB : SEGY_MSB)), SEGY_OK);
      const auto records = readAll(name);
      for (int t = 0; t < 54; ++t) {
        EXPECT_EQ(records[static_cast<std::size_t>(t / 18)].traces[static_cast<std::size_t>(t % 18)].samples,
                  librarySamples(file, format, t))
            << name << ", trace " << t;
      }
      segy_close(file);
    }
  }
}

}  // namespace
}  // namespace strikeplate
