#include <algorithm>
#include <cmath>
#include <limits>
#include <utility>

#include "core/base/numbers.h"
#include "core/report/sheet_parts.h"

namespace strikeplate {
namespace {

// The least and the largest of what is looked at.
struct Span {
  double low = std::numeric_limits<double>::infinity();
  double high = -std::numeric_limits<double>::infinity();

  void take(double value) {
    low = std::min(low, value);
    high = std::max(high, value);
  }
  [[nodiscard]] bool empty() const { return low > high; }
};

std::string given(const std::string& text) {
  const std::string_view words = trimmed(text);
  return words.empty() ? kNotGiven : std::string(words);
}

// One number, or two when the texts differ.
std::string spanText(const Span& span, double scale, int decimals, const std::string& unit) {
  if (span.empty()) {
    return kNotGiven;
  }
  const std::string low = fixed(span.low * scale, decimals);
  const std::string high = fixed(span.high * scale, decimals);
  return (low == high ? low : low + " to " + high) + " " + unit;
}

std::string geophonesText(const SheetSource& source) {
  const std::vector<Geophone>& geophones = source.survey.geophones;
  if (geophones.empty()) {
    return kNotGiven;
  }
  Span spacing;
  for (std::size_t i = 1; i < geophones.size(); ++i) {
    spacing.take(source.words.units.fromMetres(geophones[i].x - geophones[i - 1].x));
  }
  const std::string unit = source.words.units.lengthUnit();
  std::string text = std::to_string(geophones.size());
  if (!spacing.empty()) {
    text += ", " + spanText(spacing, 1.0, 2, unit) + " apart";
  }
  return text + ", at " + source.words.units.lengthRange(geophones.front().x, geophones.back().x);
}

std::string shotsText(const SheetSource& source) {
  const std::vector<Shot>& shots = source.survey.shots;
  if (shots.empty()) {
    return kNotGiven;
  }
  Span x;
  for (const Shot& shot : shots) {
    x.take(source.words.units.fromMetres(shot.point.x));
  }
  return std::to_string(shots.size()) + ", at " + spanText(x, 1.0, 1, source.words.units.lengthUnit());
}

// Blows summed for each shot point: those put together here, each with what its file had already summed.
std::string stackText(const Survey& survey) {
  Span blows;
  for (const Shot& shot : survey.shots) {
    int count = 0;
    for (const Blow& blow : shot.blows) {
      const ShotRecord& record = *survey.records[static_cast<std::size_t>(blow.record)];
      count += blow.used && !record.traces.empty() ? std::max(1, record.traces.front().stack) : 0;
    }
    if (!shot.blows.empty()) {
      blows.take(count);
    }
  }
  return blows.empty() ? kNotGiven : spanText(blows, 1.0, 0, "at each shot point");
}

struct Sampling {
  Span interval, length, delay;
};

Sampling samplingOf(const Survey& survey) {
  Sampling sampling;
  for (const RecordPtr& record : survey.records) {
    for (const Trace& trace : record->traces) {
      sampling.interval.take(trace.sampleInterval);
      sampling.length.take(static_cast<double>(trace.samples.size()) * trace.sampleInterval);
      sampling.delay.take(trace.delay);
    }
  }
  return sampling;
}

std::string elevationText(const SheetSource& source) {
  Span elevation;
  for (const Geophone& geophone : source.survey.geophones) {
    elevation.take(source.words.units.fromMetres(geophone.elevation));
  }
  return spanText(elevation, 1.0, 1, source.words.units.lengthUnit());
}

}  // namespace

std::vector<SheetField> sheetHead(const SheetSource& source) {
  const SurveyInfo& info = source.survey.info;
  const Sampling sampling = samplingOf(source.survey);
  return {{"Client", given(info.client)},
          {"Site", given(info.site)},
          {"Line", given(info.line)},
          {"Date", given(info.date)},
          {"Crew", given(info.crew)},
          {"Observer", given(info.observer)},
          {"Source", given(info.source)},
          {"Weather, ground", given(info.weather)},
          {"Geophones", geophonesText(source)},
          {"Geophone type", given(info.geophoneType)},
          {"Shot points", shotsText(source)},
          {"Blows summed", stackText(source.survey)},
          {"Recorder", given(info.recorder)},
          {"Sample interval", spanText(sampling.interval, 1e3, 4, "ms")},
          {"Record length", spanText(sampling.length, 1e3, 1, "ms")},
          {"Recording delay", spanText(sampling.delay, 1e3, 2, "ms")},
          {"Elevations", elevationText(source)},
          {"Datum", given(info.datum)}};
}

}  // namespace strikeplate
