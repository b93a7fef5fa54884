#include "core/survey/assemble.h"

#include <algorithm>
#include <cmath>
#include <utility>

#include "core/base/numbers.h"
#include "core/line/geometry_checks.h"

namespace strikeplate {
namespace {

/// Where a record's shot and geophones are, after what is missing was filled in.
struct RecordPlaces {
  RecordPtr record;
  int index = 0;
  ShotPoint shot;
  bool shotElevationKnown = false;
  std::optional<double> sourceZ;
  std::vector<Geophone> geophones;
  std::vector<bool> elevationKnown;
};

void placeGeophones(RecordPlaces& places, std::vector<std::string>& remarks) {
  const auto& traces = places.record->traces;
  const bool all = std::all_of(traces.begin(), traces.end(), [](const Trace& t) { return t.receiver.has_value(); });
  if (!all) {
    remarks.push_back(
        places.record->file +
        ": its headers hold no geophone positions; geophones were put every 1 m from 0 m. Correct them in "
        "the geometry table, or load a geometry table with the records.");
  }
  for (std::size_t i = 0; i < traces.size(); ++i) {
    const HeaderPosition p = all ? *traces[i].receiver : HeaderPosition{static_cast<double>(i), {}, {}};
    places.geophones.push_back({p.x, p.z.value_or(0.0)});
    places.elevationKnown.push_back(p.z.has_value());
  }
}

RecordPlaces placesOf(const RecordPtr& record, int index, std::vector<std::string>& remarks) {
  RecordPlaces places;
  places.record = record;
  places.index = index;
  placeGeophones(places, remarks);
  if (record->source) {
    places.shot.x = record->source->x;
    places.sourceZ = record->source->z;
  } else {
    const auto first = std::min_element(places.geophones.begin(), places.geophones.end(),
                                        [](const Geophone& a, const Geophone& b) { return a.x < b.x; });
    places.shot.x = first->x - 1.0;
    remarks.push_back(
        record->file +
        ": its headers hold no shot position; the shot was put 1 m before the first geophone. Correct it in "
        "the geometry table, or load a geometry table with the records.");
  }
  return places;
}

std::vector<Geophone> geophonesOf(const std::vector<RecordPlaces>& all, std::vector<std::string>& remarks) {
  struct Place {
    double x, elevation;
    bool known;
  };
  std::vector<Place> places;
  for (const RecordPlaces& record : all) {
    for (std::size_t i = 0; i < record.geophones.size(); ++i) {
      places.push_back({record.geophones[i].x, record.geophones[i].elevation, record.elevationKnown[i]});
    }
  }
  std::stable_sort(places.begin(), places.end(), [](const Place& a, const Place& b) { return a.x < b.x; });
  std::vector<Geophone> out;
  for (std::size_t i = 0; i < places.size();) {
    std::size_t j = i;
    double sum = 0.0;
    int known = 0;
    double least = 0.0, most = 0.0;
    for (; j < places.size() && places[j].x - places[i].x <= kSamePlace; ++j) {
      if (places[j].known) {
        least = known == 0 ? places[j].elevation : std::min(least, places[j].elevation);
        most = known == 0 ? places[j].elevation : std::max(most, places[j].elevation);
        sum += places[j].elevation;
        ++known;
      }
    }
    if (known > 1 && most - least > 0.05) {
      remarks.push_back("The records give elevations from " + fixed(least, 2) + " to " + fixed(most, 2) +
                        " m for the geophone at " + fixed(places[i].x, 2) + " m; their mean is used.");
    }
    // Where all agree their mean would only add rounding.
    const double elevation = known == 0 ? 0.0 : least == most ? least : sum / known;
    out.push_back({places[i].x, elevation});
    i = j;
  }
  return out;
}

int nearestGeophone(const std::vector<Geophone>& geophones, double x) {
  const auto right = std::lower_bound(geophones.begin(), geophones.end(), x - kSamePlace,
                                      [](const Geophone& g, double value) { return g.x < value; });
  return static_cast<int>(
      std::min<std::ptrdiff_t>(right - geophones.begin(), static_cast<std::ptrdiff_t>(geophones.size()) - 1));
}

// Where the file or a table says the depth outright, the third coordinate is the ground's elevation.
void placeKnownDepth(ShotPoint& shot, const ShotRecord& record, const std::optional<double>& z,
                     std::vector<std::string>& remarks) {
  if (z && *z != 0.0) {
    shot.elevation = *z;
  }
  if (*record.sourceDepth >= 0.0) {
    shot.depth = *record.sourceDepth;
  } else {
    remarks.push_back(record.file + ": its shot depth, " + fixed(*record.sourceDepth, 2) +
                      " m, is negative and was left out; give depths below the ground as positive numbers.");
  }
}

// The third coordinate of a source location is an elevation in some files and a depth below the ground in others: it
// is taken as whichever agrees with the ground, and said when it could be neither.
void placeSource(RecordPlaces& places, const Ground& ground, std::vector<std::string>& remarks) {
  ShotPoint& shot = places.shot;
  const std::optional<double>& z = places.sourceZ;
  const std::string& file = places.record->file;
  shot.elevation = ground.at(shot.x);
  if (places.record->sourceDepth) {
    placeKnownDepth(shot, *places.record, z, remarks);
    return;
  }
  if (!z || *z == 0.0) {
    return;
  }
  constexpr double kNearGround = 3.0;
  constexpr double kDeepestShot = 10.0;
  if (std::abs(*z - shot.elevation) <= kNearGround && std::abs(shot.elevation) > kNearGround) {
    shot.elevation = *z;
  } else if (*z > 0.0 && *z <= kDeepestShot && std::abs(shot.elevation) < 1e-9) {
    shot.depth = *z;
    remarks.push_back(file + ": the third number of its shot location, " + fixed(*z, 2) +
                      " m, was taken as the shot's depth below the ground; check it in the geometry table.");
  } else if (std::abs(*z - shot.elevation) <= kNearGround) {
    shot.elevation = *z;
  } else {
    remarks.push_back(file + ": the third number of its shot location, " + fixed(*z, 2) +
                      " m, is neither near the ground's elevation nor a likely shot depth and was left out.");
  }
}

bool sameShot(const RecordPlaces& a, const RecordPlaces& b) {
  if (std::abs(a.shot.x - b.shot.x) > kSamePlace || std::abs(a.shot.depth - b.shot.depth) > kSamePlace ||
      a.geophones.size() != b.geophones.size()) {
    return false;
  }
  for (std::size_t i = 0; i < a.geophones.size(); ++i) {
    if (std::abs(a.geophones[i].x - b.geophones[i].x) > kSamePlace) {
      return false;
    }
  }
  // Blows are stacked sample by sample, which needs one sampling.
  return std::abs(a.record->traces[0].sampleInterval - b.record->traces[0].sampleInterval) <
         1e-9 + 1e-6 * a.record->traces[0].sampleInterval;
}

Shot newShot(const RecordPlaces& record, const std::vector<Geophone>& geophones) {
  Shot shot;
  shot.point = record.shot;
  for (std::size_t i = 0; i < record.geophones.size(); ++i) {
    ShotTrace trace;
    trace.geophone = nearestGeophone(geophones, record.geophones[i].x);
    trace.state = record.record->traces[i].state;
    if (trace.state != TraceState::Live) {
      trace.stateReason = "said by the header";
    }
    shot.traces.push_back(std::move(trace));
  }
  return shot;
}

}  // namespace

Survey assemble(std::vector<RecordPtr> records) {
  Survey survey;
  std::erase_if(records, [](const RecordPtr& r) { return !r || r->traces.empty(); });
  survey.records = std::move(records);
  std::vector<RecordPlaces> all;
  for (std::size_t i = 0; i < survey.records.size(); ++i) {
    const RecordPtr& record = survey.records[i];
    for (const std::string& oddity : record->oddities) {
      survey.remarks.push_back(record->file + ": " + oddity);
    }
    const auto contradictions = checkHeaders(*record);
    survey.remarks.insert(survey.remarks.end(), contradictions.begin(), contradictions.end());
    all.push_back(placesOf(record, static_cast<int>(i), survey.remarks));
  }
  survey.geophones = geophonesOf(all, survey.remarks);
  const Ground ground(survey.geophones, {});
  std::vector<const RecordPlaces*> firsts;
  for (RecordPlaces& record : all) {
    placeSource(record, ground, survey.remarks);
    std::size_t s = 0;
    while (s < firsts.size() && !sameShot(*firsts[s], record)) {
      ++s;
    }
    if (s == firsts.size()) {
      firsts.push_back(&record);
      survey.shots.push_back(newShot(record, survey.geophones));
    }
    survey.shots[s].blows.push_back({record.index, 0.0, 1.0, true});
  }
  std::stable_sort(survey.shots.begin(), survey.shots.end(),
                   [](const Shot& a, const Shot& b) { return a.point.x < b.point.x; });
  return survey;
}

}  // namespace strikeplate
