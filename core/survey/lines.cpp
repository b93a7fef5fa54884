#include "core/survey/lines.h"

#include <algorithm>
#include <cassert>
#include <cstddef>
#include <memory>
#include <utility>

namespace strikeplate {
namespace {

std::size_t at(int index) {
  return static_cast<std::size_t>(index);
}

std::string given(const std::string& own, const std::string& common) {
  return own.empty() ? common : own;
}

// What one job has in common; a line's own date, name and notes stay its own.
SurveyInfo completed(SurveyInfo info, const SurveyInfo& job) {
  for (std::string SurveyInfo::*field :
       {&SurveyInfo::title, &SurveyInfo::client, &SurveyInfo::site, &SurveyInfo::crew, &SurveyInfo::observer,
        &SurveyInfo::source, &SurveyInfo::geophoneType, &SurveyInfo::recorder, &SurveyInfo::datum}) {
    info.*field = given(info.*field, job.*field);
  }
  return info;
}

// The lines in order, the one at hand among them; none of them carries others.
std::vector<OtherLine> lined(const Survey& survey) {
  std::vector<OtherLine> lines = survey.otherLines;
  Survey own = survey;
  own.otherLines.clear();
  own.lineAtHand = 0;
  lines.insert(lines.begin() + survey.lineAtHand, OtherLine{std::make_shared<const Survey>(std::move(own))});
  return lines;
}

Survey atHand(std::vector<OtherLine> lines, int index) {
  Survey survey = *lines[at(index)].line;
  lines.erase(lines.begin() + index);
  survey.otherLines = std::move(lines);
  survey.lineAtHand = index;
  return survey;
}

}  // namespace

bool OtherLine::operator==(const OtherLine& other) const {
  return line == other.line || (line && other.line && *line == *other.line);
}

int lineCount(const Survey& survey) {
  return 1 + static_cast<int>(survey.otherLines.size());
}

Survey withLineAtHand(Survey survey, int index) {
  assert(index >= 0 && index < lineCount(survey));
  return index == survey.lineAtHand ? std::move(survey) : atHand(lined(survey), index);
}

std::vector<Survey> allLines(const Survey& survey) {
  std::vector<Survey> lines;
  for (int index = 0; index < lineCount(survey); ++index) {
    lines.push_back(withLineAtHand(survey, index));
  }
  return lines;
}

std::string lineName(const Survey& survey, int index) {
  assert(index >= 0 && index < lineCount(survey));
  const int place = index - (index > survey.lineAtHand ? 1 : 0);
  const Survey& line = index == survey.lineAtHand ? survey : *survey.otherLines[at(place)].line;
  return given(line.info.line, "Line " + std::to_string(index + 1));
}

namespace edits {

Edit addLine(const Survey& survey, Survey line) {
  assert(line.otherLines.empty());
  line.info = completed(std::move(line.info), survey.info);
  line.settings = survey.settings;
  line.settings.layers = 0;
  std::vector<OtherLine> lines = lined(survey);
  lines.push_back({std::make_shared<const Survey>(std::move(line))});
  const int last = static_cast<int>(lines.size()) - 1;
  Survey after = atHand(std::move(lines), last);
  std::string text = "Add " + lineName(after, last);
  return {std::move(text), {ContentChange{survey, std::move(after)}}};
}

Edit showLine(const Survey& survey, int index) {
  return {"Show " + lineName(survey, index), {LineChange{survey.lineAtHand, index}}};
}

Edit removeLine(const Survey& survey) {
  assert(lineCount(survey) > 1);
  std::vector<OtherLine> lines = lined(survey);
  lines.erase(lines.begin() + survey.lineAtHand);
  return {"Remove " + lineName(survey, survey.lineAtHand),
          {ContentChange{survey, atHand(std::move(lines), std::max(0, survey.lineAtHand - 1))}}};
}

}  // namespace edits
}  // namespace strikeplate
