#include "core/record/seg2_keywords.h"

#include <algorithm>
#include <cmath>
#include <string>

#include "core/base/numbers.h"
#include "core/record/seg2_strings.h"

namespace strikeplate::seg2 {
namespace {

std::vector<std::string> words(std::string_view text, std::string_view separators) {
  std::vector<std::string> out;
  for (std::size_t at = 0; at < text.size();) {
    const std::size_t first = text.find_first_not_of(separators, at);
    if (first == std::string_view::npos) {
      break;
    }
    const std::size_t end = std::min(text.find_first_of(separators, first), text.size());
    out.emplace_back(text.substr(first, end - first));
    at = end;
  }
  return out;
}

constexpr std::string_view kBlanks = " \t\r\n";

// "12,5" as some countries write it.
std::string withPoint(std::string number) {
  const auto comma = number.find(',');
  if (comma != std::string::npos && number.find(',', comma + 1) == std::string::npos &&
      number.find('.') == std::string::npos) {
    number[comma] = '.';
  }
  return number;
}

std::optional<double> firstNumber(std::string_view text) {
  const std::vector<std::string> parts = words(text, kBlanks);
  return parts.empty() ? std::nullopt : parseNumber(withPoint(parts[0]));
}

// Reads one keyword's number into `into` when the keyword is there, and says so when it is no number.
bool readNumber(const std::vector<HeaderEntry>& entries, std::string_view keyword, int trace, OddityList& odd,
                double& into) {
  const auto text = find(entries, keyword);
  if (!text || text->empty()) {
    return false;
  }
  const auto value = firstNumber(*text);
  if (!value) {
    odd.addForTrace(trace, std::string(keyword) + " is not a number and is not used");
    return false;
  }
  into = *value;
  return true;
}

std::optional<HeaderPosition> readPosition(const std::vector<HeaderEntry>& entries, std::string_view keyword,
                                           double metres, OddityList& odd, int trace) {
  const auto text = find(entries, keyword);
  if (!text || text->empty()) {
    return std::nullopt;
  }
  auto position = parsePosition(*text, metres);
  if (!position) {
    odd.addForTrace(trace, std::string(keyword) + " is not a position and is not used");
  }
  return position;
}

TraceState readState(const std::vector<HeaderEntry>& entries, int trace, OddityList& odd) {
  if (const auto type = find(entries, "TRACE_TYPE"); type && !type->empty()) {
    const std::vector<std::string> parts = words(*type, kBlanks);
    const std::string kind = parts.empty() ? std::string() : lowered(parts[0]);
    if (kind == "dead") {
      odd.addForTrace(trace, "dead according to TRACE_TYPE");
      return TraceState::Dead;
    }
    if (!kind.empty() && kind != "seismic_data" && kind != "seismic" && kind != "unknown") {
      odd.addForTrace(trace, "no seismic data but " + parts[0] + " according to TRACE_TYPE, so it is set dead");
      return TraceState::Dead;
    }
  }
  double polarity = 1.0;
  if (readNumber(entries, "POLARITY", trace, odd, polarity) && polarity < 0.0) {
    odd.addForTrace(trace, "reversed according to POLARITY");
    return TraceState::Reversed;
  }
  return TraceState::Live;
}

}  // namespace

double metresPerUnit(const std::vector<HeaderEntry>& fileWords, OddityList& odd) {
  const auto text = find(fileWords, "UNITS");
  const std::string units = text ? lowered(trimmed(*text)) : std::string();
  if (units.empty() || units.starts_with("meter") || units.starts_with("metre") || units == "m" || units == "none") {
    return 1.0;
  }
  if (units.starts_with("f")) {
    odd.add("Positions are in feet and are brought to metres.");
    return 0.3048;
  }
  if (units.starts_with("inch")) {
    odd.add("Positions are in inches and are brought to metres.");
    return 0.0254;
  }
  if (units.starts_with("centi") || units == "cm") {
    odd.add("Positions are in centimetres and are brought to metres.");
    return 0.01;
  }
  odd.add("UNITS \"" + std::string(*text) + "\" is not known; positions are taken as metres.");
  return 1.0;
}

std::optional<HeaderPosition> parsePosition(std::string_view text, double metres) {
  std::vector<std::string> parts = words(text, kBlanks);
  if (parts.size() == 1 && std::count(parts[0].begin(), parts[0].end(), ',') > 1) {
    parts = words(text, ",");
  }
  std::vector<double> numbers;
  for (const std::string& part : parts) {
    const auto value = parseNumber(withPoint(part.ends_with(',') ? part.substr(0, part.size() - 1) : part));
    if (!value || numbers.size() == 3) {
      break;
    }
    numbers.push_back(*value * metres);
  }
  if (numbers.empty()) {
    return std::nullopt;
  }
  HeaderPosition position{numbers[0], std::nullopt, std::nullopt};
  if (numbers.size() > 1) {
    position.y = numbers[1];
  }
  if (numbers.size() > 2) {
    position.z = numbers[2];
  }
  return position;
}

TraceWords readTraceWords(const std::vector<HeaderEntry>& entries, double metres, int trace, OddityList& odd) {
  TraceWords out;
  double number = 0.0;
  if (readNumber(entries, "SAMPLE_INTERVAL", trace, odd, number)) {
    if (number > 0.0) {
      out.sampleInterval = number;
    } else {
      odd.addForTrace(trace, "SAMPLE_INTERVAL is not above zero and is not used");
    }
  }
  if (readNumber(entries, "DELAY", trace, odd, number)) {
    out.delay += number;
  }
  if (readNumber(entries, "SKEW", trace, odd, number)) {
    out.delay += number;
  }
  if (readNumber(entries, "DESCALING_FACTOR", trace, odd, number)) {
    if (number != 0.0) {
      out.descaling = number;
    } else {
      odd.addForTrace(trace, "DESCALING_FACTOR is zero and is taken as 1");
    }
  }
  if (readNumber(entries, "STACK", trace, odd, number)) {
    if (number >= 1.0 && number <= 1e6) {
      out.stack = static_cast<int>(std::lround(number));
    } else {
      odd.addForTrace(trace, "STACK is no count of blows and is taken as 1");
    }
  }
  out.receiver = readPosition(entries, "RECEIVER_LOCATION", metres, odd, trace);
  out.source = readPosition(entries, "SOURCE_LOCATION", metres, odd, trace);
  out.state = readState(entries, trace, odd);
  return out;
}

}  // namespace strikeplate::seg2
