#include "core/record/segy_text.h"

#include <algorithm>
#include <array>
#include <string_view>

namespace strikeplate::segy {
namespace {

// EBCDIC runs of neighbours that are neighbours in ASCII too, and single signs. Source: code page 037.
struct Run {
  unsigned char ebcdic;
  std::string_view ascii;
};
constexpr std::array<Run, 25> kRuns = {{
    {0x40, " "},        {0x4B, ".<(+|"},      {0x50, "&"},          {0x5A, "!$*);"},      {0x60, "-/"},
    {0x6B, ",%_>?"},    {0x79, "`:#@'=\""},   {0x81, "abcdefghi"},  {0x91, "jklmnopqr"},  {0xA1, "~stuvwxyz"},
    {0xB0, "^"},        {0xBA, "[]"},         {0xC0, "{ABCDEFGHI"}, {0xD0, "}JKLMNOPQR"}, {0xE0, "\\"},
    {0xE2, "STUVWXYZ"}, {0xF0, "0123456789"}, {0xAD, "["},          {0xBD, "]"},          {0x5F, "^"},
    {0x15, "\n"},       {0x25, "\n"},         {0x0D, "\n"},         {0x05, " "},          {0x00, " "},
}};

constexpr std::array<char, 256> ebcdicTable() {
  std::array<char, 256> table{};
  for (char& c : table) {
    c = ' ';
  }
  for (const Run& run : kRuns) {
    for (std::size_t i = 0; i < run.ascii.size(); ++i) {
      table[run.ebcdic + i] = run.ascii[i];
    }
  }
  return table;
}

// ASCII texts have blanks as 0x20 and nothing above 0x7F; EBCDIC letters and digits are all above 0x80.
bool isEbcdic(std::span<const std::byte> bytes) {
  const auto high = std::count_if(bytes.begin(), bytes.end(), [](std::byte b) { return b > std::byte{0x80}; });
  const auto blank = std::count(bytes.begin(), bytes.end(), std::byte{0x40});
  const auto asciiBlank = std::count(bytes.begin(), bytes.end(), std::byte{0x20});
  return high + blank > asciiBlank && high + blank > static_cast<std::ptrdiff_t>(bytes.size() / 20);
}

}  // namespace

std::string textOf(std::span<const std::byte> bytes) {
  static constexpr std::array<char, 256> kEbcdic = ebcdicTable();
  constexpr std::size_t kCard = 80;
  const bool ebcdic = isEbcdic(bytes);
  std::string text;
  text.reserve(bytes.size() + bytes.size() / kCard);
  const auto endLine = [&text] {
    while (!text.empty() && text.back() == ' ') {
      text.pop_back();
    }
    text += '\n';
  };
  for (std::size_t i = 0; i < bytes.size(); ++i) {
    const auto code = std::to_integer<unsigned char>(bytes[i]);
    const char c = ebcdic ? kEbcdic[code] : (code >= 0x20 && code < 0x7F ? static_cast<char>(code) : ' ');
    text += c == '\n' ? ' ' : c;
    if (i % kCard == kCard - 1) {
      endLine();
    }
  }
  const auto last = text.find_last_not_of(" \n");
  text.resize(last == std::string::npos ? 0 : last + 1);
  return text;
}

}  // namespace strikeplate::segy
