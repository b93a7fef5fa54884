// Damaged files: a clear sentence, or a correct partial reading that says what is missing; never more memory than
// four times the file's size (and what a message or a header of a nearly empty file takes).
#include <random>
#include <string>

#include <gtest/gtest.h>

#include "core/record/read_records.h"
#include "core/record/seg2_reader.h"
#include "core/record/seg2_writer.h"
#include "core/record/segy_reader.h"
#include "tests/core/record/allocation_count.h"
#include "tests/core/record/segy_bytes.h"
#include "tests/core/record/test_files.h"

namespace strikeplate {
namespace {

constexpr std::size_t kSmallChange = 20480;

void expectSound(const std::vector<std::byte>& bytes, const std::string& what) {
  AllocationCount::restart();
  const auto records = readRecordsBytes(bytes, "t");
  EXPECT_LE(AllocationCount::highest(), 4 * bytes.size() + kSmallChange) << what;
  if (!records) {
    EXPECT_GT(records.message().size(), 20u) << what;
    EXPECT_NE(records.message().find("t "), std::string::npos) << records.message();
    EXPECT_EQ(records.message().back(), '.') << records.message();
    return;
  }
  std::size_t samples = 0;
  for (const ShotRecord& record : *records) {
    EXPECT_FALSE(record.traces.empty()) << what;
    for (const Trace& trace : record.traces) {
      EXPECT_FALSE(trace.samples.empty()) << what;
      EXPECT_GT(trace.sampleInterval, 0.0) << what;
      samples += trace.samples.size();
    }
  }
  EXPECT_LE(samples, bytes.size()) << what;
}

// Files of every format; the real ones and small ones of our own.
std::vector<std::pair<std::string, std::vector<std::byte>>> sources() {
  std::vector<std::pair<std::string, std::vector<std::byte>>> out;
  out.emplace_back("6.dat", fileBytes(kTestData + "/hammer_line/6.dat"));
  for (const std::string name :
       {"20130107_103041000.CET.3c.cont.0.seg2", "20180307_031245000.0.seg2", "Format1msb.sgy", "Format2lsb.sgy",
        "Format3msb.sgy", "Format5lsb.sgy", "Format8msb.sgy", "shot-gather.sgy", "multi-text.sgy", "broken.sgy"}) {
    out.emplace_back(name, fileBytes(kFormats + name));
  }
  const auto hammer = readSeg2(kTestData + "/hammer_line/6.dat");
  for (int code = 1; code <= 5; ++code) {
    ShotRecord record = *hammer;
    record.traces.resize(4);
    for (Trace& trace : record.traces) {
      trace.samples.resize(200);
    }
    Seg2WriteOptions options;
    options.formatCode = code;
    options.order = code % 2 == 0 ? ByteOrder::Big : ByteOrder::Little;
    out.emplace_back("SEG-2 code " + std::to_string(code), *seg2Bytes(record, options));
  }
  testing_segy::SegyFile eight = testing_segy::segyFile(6, 250, 50, ByteOrder::Little);
  for (int t = 0; t < 6; ++t) {
    eight.header();
    for (int i = 0; i < 50; ++i) {
      eight.sample(0.5 * i);
    }
  }
  out.emplace_back("SEG-Y format 6", eight.bytes);
  return out;
}

TEST(Damage, EveryTruncationIsReadInPartOrRefused) {
  for (const auto& [name, bytes] : sources()) {
    for (std::size_t step = 0; step <= 500; ++step) {
      const std::vector<std::byte> cut(bytes.begin(),
                                       bytes.begin() + static_cast<std::ptrdiff_t>(bytes.size() * step / 500));
      expectSound(cut, name + " cut to " + std::to_string(cut.size()));
    }
  }
}

TEST(Damage, FlippedBytesAreReadInPartOrRefused) {
  std::mt19937 random(11);
  for (const auto& [name, bytes] : sources()) {
    for (int round = 0; round < 500; ++round) {
      std::vector<std::byte> flipped = bytes;
      // Half of the flips go into the first 4 kB, where the headers of the file are.
      const std::size_t range = round % 2 == 0 ? std::min<std::size_t>(4096, bytes.size()) : bytes.size();
      const std::size_t at = random() % range;
      flipped[at] ^= static_cast<std::byte>(1 + random() % 255);
      expectSound(flipped, name + ", byte " + std::to_string(at));
    }
  }
}

TEST(Damage, ManyFlipsAtOnceDoNoHarm) {
  std::mt19937 random(12);
  for (const auto& [name, bytes] : sources()) {
    for (int round = 0; round < 100; ++round) {
      std::vector<std::byte> flipped = bytes;
      for (int k = 0; k < 50; ++k) {
        flipped[random() % std::min<std::size_t>(6000, bytes.size())] = static_cast<std::byte>(random() % 256);
      }
      expectSound(flipped, name + ", round " + std::to_string(round));
    }
  }
}

// A flip in the samples of one trace leaves everything else as it was.
TEST(Damage, FlipInOneTraceLeavesTheOthersAlone) {
  const auto bytes = fileBytes(kTestData + "/hammer_line/6.dat");
  const auto whole = readSeg2Bytes(bytes, "t");
  std::mt19937 random(13);
  for (int round = 0; round < 20; ++round) {
    const std::size_t trace = random() % 24;
    auto flipped = bytes;
    const auto at = load<std::uint32_t>(bytes.data() + 32 + 4 * trace, ByteOrder::Little);
    const auto data = at + load<std::uint16_t>(bytes.data() + at + 2, ByteOrder::Little);
    flipped[data + random() % 6000] ^= std::byte{0x40};
    const auto read = readSeg2Bytes(flipped, "t");
    ASSERT_TRUE(read);
    for (std::size_t t = 0; t < 24; ++t) {
      EXPECT_EQ(read->traces[t].samples == whole->traces[t].samples, t != trace);
    }
  }
}

// All pointers to one large trace, which a file of this size could not hold so often.
TEST(Damage, PointersThatRepeatDoNotMultiplyTheData) {
  auto bytes = fileBytes(kTestData + "/hammer_line/6.dat");
  for (std::size_t t = 0; t < 1056; ++t) {
    std::memcpy(bytes.data() + 32 + 4 * t, bytes.data() + 32, 4);
  }
  store(bytes.data() + 6, std::uint16_t{1056}, ByteOrder::Little);
  expectSound(bytes, "repeated pointers");
  for (std::size_t t = 0; t < 1056; ++t) {
    const auto first = load<std::uint32_t>(bytes.data() + 32, ByteOrder::Little);
    store(bytes.data() + 32 + 4 * t, static_cast<std::uint32_t>(first + t), ByteOrder::Little);
  }
  expectSound(bytes, "overlapping pointers");
}

}  // namespace
}  // namespace strikeplate
