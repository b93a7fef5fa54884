#include <random>
#include <string>

#include <gtest/gtest.h>

#include "core/record/seg2_layout.h"
#include "core/record/seg2_reader.h"
#include "core/record/seg2_writer.h"

namespace strikeplate {
namespace {

using Random = std::mt19937;

int between(Random& random, int low, int high) {
  return std::uniform_int_distribution<int>(low, high)(random);
}

bool chance(Random& random) {
  return between(random, 0, 1) == 1;
}

double decimal(Random& random, double scale) {
  return between(random, -100000, 100000) * scale;
}

// A sample that the format code holds exactly.
float sampleFor(int code, Random& random) {
  switch (code) {
    case seg2::kInt16:
      return static_cast<float>(between(random, -32768, 32767));
    case seg2::kInt32:
      return static_cast<float>(between(random, -(1 << 24), 1 << 24) * (1 << between(random, 0, 6)));
    case seg2::kFloat20:
      return static_cast<float>(between(random, -32767, 32767) * (1 << between(random, 0, 15)));
    default:
      return std::uniform_real_distribution<float>(-1e6F, 1e6F)(random);
  }
}

HeaderPosition position(Random& random) {
  HeaderPosition out{decimal(random, 0.01), std::nullopt, std::nullopt};
  if (chance(random)) {
    out.y = decimal(random, 0.001);
    if (chance(random)) {
      out.z = decimal(random, 0.001);
    }
  }
  return out;
}

ShotRecord randomRecord(int code, Random& random) {
  ShotRecord record;
  record.file = "round trip";
  record.format = "SEG-2";
  record.header = {{"COMPANY", "Somebody"}, {"NOTE", "first line\nsecond line"}};
  if (chance(random)) {
    record.source = position(random);
  }
  const int traces = between(random, 1, 5);
  for (int t = 0; t < traces; ++t) {
    Trace trace;
    const int samples = between(random, 1, 40);
    for (int i = 0; i < samples; ++i) {
      trace.samples.push_back(sampleFor(code, random));
    }
    trace.sampleInterval = between(random, 1, 4000) * 1e-6;
    trace.delay = decimal(random, 1e-5);
    trace.descaling = 1.0 / between(random, 1, 100000);
    trace.stack = between(random, 1, 30);
    trace.state = chance(random) ? TraceState::Live : TraceState::Reversed;
    if (chance(random)) {
      trace.receiver = position(random);
    }
    trace.header = {{"RAW_RECORD", std::string(static_cast<std::size_t>(between(random, 0, 9)), 'r')}};
    record.traces.push_back(std::move(trace));
  }
  return record;
}

Seg2WriteOptions randomOptions(Random& random) {
  const std::string stringEnds[] = {"", std::string(1, '\0'), std::string(2, '\0'), std::string("\r\0", 2), "\x1e"};
  const std::string lineEnds[] = {"\n", "\r\n", "\f\n", "\r"};
  Seg2WriteOptions options;
  options.formatCode = between(random, 1, 5);
  options.order = chance(random) ? ByteOrder::Little : ByteOrder::Big;
  options.terminators = {stringEnds[between(random, 0, 4)], lineEnds[between(random, 0, 3)]};
  options.pointerSlots = between(random, 0, 300);
  return options;
}

void expectSamePosition(const std::optional<HeaderPosition>& got, const std::optional<HeaderPosition>& wanted) {
  ASSERT_EQ(got.has_value(), wanted.has_value());
  if (got) {
    EXPECT_EQ(got->x, wanted->x);
    EXPECT_EQ(got->y, wanted->y);
    EXPECT_EQ(got->z, wanted->z);
  }
}

void expectSameTrace(const Trace& got, const Trace& wanted) {
  EXPECT_EQ(got.samples, wanted.samples);
  EXPECT_EQ(got.sampleInterval, wanted.sampleInterval);
  EXPECT_EQ(got.delay, wanted.delay);
  EXPECT_EQ(got.descaling, wanted.descaling);
  EXPECT_EQ(got.stack, wanted.stack);
  EXPECT_EQ(got.state, wanted.state);
  EXPECT_EQ(seg2::find(got.header, "RAW_RECORD"), wanted.header[0].value);
  expectSamePosition(got.receiver, wanted.receiver);
}

TEST(Seg2RoundTrip, WhatIsWrittenIsReadBackExactly) {
  Random random(20260101);
  for (int round = 0; round < 5000; ++round) {
    const Seg2WriteOptions options = randomOptions(random);
    const ShotRecord wanted = randomRecord(options.formatCode, random);
    const auto bytes = seg2Bytes(wanted, options);
    ASSERT_TRUE(bytes) << bytes.message();
    const auto got = readSeg2Bytes(*bytes, wanted.file);
    ASSERT_TRUE(got) << got.message();
    ASSERT_EQ(got->traces.size(), wanted.traces.size());
    expectSamePosition(got->source, wanted.source);
    EXPECT_EQ(seg2::find(got->header, "NOTE"), "first line\nsecond line");
    for (std::size_t t = 0; t < wanted.traces.size(); ++t) {
      expectSameTrace(got->traces[t], wanted.traces[t]);
    }
    for (const std::string& oddity : got->oddities) {
      EXPECT_EQ(oddity.find("count"), std::string::npos) << oddity;
    }
    ASSERT_FALSE(testing::Test::HasFailure()) << "round " << round << ", code " << options.formatCode;
  }
}

TEST(Seg2Writer, SampleThatDoesNotFitIsRefusedWithItsTrace) {
  ShotRecord record;
  record.file = "a.sg2";
  record.traces.resize(2);
  record.traces[0].samples = {1.0F};
  record.traces[1].samples = {1.0F, 40000.0F};
  Seg2WriteOptions options;
  options.formatCode = seg2::kInt16;
  const auto bytes = seg2Bytes(record, options);
  ASSERT_FALSE(bytes);
  EXPECT_EQ(bytes.message(),
            "a.sg2, trace 2: sample 2 (40000) does not fit SEG-2 format code 1; scale the trace or choose code 4.");
}

}  // namespace
}  // namespace strikeplate
