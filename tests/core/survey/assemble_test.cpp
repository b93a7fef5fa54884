#include "core/survey/assemble.h"

#include <gtest/gtest.h>

#include "core/survey/merge.h"
#include "core/survey/times.h"

namespace strikeplate {
namespace {

RecordPtr record(const std::string& file, double shotX, int count, double spacing) {
  auto r = std::make_shared<ShotRecord>();
  r->file = file;
  r->source = HeaderPosition{shotX, {}, {}};
  for (int i = 0; i < count; ++i) {
    Trace trace;
    trace.samples.assign(10, 0.0F);
    trace.sampleInterval = 0.001;
    trace.receiver = HeaderPosition{i * spacing, {}, {}};
    r->traces.push_back(trace);
  }
  return r;
}

TEST(Assemble, RecordsOfOneShotPointBecomeItsBlows) {
  const Survey survey = assemble({record("1", -2, 12, 2), record("2", -2.001, 12, 2), record("3", 30, 12, 2)});
  ASSERT_EQ(survey.shots.size(), 2U);
  EXPECT_EQ(survey.shots[0].blows.size(), 2U);
  EXPECT_EQ(survey.shots[1].blows.size(), 1U);
  EXPECT_EQ(survey.geophones.size(), 12U);
  EXPECT_TRUE(survey.remarks.empty());
}

TEST(Assemble, ShotsAreOrderedAlongTheLineWhateverTheFileOrder) {
  const Survey survey = assemble({record("1", 30, 12, 2), record("2", -2, 12, 2)});
  EXPECT_DOUBLE_EQ(survey.shots[0].point.x, -2.0);
  EXPECT_EQ(survey.records[static_cast<std::size_t>(survey.shots[0].blows[0].record)]->file, "2");
}

TEST(Assemble, MissingPositionsAreSaidAndNotSilentlyGuessed) {
  auto r = std::make_shared<ShotRecord>(*record("lost.sg2", 0, 5, 2));
  r->source.reset();
  r->traces[3].receiver.reset();
  const Survey survey = assemble({r});
  ASSERT_EQ(survey.remarks.size(), 2U);
  EXPECT_NE(survey.remarks[0].find("lost.sg2"), std::string::npos);
  EXPECT_DOUBLE_EQ(survey.shots[0].point.x, -1.0);
  EXPECT_DOUBLE_EQ(survey.geophones[4].x, 4.0);
}

TEST(Assemble, ReceiverElevationsMakeTheGround) {
  auto r = std::make_shared<ShotRecord>(*record("hill", 5, 3, 10));
  r->traces[0].receiver->z = 100.0;
  r->traces[1].receiver->z = 102.0;
  r->traces[2].receiver->z = 101.0;
  r->source->z = 101.1;
  const Survey survey = assemble({r});
  EXPECT_DOUBLE_EQ(survey.geophones[1].elevation, 102.0);
  EXPECT_DOUBLE_EQ(survey.shots[0].point.elevation, 101.1);
}

TEST(Assemble, ADepthThatIsSaidOutrightIsTheShotsDepthAndANegativeOneIsSaid) {
  auto r = std::make_shared<ShotRecord>(*record("deep", 5, 3, 10));
  r->sourceDepth = 1.2;
  EXPECT_DOUBLE_EQ(assemble({r}).shots[0].point.depth, 1.2);
  r = std::make_shared<ShotRecord>(*r);
  r->sourceDepth = -1.2;
  const Survey survey = assemble({r});
  EXPECT_DOUBLE_EQ(survey.shots[0].point.depth, 0.0);
  ASSERT_EQ(survey.remarks.size(), 1U);
  EXPECT_NE(survey.remarks[0].find("negative"), std::string::npos);
}

TEST(Assemble, HeadersThatContradictEachOtherAreSaidWithTheRecord) {
  auto r = std::make_shared<ShotRecord>(*record("wild.sg2", -2, 12, 2));
  r->traces[5].receiver->x = 3.0;
  const Survey survey = assemble({r});
  ASSERT_EQ(survey.remarks.size(), 1U);
  EXPECT_EQ(survey.remarks[0], "wild.sg2: the geophones run back and forth; check their positions.");
}

TEST(WithBlowsAligned, StopsWhenAsked) {
  const Survey survey = assemble({record("1", -2, 12, 2), record("2", 30, 12, 2)});
  EXPECT_FALSE(withBlowsAligned(survey, [](double fraction) { return fraction < 0.5; }));
  EXPECT_TRUE(withBlowsAligned(survey));
}

TEST(Merge, ShotsOfASecondSpreadJoinTheLineAndPicksStay) {
  Survey survey = assemble({record("1", -2, 12, 2)});
  survey.shots[0].traces[3].pick = Pick{0.01, 0.0005, 1, PickOrigin::Hand};
  Survey second = assemble({record("2", -2, 12, 2), record("3", 10, 24, 1)});
  const Survey both = merged(survey, second);
  ASSERT_EQ(both.shots.size(), 2U);
  EXPECT_EQ(both.shots[0].blows.size(), 2U);
  EXPECT_EQ(both.shots[0].blows[1].record, 1);
  ASSERT_TRUE(both.shots[0].traces[3].pick.has_value());
  EXPECT_DOUBLE_EQ(both.geophones[static_cast<std::size_t>(both.shots[0].traces[3].geophone)].x, 6.0);
  EXPECT_EQ(both.geophones.size(), 24U);
}

TEST(TravelTimes, HoldUsablePicksWithTheTriggerCorrectionApplied) {
  Survey survey = assemble({record("1", -2, 12, 2)});
  survey.shots[0].triggerCorrection = 0.002;
  survey.shots[0].traces[3].pick = Pick{0.010, 0.0005, 2, PickOrigin::Hand};
  survey.shots[0].traces[4].pick = Pick{0.012, 0.0005, 0, PickOrigin::Automatic};
  survey.shots[0].traces[5].pick = Pick{-0.005, 0.0005, 0, PickOrigin::Automatic};
  survey.shots[0].traces[6].pick = Pick{0.014, 0.0005, 0, PickOrigin::Automatic};
  survey.shots[0].traces[6].state = TraceState::Dead;
  const TravelTimes times = travelTimes(survey);
  ASSERT_EQ(times.arrivals.size(), 2U);
  EXPECT_DOUBLE_EQ(times.arrivals[0].time, 0.012);
  EXPECT_TRUE(times.arrivals[0].layerByHand);
  EXPECT_FALSE(times.arrivals[1].layerByHand);
  EXPECT_EQ(arrivalIndex(times, 0, 4), 1);
  EXPECT_EQ(arrivalIndex(times, 0, 6), -1);
}

}  // namespace
}  // namespace strikeplate
