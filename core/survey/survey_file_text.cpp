#include "core/survey/survey_file_text.h"

#include <cstddef>

namespace strikeplate {
namespace {

// Length of the UTF-8 sequence that starts with this byte, 0 when none does.
std::size_t sequenceLength(unsigned char first) {
  if (first < 0x80U) {
    return 1;
  }
  if (first >= 0xc2U && first < 0xe0U) {
    return 2;
  }
  if (first >= 0xe0U && first < 0xf0U) {
    return 3;
  }
  return first >= 0xf0U && first < 0xf5U ? 4 : 0;
}

// Overlong forms, surrogates and what lies beyond U+10FFFF (The Unicode Standard, table 3-7).
bool secondByteAllowed(unsigned char first, unsigned char second) {
  switch (first) {
    case 0xe0U:
      return second >= 0xa0U;
    case 0xedU:
      return second < 0xa0U;
    case 0xf0U:
      return second >= 0x90U;
    case 0xf4U:
      return second < 0x90U;
    default:
      return true;
  }
}

bool isUtf8(std::string_view text) {
  for (std::size_t i = 0; i < text.size();) {
    const auto first = static_cast<unsigned char>(text[i]);
    const std::size_t length = sequenceLength(first);
    if (length == 0 || i + length > text.size()) {
      return false;
    }
    for (std::size_t j = 1; j < length; ++j) {
      const auto byte = static_cast<unsigned char>(text[i + j]);
      if ((byte & 0xc0U) != 0x80U || (j == 1 && !secondByteAllowed(first, byte))) {
        return false;
      }
    }
    i += length;
  }
  return true;
}

std::string latin1ToUtf8(std::string_view bytes) {
  std::string text;
  for (const char c : bytes) {
    const auto byte = static_cast<unsigned char>(c);
    if (byte < 0x80U) {
      text += c;
    } else {
      text += static_cast<char>(0xc0U | (byte >> 6U));
      text += static_cast<char>(0x80U | (byte & 0x3fU));
    }
  }
  return text;
}

std::string utf8ToLatin1(std::string_view text) {
  std::string bytes;
  for (std::size_t i = 0; i < text.size(); ++i) {
    const auto first = static_cast<unsigned char>(text[i]);
    if (first >= 0x80U && i + 1 < text.size()) {
      ++i;
      bytes += static_cast<char>(((first & 0x03U) << 6U) | (static_cast<unsigned char>(text[i]) & 0x3fU));
    } else {
      bytes += text[i];
    }
  }
  return bytes;
}

}  // namespace

nlohmann::json textToJson(std::string_view text) {
  if (isUtf8(text)) {
    return text;
  }
  return {{"latin1", latin1ToUtf8(text)}};
}

std::string textFromJson(const nlohmann::json& json) {
  if (json.is_null()) {
    return {};
  }
  if (json.is_object()) {
    return utf8ToLatin1(json.at("latin1").get_ref<const std::string&>());
  }
  return json.get<std::string>();
}

const nlohmann::json& member(const nlohmann::json& object, const char* key) {
  static const nlohmann::json kNothing;
  const auto found = object.find(key);
  return found == object.end() ? kNothing : *found;
}

}  // namespace strikeplate
