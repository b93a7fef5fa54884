#include "core/record/segy_reader.h"

#include <cmath>
#include <limits>
#include <random>
#include <stdexcept>

#include <gtest/gtest.h>

#include "tests/core/record/segy_bytes.h"

namespace strikeplate {
namespace {

using testing_segy::ibmBits;
using testing_segy::SegyFile;
using testing_segy::segyFile;

std::vector<ShotRecord> readOk(const SegyFile& file) {
  auto records = readSegyBytes(file.bytes, "t.sgy");
  if (!records) {
    throw std::runtime_error(records.message());
  }
  return std::move(*records);
}

void writeSample(SegyFile& file, int format, int value) {
  switch (format) {
    case 1:
      return file.sample(ibmBits(value));
    case 2:
      return file.sample(static_cast<std::int32_t>(value));
    case 3:
      return file.sample(static_cast<std::int16_t>(value));
    case 5:
      return file.sample(static_cast<float>(value));
    case 6:
      return file.sample(static_cast<double>(value));
    default:
      return file.sample(static_cast<std::int8_t>(value));
  }
}

TEST(SegyReader, WholeNumbersComeBackInEveryFormatAndOrder) {
  std::mt19937 random(5);
  for (int round = 0; round < 600; ++round) {
    const int formats[] = {1, 2, 3, 5, 6, 8};
    const int format = formats[random() % 6];
    const int samples = 1 + static_cast<int>(random() % 30);
    SegyFile file = segyFile(format, 250, samples, random() % 2 == 0 ? ByteOrder::Big : ByteOrder::Little);
    const int shots = 1 + static_cast<int>(random() % 3);
    std::vector<std::vector<float>> wanted;
    for (int t = 0; t < 2 * shots; ++t) {
      const std::size_t at = file.header();
      file.word(at, 9, static_cast<std::int32_t>(1 + t / 2)).word(at, 115, static_cast<std::uint16_t>(samples));
      file.word(at, 71, static_cast<std::int16_t>(-10)).word(at, 81, static_cast<std::int32_t>(25 * t));
      file.word(at, 73, static_cast<std::int32_t>(-20 + t / 2 * 100));
      wanted.emplace_back();
      for (int i = 0; i < samples; ++i) {
        const int range = format == 8 ? 127 : format == 3 ? 32767 : 1 << 23;
        const int value = static_cast<int>(random() % static_cast<unsigned>(2 * range + 1)) - range;
        writeSample(file, format, value);
        wanted.back().push_back(static_cast<float>(value));
      }
    }
    const auto records = readOk(file);
    ASSERT_EQ(records.size(), static_cast<std::size_t>(shots));
    for (int t = 0; t < 2 * shots; ++t) {
      const ShotRecord& record = records[static_cast<std::size_t>(t / 2)];
      ASSERT_EQ(record.traces[static_cast<std::size_t>(t % 2)].samples, wanted[static_cast<std::size_t>(t)]);
      EXPECT_EQ(record.traces[static_cast<std::size_t>(t % 2)].receiver->x, 2.5 * t);
      EXPECT_EQ(record.source->x, -2.0 + t / 2 * 10.0);
    }
  }
}

// A trace with the words that follow set on it.
SegyFile oneTrace(ByteOrder order = ByteOrder::Big) {
  SegyFile file = segyFile(5, 500, 2, order);
  file.header();
  file.sample(1.0F);
  file.sample(2.0F);
  return file;
}
constexpr std::size_t kTrace = 3600;

TEST(SegyReader, ElevationsFeetAndScalarsAreApplied) {
  SegyFile file = oneTrace();
  file.binary(3255, std::int16_t{2});  // feet
  file.word(kTrace, 41, std::int32_t{1234}).word(kTrace, 45, std::int32_t{2000}).word(kTrace, 49, std::int32_t{30});
  file.word(kTrace, 69, std::int16_t{-10}).word(kTrace, 71, std::int16_t{10});
  file.word(kTrace, 73, std::int32_t{-1}).word(kTrace, 81, std::int32_t{2});
  const ShotRecord record = readOk(file)[0];
  EXPECT_NEAR(record.source->x, -10 * 0.3048, 1e-9);
  EXPECT_NEAR(record.traces[0].receiver->x, 20 * 0.3048, 1e-9);
  EXPECT_NEAR(*record.traces[0].receiver->z, 123.4 * 0.3048, 1e-9);
  EXPECT_NEAR(*record.source->z, 200 * 0.3048, 1e-9);
  EXPECT_NEAR(*record.sourceDepth, 3 * 0.3048, 1e-9);
}

TEST(SegyReader, DelayTakesItsScalarAndItsSign) {
  SegyFile file = oneTrace(ByteOrder::Little);
  file.word(kTrace, 109, std::int16_t{-105}).word(kTrace, 215, std::int16_t{-10});
  EXPECT_NEAR(readOk(file)[0].traces[0].delay, -0.0105, 1e-12);
  file.word(kTrace, 215, std::int16_t{0});
  EXPECT_NEAR(readOk(file)[0].traces[0].delay, -0.105, 1e-12);
}

TEST(SegyReader, FractionalIntervalOfRevisionTwoIsKept) {
  SegyFile file = oneTrace();
  file.binary(3501, std::uint8_t{2}).binary(3217, std::int16_t{31}).binary(3273, 31.25);
  file.word(kTrace, 117, std::int16_t{31});
  const ShotRecord record = readOk(file)[0];
  EXPECT_NEAR(record.traces[0].sampleInterval, 31.25e-6, 1e-15);
  EXPECT_EQ(record.format, "SEG-Y rev 2");
}

TEST(SegyReader, ByteOrderMarkAndTraceExtensionOfRevisionTwoAreFollowed) {
  SegyFile file = segyFile(6, 0, 0, ByteOrder::Little);
  file.binary(3297, std::uint32_t{0x01020304}).binary(3501, std::uint8_t{2}).binary(3507, std::int16_t{1});
  file.binary(3269, std::uint32_t{3}).binary(3273, 62.5);
  const std::size_t at = file.header(480);
  file.word(at, 240 + 97, -1.5).word(at, 240 + 113, 12.25);
  const std::string name = "SEG00001";
  for (std::size_t i = 0; i < name.size(); ++i) {
    file.bytes[at + 240 + 232 + i] = static_cast<std::byte>(name[i]);
  }
  for (const double value : {1.0, 2.0, -3.0}) {
    file.sample(value);
  }
  const ShotRecord record = readOk(file)[0];
  EXPECT_EQ(record.traces[0].samples, (std::vector<float>{1.0F, 2.0F, -3.0F}));
  EXPECT_EQ(record.source->x, -1.5);
  EXPECT_EQ(record.traces[0].receiver->x, 12.25);
  EXPECT_NEAR(record.traces[0].sampleInterval, 62.5e-6, 1e-15);
}

TEST(SegyReader, DeadAndAuxiliaryTracesAreSetDeadAndSaid) {
  SegyFile file = oneTrace();
  file.word(kTrace, 29, std::int16_t{2});
  EXPECT_EQ(readOk(file)[0].traces[0].state, TraceState::Dead);
  EXPECT_EQ(readOk(file)[0].oddities[0], "The headers give no positions.");
  file.word(kTrace, 29, std::int16_t{4});
  EXPECT_EQ(readOk(file)[0].traces[0].state, TraceState::Dead);
  file.word(kTrace, 29, std::int16_t{1});
  EXPECT_EQ(readOk(file)[0].traces[0].state, TraceState::Live);
}

// Traces of two samples, four in all, with words set by `set`.
template <class Set>
std::vector<ShotRecord> fourTraces(Set set) {
  SegyFile file = segyFile(5, 500, 2);
  for (int t = 0; t < 4; ++t) {
    const std::size_t at = file.header();
    file.word(at, 81, std::int32_t{t});
    set(file, at, t);
    file.sample(1.0F);
    file.sample(2.0F);
  }
  return readOk(file);
}

TEST(SegyReader, ShotsAreToldApartBySourcePointOrPosition) {
  EXPECT_EQ(fourTraces([](SegyFile& f, std::size_t at, int t) { f.word(at, 17, std::int32_t{t / 2}); }).size(), 2u);
  EXPECT_EQ(fourTraces([](SegyFile& f, std::size_t at, int t) { f.word(at, 73, std::int32_t{t / 2}); }).size(), 2u);
  EXPECT_EQ(fourTraces([](SegyFile& f, std::size_t at, int t) { f.word(at, 73, std::int32_t{t}); }).size(), 1u);
  EXPECT_EQ(fourTraces([](SegyFile&, std::size_t, int) {}).size(), 1u);
}

TEST(SegyReader, OffsetsPlaceGeophonesWhenThereIsNothingElse) {
  const auto records = fourTraces([](SegyFile& f, std::size_t at, int t) {
    f.word(at, 81, std::int32_t{0}).word(at, 37, std::int32_t{-3 + 2 * t});
  });
  EXPECT_EQ(records[0].source->x, 0.0);
  EXPECT_EQ(records[0].traces[3].receiver->x, 3.0);
  EXPECT_NE(records[0].oddities.at(0).find("by their offset"), std::string::npos);
}

TEST(SegyReader, TracesOfDifferentLengthAreFollowed) {
  SegyFile file = segyFile(5, 500, 3);
  for (const int samples : {3, 1, 2}) {
    const std::size_t at = file.header();
    file.word(at, 115, static_cast<std::uint16_t>(samples));
    for (int i = 0; i < samples; ++i) {
      file.sample(static_cast<float>(10 * samples + i));
    }
  }
  const auto records = readOk(file);
  ASSERT_EQ(records[0].traces.size(), 3u);
  EXPECT_EQ(records[0].traces[1].samples, (std::vector<float>{10.0F}));
  EXPECT_EQ(records[0].traces[2].samples, (std::vector<float>{20.0F, 21.0F}));
}

TEST(SegyReader, NumbersThatAreNoneBecomeZeroAndAreSaid) {
  SegyFile file = segyFile(5, 500, 2);
  file.header();
  file.sample(std::numeric_limits<float>::quiet_NaN());
  file.sample(std::numeric_limits<float>::infinity());
  const ShotRecord record = readOk(file)[0];
  EXPECT_EQ(record.traces[0].samples, (std::vector<float>{0.0F, 0.0F}));
  EXPECT_NE(record.oddities.back().find("2 of its samples are not numbers"), std::string::npos);
}

TEST(SegyReader, RefusalsAreOneSentenceWithTheName) {
  EXPECT_EQ(readSegyBytes({}, "t.sgy").message(), "t.sgy is empty; copy it again from the recorder.");
  SegyFile file = oneTrace();
  file.binary(3217, std::int16_t{0});
  EXPECT_EQ(readSegyBytes(file.bytes, "t.sgy").message(),
            "t.sgy says no sample interval in any header; without it there are no times.");
  file.binary(3225, std::int16_t{4});
  EXPECT_NE(readSegyBytes(file.bytes, "t.sgy").message().find("4-byte fixed point with gain (SEG-Y format 4)"),
            std::string::npos);
  file.binary(3225, std::int16_t{99});
  EXPECT_NE(readSegyBytes(file.bytes, "t.sgy").message().find("is not a SEG-Y file"), std::string::npos);
  file.bytes.resize(3700);
  EXPECT_NE(readSegyBytes(file.bytes, "t.sgy").message().find("too short"), std::string::npos);
}

}  // namespace
}  // namespace strikeplate
