#include "tests/core/survey/random_survey.h"

#include <algorithm>
#include <cstddef>
#include <utility>

namespace strikeplate::testing {
namespace {

int whole(std::mt19937& random, int low, int high) {
  return std::uniform_int_distribution<int>(low, high)(random);
}

double real(std::mt19937& random, double low, double high) {
  return std::uniform_real_distribution<double>(low, high)(random);
}

std::string word(std::mt19937& random) {
  static const std::vector<std::string> kWords = {"",    "Quarry road", "Käthe's field, \"north\"",
                                                  "नदी", "line 4\nbis", "O'Hara"};
  return kWords[static_cast<std::size_t>(whole(random, 0, static_cast<int>(kWords.size()) - 1))];
}

RecordPtr randomRecord(std::mt19937& random, int traces) {
  auto record = std::make_shared<ShotRecord>();
  record->file = "r" + std::to_string(whole(random, 1, 9999)) + ".dat";
  record->format = "SEG-2";
  record->firstTraceInFile = whole(random, 1, 100);
  record->header = {{"ACQUISITION_DATE", word(random)}};
  record->oddities = {word(random)};
  record->checksum = whole(random, 0, 1) == 1 ? "cbf43926" : "";
  if (whole(random, 0, 1) == 1) {
    record->sourceDepth = real(random, 0, 2);
    record->source = HeaderPosition{real(random, -5, 50), real(random, 0, 1), std::nullopt};
  }
  for (int i = 0; i < traces; ++i) {
    Trace trace;
    trace.sampleInterval = 1.25e-4;
    trace.delay = real(random, -0.01, 0.0);
    trace.descaling = real(random, 1e-6, 1e-3);
    trace.stack = whole(random, 1, 8);
    trace.receiver = HeaderPosition{2.0 * i, std::nullopt, real(random, 0, 3)};
    trace.header = {{"RECEIVER_LOCATION", word(random)}};
    trace.samples.resize(64);
    std::generate(trace.samples.begin(), trace.samples.end(),
                  [&] { return static_cast<float>(real(random, -1e4, 1e4)); });
    record->traces.push_back(std::move(trace));
  }
  return record;
}

Pick randomPick(std::mt19937& random) {
  return {real(random, 0, 0.1), real(random, 1e-4, 2e-3), whole(random, 0, 3),
          static_cast<PickOrigin>(whole(random, 0, 2))};
}

std::optional<Pick> maybePick(std::mt19937& random) {
  return whole(random, 0, 3) > 0 ? std::optional<Pick>(randomPick(random)) : std::nullopt;
}

Borehole randomBorehole(std::mt19937& random) {
  return {real(random, 0, 40), whole(random, 2, 4), real(random, 0, 20), 0.1, whole(random, 0, 1) == 1, word(random)};
}

SurveyInfo randomInfo(std::mt19937& random) {
  SurveyInfo info;
  info.title = word(random);
  info.client = word(random);
  info.notes = word(random);
  info.date = word(random);
  info.sheet = {word(random), word(random), word(random), word(random), whole(random, 0, 1) == 1, true, false};
  if (whole(random, 0, 1) == 1) {
    info.map = LineOnMap{{0.0, real(random, -180, 180), real(random, -90, 90)},
                         {real(random, 1, 100), real(random, -180, 180), real(random, -90, 90)}};
  }
  info.tables = {{word(random), "cbf43926"}};
  return info;
}

Shot randomShot(std::mt19937& random, double x, int record, int geophones) {
  Shot shot;
  shot.point = {x, real(random, 0, 3), 0.0};
  shot.blows = {{record, 0.0, 1.0, true}, {record, real(random, -1e-3, 1e-3), 0.97, false}};
  shot.triggerCorrection = real(random, -1e-3, 1e-3);
  for (int g = 0; g < geophones; ++g) {
    shot.traces.push_back({g, TraceState::Live, word(random), maybePick(random)});
  }
  return shot;
}

Edit randomShotEdit(const Survey& survey, std::mt19937& random) {
  const int shot = whole(random, 0, static_cast<int>(survey.shots.size()) - 1);
  const int trace = whole(random, 0, static_cast<int>(survey.geophones.size()) - 1);
  switch (whole(random, 0, 3)) {
    case 0:
      return edits::setTriggerCorrection(survey, shot, real(random, -5e-3, 5e-3));
    case 1:
      return edits::setShotPoint(survey, shot, {real(random, -10, 60), real(random, 0, 3), real(random, 0, 1)});
    case 2:
      return edits::setTraceState(survey, shot, trace, static_cast<TraceState>(whole(random, 0, 3)));
    default:
      return edits::assignLayer(survey, shot, {0, 1, trace}, whole(random, 0, 4));
  }
}

Edit randomContentEdit(const Survey& survey, std::mt19937& random) {
  Survey after = survey;
  const int geophones = static_cast<int>(survey.geophones.size());
  after.records.push_back(randomRecord(random, geophones));
  after.shots.push_back(
      randomShot(random, after.shots.back().point.x + 1.0, static_cast<int>(after.records.size()) - 1, geophones));
  return {"Add a record", {ContentChange{survey, after}}};
}

Edit randomGeophonesEdit(const Survey& survey, std::mt19937& random) {
  std::vector<Geophone> after = survey.geophones;
  for (Geophone& geophone : after) {
    geophone.elevation = real(random, 0, 3);
  }
  return {"Level the line", {GeophonesChange{survey.geophones, after}}};
}

}  // namespace

Survey randomSurvey(std::mt19937& random) {
  Survey survey;
  const int geophones = whole(random, 4, 12);
  for (int g = 0; g < geophones; ++g) {
    survey.geophones.push_back({2.0 * g, real(random, 0, 3)});
  }
  const int shots = whole(random, 2, 5);
  for (int s = 0; s < shots; ++s) {
    survey.records.push_back(randomRecord(random, geophones));
    survey.shots.push_back(randomShot(random, 6.0 * s - 1.0, s, geophones));
  }
  survey.info = randomInfo(random);
  survey.settings = {whole(random, 0, 4), whole(random, 0, 1) == 1, false};
  survey.boreholes = {randomBorehole(random)};
  survey.remarks = {word(random)};
  return survey;
}

Edit randomEdit(const Survey& survey, std::mt19937& random) {
  const int shot = whole(random, 0, static_cast<int>(survey.shots.size()) - 1);
  const int trace = whole(random, 0, static_cast<int>(survey.geophones.size()) - 1);
  switch (whole(random, 0, 9)) {
    case 0:
      return edits::setInfo(survey, randomInfo(random));
    case 1:
      return edits::setSettings(survey, {whole(random, 0, 6), whole(random, 0, 1) == 1, true}, word(random));
    case 2:
      return edits::setBoreholes(survey, {randomBorehole(random), randomBorehole(random)}, word(random));
    case 3:
      return randomContentEdit(survey, random);
    case 4:
      return randomGeophonesEdit(survey, random);
    case 5:
      return edits::setPicks(survey, {{shot, 0, {}, maybePick(random)}, {shot, 1, {}, maybePick(random)}},
                             word(random));
    case 6:
    case 7:
      return randomShotEdit(survey, random);
    default:
      return edits::setPick(survey, shot, trace, maybePick(random), "Move a pick");
  }
}

}  // namespace strikeplate::testing
