#include "core/record/seg2_reader.h"

#include <cmath>
#include <limits>
#include <stdexcept>

#include <gtest/gtest.h>

#include "core/record/seg2_strings.h"
#include "core/record/seg2_writer.h"

namespace strikeplate {
namespace {

ShotRecord plainRecord(int traces = 3) {
  ShotRecord record;
  record.file = "t.sg2";
  record.source = HeaderPosition{-2.0, {}, {}};
  record.header = {{"NOTE", "a line"}};
  for (int t = 0; t < traces; ++t) {
    Trace trace;
    trace.samples = {1.0F, 2.0F, 3.0F, 4.0F + static_cast<float>(t)};
    trace.sampleInterval = 0.001;
    trace.delay = -0.01;
    trace.receiver = HeaderPosition{2.0 * t, {}, {}};
    trace.header = {{"CHANNEL_NUMBER", std::to_string(t + 1)}};
    record.traces.push_back(std::move(trace));
  }
  return record;
}

std::vector<std::byte> bytesOf(const ShotRecord& record, const Seg2WriteOptions& options = {}) {
  auto bytes = seg2Bytes(record, options);
  EXPECT_TRUE(bytes) << bytes.message();
  return *bytes;
}

ShotRecord readOk(std::span<const std::byte> bytes) {
  auto record = readSeg2Bytes(bytes, "t.sg2");
  if (!record) {
    throw std::runtime_error(record.message());
  }
  return std::move(*record);
}

std::uint32_t pointerOf(const std::vector<std::byte>& bytes, std::size_t trace) {
  return load<std::uint32_t>(bytes.data() + 32 + 4 * trace, ByteOrder::Little);
}

bool says(const ShotRecord& record, const std::string& words) {
  for (const std::string& oddity : record.oddities) {
    if (oddity.find(words) != std::string::npos) {
      return true;
    }
  }
  return false;
}

// A trace whose header holds these keywords besides the needed ones.
ShotRecord withWords(const std::vector<HeaderEntry>& words) {
  ShotRecord record = plainRecord(1);
  const auto bytes = bytesOf(record);
  // The strict writer leaves out what it writes itself, so the words go in behind by hand.
  const std::uint32_t at = pointerOf(bytes, 0);
  const auto size = load<std::uint16_t>(bytes.data() + at + 2, ByteOrder::Little);
  std::vector<std::byte> block(bytes.begin() + at, bytes.begin() + at + 32);
  for (const HeaderEntry& word : words) {
    const std::string text = word.key + " " + word.value + '\0';
    const std::size_t to = block.size();
    block.resize(to + 2 + text.size());
    store(block.data() + to, static_cast<std::uint16_t>(text.size() + 2), ByteOrder::Little);
    std::memcpy(block.data() + to + 2, text.data(), text.size());
  }
  block.resize((block.size() + 2 + 3) / 4 * 4);
  store(block.data() + 2, static_cast<std::uint16_t>(block.size()), ByteOrder::Little);
  std::vector<std::byte> file(bytes.begin(), bytes.begin() + at);
  file.insert(file.end(), block.begin(), block.end());
  file.insert(file.end(), bytes.begin() + at + size, bytes.end());
  return readOk(file);
}

TEST(Seg2Reader, PlainFileHasNoOddities) {
  const ShotRecord record = readOk(bytesOf(plainRecord()));
  EXPECT_TRUE(record.oddities.empty()) << record.oddities[0];
  EXPECT_EQ(record.format, "SEG-2");
}

TEST(Seg2Reader, SkewIsAddedToDelay) {
  const ShotRecord record = withWords({{"SAMPLE_INTERVAL", "0.001"}, {"DELAY", "-0.5"}, {"SKEW", "-0.0006"}});
  EXPECT_NEAR(record.traces[0].delay, -0.5006, 1e-12);
}

TEST(Seg2Reader, VectorsAndDecimalCommasArePositions) {
  const ShotRecord record = withWords({{"SAMPLE_INTERVAL", "0.001 s"},
                                       {"RECEIVER_LOCATION", "12,5  1.0   -3"},
                                       {"SOURCE_LOCATION", "1.0,2.0,3.0"},
                                       {"FIXED_GAIN", " 0 DB"}});
  EXPECT_EQ(record.traces[0].receiver->x, 12.5);
  EXPECT_EQ(record.traces[0].receiver->y, 1.0);
  EXPECT_EQ(record.traces[0].receiver->z, -3.0);
  EXPECT_EQ(record.source->x, 1.0);
  EXPECT_EQ(record.source->z, 3.0);
  EXPECT_TRUE(record.oddities.empty());
}

TEST(Seg2Reader, PolarityAndTraceTypeSetTheState) {
  EXPECT_EQ(withWords({{"SAMPLE_INTERVAL", "0.001"}, {"POLARITY", "-1"}}).traces[0].state, TraceState::Reversed);
  EXPECT_EQ(withWords({{"SAMPLE_INTERVAL", "0.001"}, {"POLARITY", "+1"}}).traces[0].state, TraceState::Live);
  EXPECT_EQ(withWords({{"SAMPLE_INTERVAL", "0.001"}, {"TRACE_TYPE", "SEISMIC_DATA"}}).traces[0].state,
            TraceState::Live);
  const ShotRecord uphole = withWords({{"SAMPLE_INTERVAL", "0.001"}, {"TRACE_TYPE", "UPHOLE"}});
  EXPECT_EQ(uphole.traces[0].state, TraceState::Dead);
  EXPECT_TRUE(says(uphole, "Trace 1: no seismic data but UPHOLE"));
}

TEST(Seg2Reader, NonsenseInKeywordsIsSaidAndLeftOut) {
  const ShotRecord record = withWords({{"SAMPLE_INTERVAL", "0.001"},
                                       {"DELAY", "soon"},
                                       {"DESCALING_FACTOR", "0"},
                                       {"STACK", "-3"},
                                       {"RECEIVER_LOCATION", "far"}});
  EXPECT_EQ(record.traces[0].delay, 0.0);
  EXPECT_EQ(record.traces[0].descaling, 1.0);
  EXPECT_EQ(record.traces[0].stack, 1);
  EXPECT_FALSE(record.traces[0].receiver);
  EXPECT_TRUE(says(record, "DELAY is not a number"));
  EXPECT_TRUE(says(record, "DESCALING_FACTOR is zero"));
  EXPECT_TRUE(says(record, "STACK is no count"));
  EXPECT_TRUE(says(record, "RECEIVER_LOCATION is not a position"));
  EXPECT_TRUE(says(record, "No trace gives a SOURCE_LOCATION."));
}

TEST(Seg2Reader, WithoutSampleIntervalThereAreNoTimes) {
  ShotRecord record = plainRecord(1);
  auto bytes = bytesOf(record);
  const std::string text(reinterpret_cast<const char*>(bytes.data()), bytes.size());
  bytes[text.find("SAMPLE_INTERVAL")] = std::byte{'X'};
  const auto read = readSeg2Bytes(bytes, "t.sg2");
  ASSERT_FALSE(read);
  EXPECT_EQ(read.message(), "t.sg2 does not say its SAMPLE_INTERVAL in any trace; without it there are no times.");
}

TEST(Seg2Reader, FeetBecomeMetres) {
  auto bytes = bytesOf(plainRecord());
  const std::string text(reinterpret_cast<const char*>(bytes.data()), bytes.size());
  std::memcpy(bytes.data() + text.find("METERS"), "FEET\0\0", 6);
  const ShotRecord record = readOk(bytes);
  EXPECT_NEAR(record.source->x, -2.0 * 0.3048, 1e-12);
  EXPECT_NEAR(record.traces[2].receiver->x, 4.0 * 0.3048, 1e-12);
  EXPECT_TRUE(says(record, "feet"));
}

TEST(Seg2Reader, CountOfAStringThatOverrunsIsPutRightByItsTerminator) {
  auto bytes = bytesOf(plainRecord());
  const std::string text(reinterpret_cast<const char*>(bytes.data()), bytes.size());
  const std::size_t delay = text.find("DELAY");
  store(bytes.data() + delay - 2, std::uint16_t{60000}, ByteOrder::Little);
  ShotRecord record = readOk(bytes);
  EXPECT_EQ(record.traces[0].delay, -0.01);
  EXPECT_EQ(record.traces[0].sampleInterval, 0.001);
  EXPECT_EQ(record.traces[0].receiver->x, 0.0);
  EXPECT_TRUE(says(record, "Trace 1: a string in its header is longer or shorter than its count says"));
  store(bytes.data() + delay - 2, std::uint16_t{9}, ByteOrder::Little);
  record = readOk(bytes);
  EXPECT_EQ(record.traces[0].delay, -0.01);
  EXPECT_EQ(record.traces[0].sampleInterval, 0.001);
}

TEST(Seg2Reader, WrongByteOrderMarkIsSeenThrough) {
  auto bytes = bytesOf(plainRecord());
  std::swap(bytes[0], bytes[1]);
  const ShotRecord record = readOk(bytes);
  EXPECT_EQ(record.traces[2].samples[3], 6.0F);
  EXPECT_TRUE(says(record, "wrong byte order"));
}

TEST(Seg2Reader, PointerTableMayBeLargerOrSmallerThanItsTraces) {
  Seg2WriteOptions roomy;
  roomy.pointerSlots = 1056;
  EXPECT_TRUE(readOk(bytesOf(plainRecord(), roomy)).oddities.empty());
  auto bytes = bytesOf(plainRecord());
  store(bytes.data() + 4, std::uint16_t{4}, ByteOrder::Little);
  const ShotRecord record = readOk(bytes);
  EXPECT_EQ(record.traces.size(), 3u);
  EXPECT_TRUE(says(record, "has room for 1 pointers"));
}

TEST(Seg2Reader, TraceThatCannotBeReadKeepsTheNumbersOfThoseBehind) {
  auto bytes = bytesOf(plainRecord());
  store(bytes.data() + 32 + 4, std::uint32_t{0}, ByteOrder::Little);
  const ShotRecord record = readOk(bytes);
  ASSERT_EQ(record.traces.size(), 3u);
  EXPECT_EQ(record.traces[1].state, TraceState::Dead);
  EXPECT_EQ(record.traces[2].receiver->x, 4.0);
  EXPECT_TRUE(says(record, "Trace 2: missing, its pointer does not lead to a trace"));
}

TEST(Seg2Reader, TruncatedFileGivesWhatIsThereAndSaysWhatIsMissing) {
  auto bytes = bytesOf(plainRecord());
  bytes.resize(bytes.size() - 8);
  ShotRecord record = readOk(bytes);
  ASSERT_EQ(record.traces.size(), 3u);
  EXPECT_EQ(record.traces[2].samples.size(), 2u);
  EXPECT_TRUE(says(record, "Trace 3: cut off, only its first 2 of 4 samples are in the file"));
  bytes.resize(pointerOf(bytes, 1) + 5);
  record = readOk(bytes);
  EXPECT_EQ(record.traces.size(), 1u);
  EXPECT_TRUE(says(record, "Traces 2 and 3: missing, the file ends before it"));
  bytes.resize(pointerOf(bytes, 0));
  EXPECT_EQ(
      readSeg2Bytes(bytes, "t.sg2").message(),
      "t.sg2 holds no trace that can be read (missing, the file ends before it); copy it again from the recorder.");
  bytes.resize(20);
  EXPECT_EQ(readSeg2Bytes(bytes, "t.sg2").message(),
            "t.sg2 is cut off within its first 32 bytes; copy it again from the recorder.");
}

TEST(Seg2Reader, CountAndSizeThatDifferAreSaid) {
  auto bytes = bytesOf(plainRecord());
  store(bytes.data() + pointerOf(bytes, 1) + 8, std::uint32_t{4000000000u}, ByteOrder::Little);
  const ShotRecord record = readOk(bytes);
  EXPECT_EQ(record.traces[1].samples.size(), 4u);
  EXPECT_TRUE(says(record, "Trace 2: its count of samples and the size of its data differ, the size is used"));
}

TEST(Seg2Reader, SamplesThatAreNoNumbersBecomeZero) {
  auto bytes = bytesOf(plainRecord(1));
  store(bytes.data() + bytes.size() - 4, std::numeric_limits<float>::quiet_NaN(), ByteOrder::Little);
  const ShotRecord record = readOk(bytes);
  EXPECT_EQ(record.traces[0].samples, (std::vector<float>{1.0F, 2.0F, 3.0F, 0.0F}));
  EXPECT_TRUE(says(record, "1 of its samples are not numbers"));
}

TEST(Seg2Reader, ForeignLettersBecomeUtf8) {
  EXPECT_EQ(seg2::asUtf8("M\xFCller"), "M\xC3\xBCller");
  EXPECT_EQ(seg2::asUtf8("M\xC3\xBCller"), "M\xC3\xBCller");
  EXPECT_EQ(seg2::asUtf8(std::string_view("a\0b", 3)), "a b");
}

}  // namespace
}  // namespace strikeplate
