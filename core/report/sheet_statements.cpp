#include <algorithm>
#include <array>
#include <set>
#include <string_view>

#include "core/base/numbers.h"
#include "core/report/sheet_parts.h"

namespace strikeplate {
namespace {

struct Source {
  std::string_view word;  // found in the route's name
  const char* text;
};

// Publications of the hand methods, found by what their route is called.
constexpr std::array<Source, 14> kSources = {{
    {"crossover", "Redpath (1973) AD-768 710"},
    {"critical", "Sheriff & Geldart (1995) Exploration Seismology"},
    {"reflection", "Sheriff & Geldart (1995) Exploration Seismology"},
    {"dip", "Mota (1954) Geophysics 19, 242-254; Johnson (1976) Geophysics 41, 418-424"},
    {"intercept", "Ewing, Woollard & Vine (1939) GSA Bulletin 50, 257-296"},
    {"flat", "Ewing, Woollard & Vine (1939) GSA Bulletin 50, 257-296"},
    {"plus-minus", "Hagedoorn (1959) Geophysical Prospecting 7, 158-182"},
    {"generalized reciprocal", "Palmer (1981) Geophysics 46, 1508-1518"},
    {"reciprocal", "Hawkins (1961) Geophysics 26, 806"},
    {"delay", "Gardner (1939) Geophysics 4, 247-259"},
    {"time-term", "Scheidegger & Willmore (1957) Geophysics 22, 9-22"},
    {"time term", "Scheidegger & Willmore (1957) Geophysics 22, 9-22"},
    {"diving", "Slotnick (1959) Lessons in Seismic Computing"},
    {"gradient", "Slotnick (1959) Lessons in Seismic Computing"},
}};

std::string methodLine(const std::string& route) {
  const std::string name = lowered(route);
  const auto source = std::find_if(kSources.begin(), kSources.end(),
                                   [&name](const Source& s) { return name.find(s.word) != std::string::npos; });
  return "Second opinion, " + route + (source == kSources.end() ? "." : ": " + std::string(source->text) + ".");
}

bool hasPicksOf(const Survey& survey, PickOrigin origin) {
  return std::any_of(survey.shots.begin(), survey.shots.end(), [origin](const Shot& shot) {
    return std::any_of(shot.traces.begin(), shot.traces.end(),
                       [origin](const ShotTrace& trace) { return trace.pick && trace.pick->origin == origin; });
  });
}

}  // namespace

std::vector<std::string> sheetLimitations(const SheetSource& source) {
  std::vector<std::string> lines = sheetReach(source);
  const std::vector<std::string> always = {
      "Refraction sees a layer only when it is faster than all above it. A slower layer under a faster one sends "
      "back no first arrival; the depths below it are then too large.",
      "A layer that is too thin for its waves to arrive first anywhere stays hidden; the depths below it are then "
      "too small.",
      "A depth is an average over the part of the interface that the ray touches, measured square to it, and not a "
      "point below a geophone; rock beside the line can arrive first.",
      "A velocity is not a material: wet sand, till and weathered rock overlap, and the water table near " +
          source.words.units.velocity(1500.0) + " can hide a change of ground.",
      "Boundaries may be gradual. Pavement, frozen ground and buried pipes can give early arrivals that are not the "
      "ground's.",
      "The 95 % intervals hold if the ground is layered as assumed. They do not cover a wrong number of layers, a "
      "hidden layer, or wrong positions."};
  lines.insert(lines.end(), always.begin(), always.end());
  if (source.survey.geophones.size() > 1) {
    lines.push_back(
        "Valid for this line, " +
        source.words.units.lengthRange(source.survey.geophones.front().x, source.survey.geophones.back().x) +
        ", on the day of the survey only; nothing is said about the ground beyond it.");
  }
  return lines;
}

std::vector<std::string> sheetMethods(const SheetSource& source) {
  std::vector<std::string> lines;
  if (hasPicksOf(source.survey, PickOrigin::Automatic)) {
    lines.emplace_back(
        "Automatic first breaks: onset by the Akaike information criterion, Maeda (1985) Zisin 38, 365-379.");
  }
  if (source.interpretation.section.determined) {
    lines.emplace_back(
        "Section: all used picks inverted together for layer velocities and interfaces; head waves by Fermat's "
        "principle through the layered ground; each interface a plane plus a Gaussian process along the line, "
        "Rasmussen & Williams (2006) Gaussian Processes for Machine Learning; intervals from the posterior "
        "covariance, Tarantola (2005) Inverse Problem Theory.");
  }
  if (!sheetReach(source).empty()) {
    lines.emplace_back(
        "Hidden-layer allowance: Soske (1959) Geophysics 24, 359-365; Green (1962) Geophysical Prospecting 10, "
        "166-170. Reach: travel times of flat layers, Sheriff & Geldart (1995) Exploration Seismology.");
  }
  std::set<std::string> routes;
  for (const Opinion& opinion : source.interpretation.opinions) {
    routes.insert(opinion.route);
  }
  for (const std::string& route : routes) {
    lines.push_back(methodLine(route));
  }
  if (lines.empty()) {
    lines.emplace_back("No method was used: there is nothing to interpret.");
  }
  return lines;
}

std::string sheetCautionShort() {
  return "This is an interpretation, not a measurement of depth. Confirm it by drilling or trial pits before design, "
         "digging or building; local codes and a licensed professional decide. Page 2 says what the line cannot see.";
}

std::vector<std::string> sheetCautions() {
  return {
      "Interpretation, not fact: other ground can explain the same times. Verify by drilling or trial pits before "
      "any design rests on it.",
      "Digging, trenching, building: local codes, the owner of the works and a licensed professional decide, not "
      "this sheet.",
      "Buried services: have them located and marked before driving spikes, striking plates, drilling or digging.",
      "Hammer: eye, ear and foot protection, a sound handle, a clear circle of 3 m (10 ft), a warning before each "
      "blow.",
      "Explosives: only by licensed people under local law; no radio near electric detonators.",
      "Traffic, overhead lines, lightning, slopes and weather: a plan for each before the crew lays cable.",
  };
}

}  // namespace strikeplate
