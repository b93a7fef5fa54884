#include "core/report/sheet_checklist.h"

#include <algorithm>
#include <cmath>
#include <set>
#include <utility>

#include "core/base/numbers.h"
#include "core/report/sheet_parts.h"

namespace strikeplate {
namespace {

constexpr std::size_t kLongestAnswer = 1400;  // letters: what page 1 holds for certain

using Field = std::pair<const char*, const std::string&>;

// "Not given: client, site (Edit, Job, client and crew)."
std::string notGiven(const std::vector<Field>& fields) {
  std::string names;
  for (const auto& [name, value] : fields) {
    if (trimmed(value).empty()) {
      names += (names.empty() ? "" : ", ") + std::string(name);
    }
  }
  return names.empty() ? "" : "Not given: " + names + " (Edit, Job, client and crew).";
}

std::string positions(const Survey& survey) {
  if (survey.geophones.empty() || survey.shots.empty()) {
    return "There are no geophones or no shots.";
  }
  const auto level = [](double elevation) { return elevation == 0.0; };
  const bool flat = std::all_of(survey.geophones.begin(), survey.geophones.end(),
                                [&](const Geophone& g) { return level(g.elevation); });
  if (flat) {
    return "All geophones stand at elevation 0; if the ground is not level, give their elevations.";
  }
  return trimmed(survey.info.datum).empty() ? "The elevations have no datum; say what they are counted from." : "";
}

// Reversed cover: shots at or beyond both ends, so that dip and velocity can be told apart.
std::string layout(const Survey& survey) {
  if (survey.geophones.size() < 2) {
    return "There are fewer than two geophones.";
  }
  const double spacing =
      (survey.geophones.back().x - survey.geophones.front().x) / static_cast<double>(survey.geophones.size() - 1);
  const double left = survey.geophones.front().x + spacing;
  const double right = survey.geophones.back().x - spacing;
  bool before = false, behind = false;
  for (const Shot& shot : survey.shots) {
    before = before || shot.point.x <= left;
    behind = behind || shot.point.x >= right;
  }
  return before && behind ? "" : "Shots at one end only: dip and velocity cannot be told apart; shoot the other end.";
}

std::string picked(const Survey& survey) {
  int live = 0, picks = 0, automatic = 0;
  for (const Shot& shot : survey.shots) {
    for (const ShotTrace& trace : shot.traces) {
      live += trace.state != TraceState::Dead ? 1 : 0;
      picks += trace.state != TraceState::Dead && trace.pick ? 1 : 0;
      automatic +=
          trace.state != TraceState::Dead && trace.pick && trace.pick->origin == PickOrigin::Automatic ? 1 : 0;
    }
  }
  if (picks < live || live == 0) {
    return counted(live - picks, "live trace has", "live traces have") +
           " no first break; pick them or set their state.";
  }
  return automatic == picks ? "Every pick is the program's own; look at the records before the sheet leaves." : "";
}

std::string reciprocity(const Interpretation& interpretation) {
  if (interpretation.reciprocals.empty()) {
    return "No two shots could be read at each other's place; shots near geophones at both ends would allow it.";
  }
  const auto beyond = std::count_if(interpretation.reciprocals.begin(), interpretation.reciprocals.end(),
                                    [](const ReciprocalPair& p) { return std::abs(p.difference()) > p.tolerance; });
  return beyond == 0 ? ""
                     : counted(static_cast<int>(beyond), "reciprocal pair lies", "reciprocal pairs lie") +
                           " beyond the tolerance; look at those shots' triggers and picks.";
}

std::string corrections(const Survey& survey, const Interpretation& interpretation) {
  const bool corrected =
      std::any_of(survey.shots.begin(), survey.shots.end(), [](const Shot& s) { return s.triggerCorrection != 0.0; });
  const auto& delays = interpretation.section.triggerDelays;
  const bool solved = std::any_of(delays.begin(), delays.end(), [](const Estimate& e) { return e.determined; });
  return (corrected || solved) && trimmed(survey.info.notes).empty()
             ? "Times were corrected for the trigger; say why in the survey's notes."
             : "";
}

std::string result(const SheetSource& source) {
  const Section& section = source.interpretation.section;
  if (!section.determined) {
    return "The depth is not determined: " + sentence(section.reason);
  }
  const std::vector<std::string> warnings = sheetWarnings(source);
  return warnings.empty() ? "" : warnings.front();
}

std::string alternatives(const Interpretation& interpretation) {
  std::set<std::string> routes;
  for (const Opinion& opinion : interpretation.opinions) {
    if (opinion.depth.determined) {
      routes.insert(opinion.route);
    }
  }
  return routes.size() >= 2 ? "" : "Fewer than two other methods give a depth; more shots would let them.";
}

std::string control(const Survey& survey) {
  if (survey.boreholes.empty()) {
    return "No borehole or trial pit is given; nothing ties the depths to the ground.";
  }
  return "";
}

std::string answerFits(const SheetSource& source) {
  const SheetOptions& options = source.options;
  if (options.answer.size() > kLongestAnswer) {
    return "The answer is longer than page 1 holds and would be cut; two sentences do.";
  }
  return answerIsOld(source.survey, source.interpretation, options)
             ? "The interpretation has changed since the answer was written; read it again, or take the draft."
             : "";
}

std::string onTheMap(const Survey& survey) {
  if (!survey.info.map) {
    return "The line has no place on the map; give two of its points in WGS 84 (Edit, Job, client and crew).";
  }
  return faultOf(*survey.info.map);
}

std::string archive(const SheetSource& source) {
  const std::vector<SheetFile> files = sheetFiles(source);
  const auto unknown =
      std::count_if(files.begin(), files.end(), [](const SheetFile& f) { return f.checksum.empty(); });
  if (files.empty()) {
    return "No input file is known.";
  }
  return unknown == 0 ? ""
                      : counted(static_cast<int>(unknown), "input file is", "input files are") +
                            " without a checksum; read the records again to have it kept.";
}

}  // namespace

std::vector<SheetCheck> sheetChecklist(const Survey& survey, const Interpretation& interpretation,
                                       const SheetOptions& options) {
  const SurveyInfo& info = survey.info;
  const SheetSource source{survey, interpretation, options, SheetWords::of(survey, 0.0)};
  return {
      {"Purpose: the client's question", trimmed(options.question).empty()
                                             ? "Only the general question would be printed; write the client's own."
                                             : ""},
      {"An answer that fits page and section", answerFits(source)},
      {"Client, site, line, date",
       notGiven({{"client", info.client}, {"site", info.site}, {"line", info.line}, {"date", info.date}})},
      {"Crew, observer, weather and ground",
       notGiven({{"crew", info.crew}, {"observer", info.observer}, {"weather and ground", info.weather}})},
      {"Source, geophones, recorder",
       notGiven({{"source", info.source}, {"geophone type", info.geophoneType}, {"recorder", info.recorder}})},
      {"Places and elevations", positions(survey)},
      {"Line on the map", onTheMap(survey)},
      {"Shots at both ends", layout(survey)},
      {"First breaks", picked(survey)},
      {"Records with picks shown", options.records ? "" : "Records are not printed; tick them to add their pages."},
      {"Reciprocal times", reciprocity(interpretation)},
      {"Corrections and their reasons", corrections(survey, interpretation)},
      {"Depths with intervals", result(source)},
      {"Other interpretations", alternatives(interpretation)},
      {"Boreholes", control(survey)},
      {"Input files", archive(source)},
      {"Responsible person", trimmed(options.signatory).empty()
                                 ? "No licensed professional is named; the room for the name stays empty."
                                 : ""},
  };
}

}  // namespace strikeplate
