#pragma once

#include <cstddef>
#include <optional>
#include <span>
#include <string>
#include <string_view>
#include <vector>

#include "core/record/byte_order.h"
#include "core/record/record.h"

namespace strikeplate::seg2 {

/// What ends a string and what ends a line inside one; either may be empty.
struct Terminators {
  std::string string = std::string(1, '\0');
  std::string line = "\n";
};

/// The strings of one descriptor block.
struct Strings {
  std::vector<HeaderEntry> entries;  ///< keywords as written, values with lines split by '\n', both UTF-8
  bool overran = false;              ///< a string was longer or shorter than its count said
};

/// Reads the strings of a descriptor block from its first string on, tolerantly: a count that leads outside the block
/// or into the middle of a string is put right by the terminator where that can be found. Strings without a keyword
/// are left out.
Strings parseStrings(std::span<const std::byte> strings, ByteOrder order, const Terminators& terminators);

/// The value of a keyword (capital letters), whatever the case in the file; the first one when there are several.
std::optional<std::string_view> find(const std::vector<HeaderEntry>& entries, std::string_view keyword);

/// The text as it is if that is UTF-8, else taken as ISO 8859-1.
std::string asUtf8(std::string_view text);

}  // namespace strikeplate::seg2
