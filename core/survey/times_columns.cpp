// What the columns of a table of travel times hold, by their names.
#include <algorithm>
#include <cmath>
#include <initializer_list>

#include "core/base/numbers.h"
#include "core/survey/times_table.h"

namespace strikeplate {
namespace {

constexpr double kMostSeconds = 5.0;  // no first break of a near-surface line is later

bool has(const std::string& name, std::initializer_list<const char*> words) {
  return std::any_of(words.begin(), words.end(),
                     [&name](const char* word) { return name.find(word) != std::string::npos; });
}

// The words of a name, set apart by blanks: "Time (ms)" is " time ms ".
std::string wordsOf(const std::string& column) {
  std::string words = " ";
  for (const char c : lowered(column)) {
    const bool letter = (c >= 'a' && c <= 'z') || (c >= '0' && c <= '9') || static_cast<unsigned char>(c) >= 0x80;
    if (letter || words.back() != ' ') {
      words += letter ? c : ' ';
    }
  }
  return words.back() == ' ' ? words : words + " ";
}

std::optional<TimesField> meant(const std::string& words) {
  const bool shot = has(words, {" shot", " source", " sp ", " sx "});
  const bool geophone = has(words, {" geophone", " receiver", " station", " phone", " detector", " gx ", " rx "});
  if (has(words, {" elev", " height", " level", " z "})) {
    return shot ? TimesField::ShotElevation : TimesField::GeophoneElevation;
  }
  if (has(words, {" trigger", " correction"})) {
    return TimesField::TriggerCorrection;
  }
  if (has(words, {" sigma", " error", " uncertainty", " std"})) {
    return TimesField::Sigma;
  }
  if (has(words, {" depth"})) {
    return TimesField::ShotDepth;
  }
  if (has(words, {" origin"})) {
    return TimesField::Origin;
  }
  if (has(words, {" layer"})) {
    return TimesField::Layer;
  }
  if (has(words, {" offset", " distance"})) {
    return TimesField::Offset;
  }
  if (has(words, {" time", " pick", " first break", " arrival", " t ", " ms "}) && !shot) {
    return TimesField::Time;
  }
  if (shot) {
    return TimesField::ShotX;
  }
  if (geophone || has(words, {" x ", " position"})) {
    return TimesField::GeophoneX;
  }
  return std::nullopt;
}

// Of a column that numbers files or traces nothing is meant, though its name may speak of geophones.
bool numbersThings(const std::string& words) {
  return has(words, {" file", " trace", " number", " no ", " id ", " index", " channel"});
}

double largest(const CsvTable& table, std::size_t column) {
  double most = 0.0;
  for (const auto& row : table.rows) {
    most = std::max(most, std::abs(parseNumber(row[column]).value_or(0.0)));
  }
  return most;
}

// Turns one column of geophones and a column of times for each shot into a row for each time; nothing when the table
// is not of that kind.
std::optional<CsvTable> unfolded(const CsvTable& table) {
  if (table.columns.size() < 2) {
    return std::nullopt;
  }
  std::vector<std::string> shots;
  for (std::size_t c = 1; c < table.columns.size(); ++c) {
    // "shot at 12.5 m" names its shot as well as "12.5" does; " s " or a word alone does not.
    std::string text = lowered(table.columns[c]);
    for (const std::string word : {"shot at", "shot", "source", "sp"}) {
      if (text.compare(0, word.size(), word) == 0) {
        text.erase(0, word.size());
        break;
      }
    }
    text = std::string(trimmed(text));
    for (const std::string unit : {" m", "m", " ft", "ft"}) {
      if (text.size() > unit.size() && text.compare(text.size() - unit.size(), unit.size(), unit) == 0) {
        text.erase(text.size() - unit.size());
        break;
      }
    }
    if (!parseNumber(text)) {
      return std::nullopt;
    }
    shots.push_back(text);
  }
  CsvTable out;
  out.name = table.name;
  out.columns = {"shot", "geophone", "time"};
  for (std::size_t r = 0; r < table.rows.size(); ++r) {
    for (std::size_t c = 1; c < table.columns.size(); ++c) {
      out.rows.push_back({shots[c - 1], table.rows[r][0], table.rows[r][c]});
      out.lines.push_back(table.lines[r]);
    }
  }
  const std::string all = wordsOf(table.columns.front());
  if (has(all, {" ft ", " feet "})) {
    out.columns = {"shot (ft)", "geophone (ft)", "time"};
  }
  return out;
}

}  // namespace

TimesColumns guessTimesColumns(const CsvTable& table) {
  TimesColumns columns;
  columns.fields.resize(table.columns.size());
  for (std::size_t c = 0; c < table.columns.size(); ++c) {
    const std::string words = wordsOf(table.columns[c]);
    const auto field = numbersThings(words) ? std::nullopt : meant(words);
    if (field && !columns.of(*field)) {
      columns.fields[c] = field;
    }
    columns.feet = columns.feet || has(words, {" ft ", " feet "});
  }
  if (columns.of(TimesField::GeophoneX) && columns.of(TimesField::Offset)) {
    columns.fields[*columns.of(TimesField::Offset)].reset();  // the position says it already
  }
  if (const auto time = columns.of(TimesField::Time)) {
    const std::string words = wordsOf(table.columns[*time]);
    const bool seconds = has(words, {" s ", " sec", " seconds "});
    columns.milliseconds =
        has(words, {" ms ", " msec", " milli"}) || (!seconds && largest(table, *time) > kMostSeconds);
  }
  return columns;
}

Result<CsvTable> parseTimesTable(std::string_view text, const std::string& name) {
  auto table = parseCsv(text, name);
  if (!table) {
    return table;
  }
  auto long_ = unfolded(*table);
  return long_ ? std::move(*long_) : std::move(*table);
}

Result<CsvTable> readTimesTable(const std::string& path) {
  auto table = readCsv(path);
  if (!table) {
    return table;
  }
  auto long_ = unfolded(*table);
  return long_ ? std::move(*long_) : std::move(*table);
}

}  // namespace strikeplate
