#include "core/base/numbers.h"

#include <charconv>
#include <cmath>
#include <system_error>

namespace strikeplate {

std::string_view trimmed(std::string_view text) {
  constexpr std::string_view kBlanks(" \t\r\n\f\v\0", 7);
  const auto first = text.find_first_not_of(kBlanks);
  if (first == std::string_view::npos) {
    return {};
  }
  return text.substr(first, text.find_last_not_of(kBlanks) - first + 1);
}

std::string lowered(std::string_view text) {
  std::string out(text);
  for (char& c : out) {
    if (c >= 'A' && c <= 'Z') {
      c = static_cast<char>(c - 'A' + 'a');
    }
  }
  return out;
}

namespace {

// from_chars takes no leading plus sign, which instruments write.
std::string_view withoutPlus(std::string_view text) {
  text = trimmed(text);
  if (text.size() > 1 && text[0] == '+' && text[1] != '-' && text[1] != '+') {
    text.remove_prefix(1);
  }
  return text;
}

template <class Number>
std::optional<Number> parseWhole(std::string_view text) {
  text = withoutPlus(text);
  Number value{};
  const auto [end, error] = std::from_chars(text.data(), text.data() + text.size(), value);
  if (error != std::errc{} || end != text.data() + text.size() || text.empty()) {
    return std::nullopt;
  }
  return value;
}

}  // namespace

std::optional<double> parseNumber(std::string_view text) {
  const auto value = parseWhole<double>(text);
  return value && std::isfinite(*value) ? value : std::nullopt;
}

std::optional<long long> parseInteger(std::string_view text) {
  return parseWhole<long long>(text);
}

std::string fullPrecision(double value) {
  if (!std::isfinite(value)) {
    return {};
  }
  char buffer[64];
  const auto [end, error] = std::to_chars(buffer, buffer + sizeof buffer, value);
  return error == std::errc{} ? std::string(buffer, end) : std::string();
}

std::string fixed(double value, int decimals) {
  if (!std::isfinite(value)) {
    return "n/d";
  }
  char buffer[400];
  const auto [end, error] = std::to_chars(buffer, buffer + sizeof buffer, value, std::chars_format::fixed, decimals);
  if (error != std::errc{}) {
    return "n/d";
  }
  std::string text(buffer, end);
  // A value that rounds to zero is zero, without a sign.
  if (text[0] == '-' && text.find_first_not_of("-0.") == std::string::npos) {
    text.erase(0, 1);
  }
  return text;
}

}  // namespace strikeplate
