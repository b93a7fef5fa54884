#include "core/record/trace_state.h"

#include <cmath>
#include <numbers>
#include <random>

#include <gtest/gtest.h>

#include "core/record/seg2_reader.h"
#include "tests/core/record/test_files.h"

namespace strikeplate {
namespace {

std::vector<ShotRecord> readAll(const std::vector<std::string>& names) {
  std::vector<ShotRecord> records;
  for (const std::string& name : names) {
    auto record = readSeg2(kTestData + "/" + name);
    EXPECT_TRUE(record) << record.message();
    records.push_back(std::move(*record));
  }
  return records;
}

std::vector<std::vector<TraceVerdict>> judge(const std::vector<ShotRecord>& records) {
  std::vector<const ShotRecord*> pointers;
  for (const ShotRecord& record : records) {
    pointers.push_back(&record);
  }
  return judgeLine(pointers);
}

TEST(TraceState, DeadChannelOfThePracticeLineIsFoundAndNoOther) {
  const auto verdicts = judge(
      readAll({"practice/s05_faults_1001.sg2", "practice/s05_faults_1004.sg2", "practice/s05_faults_1009.sg2"}));
  for (const auto& row : verdicts) {
    for (std::size_t t = 0; t < row.size(); ++t) {
      EXPECT_EQ(row[t].state == TraceState::Dead, t + 1 == 5) << "trace " << t + 1 << ": " << row[t].reason;
    }
    EXPECT_NE(row[4].reason.find("times weaker than the traces beside it"), std::string::npos);
  }
}

TEST(TraceState, NothingIsFoundOnTheRealLineAndInHeavyNoise) {
  auto verdicts =
      judge(readAll({"hammer_line/6.dat", "hammer_line/7.dat", "hammer_line/26.dat", "hammer_line/30.dat"}));
  for (auto& row : judge(readAll({"practice/s05_heavy_1002.sg2"}))) {
    verdicts.push_back(row);
  }
  for (const auto& row : verdicts) {
    for (const TraceVerdict& verdict : row) {
      EXPECT_EQ(verdict.state, TraceState::Live) << verdict.reason;
    }
  }
}

// Noise of 0.01, and from 20 ms on a wave of amplitude 1 on every trace.
ShotRecord madeRecord(unsigned seed) {
  std::mt19937 random(seed);
  std::normal_distribution<double> noise(0.0, 0.01);
  ShotRecord record;
  record.file = "made";
  record.source = HeaderPosition{-2.0, {}, {}};
  for (int t = 0; t < 8; ++t) {
    Trace trace;
    trace.sampleInterval = 0.00025;
    trace.delay = -0.02;
    trace.receiver = HeaderPosition{2.0 * t, {}, {}};
    for (int i = 0; i < 800; ++i) {
      const double time = trace.timeOf(i) - 0.02;
      const double wave = time > 0.0 ? std::sin(2.0 * std::numbers::pi * 60.0 * time) : 0.0;
      trace.samples.push_back(static_cast<float>(wave + noise(random)));
    }
    record.traces.push_back(std::move(trace));
  }
  return record;
}

TEST(TraceState, FlatTraceAndTraceWithoutAWaveAreDead) {
  ShotRecord record = madeRecord(1);
  std::fill(record.traces[2].samples.begin(), record.traces[2].samples.end(), 17.0F);
  std::mt19937 random(9);
  std::normal_distribution<float> noise(0.0F, 0.3F);
  for (float& sample : record.traces[5].samples) {
    sample = noise(random);
  }
  const auto verdicts = judgeTraces(record);
  EXPECT_EQ(verdicts[2], (TraceVerdict{TraceState::Dead, "flat, all its samples are the same"}));
  EXPECT_EQ(verdicts[5].state, TraceState::Dead);
  EXPECT_NE(verdicts[5].reason.find("no wave in it"), std::string::npos) << verdicts[5].reason;
  EXPECT_EQ(verdicts[4].state, TraceState::Live);
}

TEST(TraceState, NoiseThatDrownsItsWaveIsNoisy) {
  ShotRecord record = madeRecord(1);
  std::mt19937 random(9);
  std::normal_distribution<float> noise(0.0F, 0.4F);
  for (float& sample : record.traces[3].samples) {
    sample += noise(random);
  }
  const auto verdicts = judgeTraces(record);
  EXPECT_EQ(verdicts[3].state, TraceState::Noisy);
  EXPECT_NE(verdicts[3].reason.find("times that of the traces beside it"), std::string::npos) << verdicts[3].reason;
}

TEST(TraceState, WhatTheHeaderSaysStands) {
  ShotRecord record = madeRecord(1);
  record.traces[1].state = TraceState::Reversed;
  EXPECT_EQ(judgeTraces(record)[1], (TraceVerdict{TraceState::Reversed, "according to the file's header"}));
}

TEST(TraceState, ChannelDeadOnMostRecordsIsDeadOnAll) {
  std::vector<ShotRecord> records = {madeRecord(1), madeRecord(2), madeRecord(3)};
  for (const std::size_t r : {0u, 1u}) {
    std::fill(records[r].traces[4].samples.begin(), records[r].traces[4].samples.end(), 0.0F);
  }
  const auto verdicts = judge(records);
  EXPECT_EQ(verdicts[2][4], (TraceVerdict{TraceState::Dead, "dead on 2 of 3 records of this spread"}));
  EXPECT_EQ(verdicts[2][3].state, TraceState::Live);
}

TEST(TraceState, SingleTraceIsLive) {
  ShotRecord record = madeRecord(1);
  record.traces.resize(1);
  EXPECT_EQ(judgeTraces(record)[0].state, TraceState::Live);
}

}  // namespace
}  // namespace strikeplate
