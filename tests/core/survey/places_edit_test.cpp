#include "core/survey/places_edit.h"

#include <algorithm>
#include <map>

#include <gtest/gtest.h>

#include "core/survey/edit_check.h"
#include "tests/core/report/sheet_sample.h"

namespace strikeplate {
namespace {

Survey sampleSurvey() {
  return testing::sheetSample().survey;
}

/// Pick time by the record and the trace it was made on, which no geometry changes.
std::map<std::pair<int, std::size_t>, double> picksByRecord(const Survey& survey) {
  std::map<std::pair<int, std::size_t>, double> picks;
  for (const Shot& shot : survey.shots) {
    for (std::size_t t = 0; t < shot.traces.size(); ++t) {
      if (shot.traces[t].pick) {
        picks[{shot.blows.front().record, t}] = shot.traces[t].pick->time;
      }
    }
  }
  return picks;
}

TEST(PlacesEdit, NothingMovedIsAnEditWithoutChanges) {
  const Survey survey = sampleSurvey();
  const auto edit = placesEdit(survey, placesOf(survey), "Change the geometry");
  ASSERT_TRUE(edit.ok());
  EXPECT_TRUE(edit->changes.empty());
}

TEST(PlacesEdit, AShiftedLineKeepsItsNumbersAndPicks) {
  const Survey survey = sampleSurvey();
  LinePlaces places = placesOf(survey);
  for (Geophone& geophone : places.geophones) {
    geophone.x += 100.0;
  }
  for (ShotPoint& shot : places.shots) {
    shot.x += 100.0;
  }
  const auto edit = placesEdit(survey, places, "Change the geometry");
  ASSERT_TRUE(edit.ok());
  EXPECT_TRUE(editFits(survey, *edit));
  EXPECT_EQ(edit->changes.size(), 1U + survey.shots.size()) << "geophones at once, each shot for itself";
  const Survey after = applied(survey, *edit);
  EXPECT_EQ(placesOf(after), places);
  EXPECT_EQ(picksByRecord(after), picksByRecord(survey));
  EXPECT_EQ(applied(after, inverted(*edit)), survey);
}

TEST(PlacesEdit, AReversedLineRisesAgainAndTurnsBackToItself) {
  const Survey survey = sampleSurvey();
  const auto edit = placesEdit(survey, reversed(placesOf(survey)), "Reverse the line");
  ASSERT_TRUE(edit.ok());
  EXPECT_TRUE(editFits(survey, *edit));
  const Survey after = applied(survey, *edit);
  const auto left = [](const auto& a, const auto& b) { return a.x < b.x; };
  EXPECT_TRUE(std::is_sorted(after.geophones.begin(), after.geophones.end(), left));
  EXPECT_TRUE(std::is_sorted(after.shots.begin(), after.shots.end(),
                             [](const Shot& a, const Shot& b) { return a.point.x < b.point.x; }));
  EXPECT_EQ(picksByRecord(after), picksByRecord(survey));
  for (const Shot& shot : after.shots) {
    const auto was =
        std::find_if(survey.shots.begin(), survey.shots.end(), [&](const Shot& s) { return s.blows == shot.blows; });
    ASSERT_NE(was, survey.shots.end());
    for (std::size_t t = 0; t < shot.traces.size(); ++t) {
      const double offsetNow = after.geophones[static_cast<std::size_t>(shot.traces[t].geophone)].x - shot.point.x;
      const double offsetThen = survey.geophones[static_cast<std::size_t>(was->traces[t].geophone)].x - was->point.x;
      EXPECT_NEAR(offsetNow, -offsetThen, 1e-9);
    }
  }
  EXPECT_NEAR(after.boreholes[0].x, 94.0 - survey.boreholes[0].x, 1e-9) << "geophones stand from 0 to 94 m";
  const Survey again = applied(after, *placesEdit(after, reversed(placesOf(after)), "Reverse the line"));
  EXPECT_EQ(placesOf(again), placesOf(survey));
}

TEST(PlacesEdit, AGeophoneThatPassesAnotherTakesItsTracesAlong) {
  const Survey survey = sampleSurvey();
  LinePlaces places = placesOf(survey);
  places.geophones[3].x = 9.0;  // between the fifth (8 m) and the sixth (10 m)
  const auto edit = placesEdit(survey, places, "Change the geometry");
  ASSERT_TRUE(edit.ok());
  const Survey after = applied(survey, *edit);
  EXPECT_DOUBLE_EQ(after.geophones[4].x, 9.0);
  EXPECT_EQ(after.shots[0].traces[3].geophone, 4);
  EXPECT_EQ(after.shots[0].traces[4].geophone, 3);
  EXPECT_EQ(after.shots[0].traces[3].pick, survey.shots[0].traces[3].pick);
}

TEST(PlacesEdit, TwoGeophonesAtOnePlaceAreOneSentence) {
  const Survey survey = sampleSurvey();
  LinePlaces places = placesOf(survey);
  places.geophones[3].x = places.geophones[7].x + 0.001;
  const auto edit = placesEdit(survey, places, "Change the geometry");
  ASSERT_FALSE(edit.ok());
  EXPECT_EQ(edit.message(), "Geophones 8 and 4 both stand at 14.00 m; give one of them its own position.");
}

}  // namespace
}  // namespace strikeplate
