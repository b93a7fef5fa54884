#pragma once

#include <cstddef>
#include <span>
#include <string>

namespace strikeplate::segy {

/// A text header as UTF-8, whether it is stored in EBCDIC (the code page of the standard, letters, digits and common
/// signs) or ASCII: cards of 80 characters as lines, without blanks at their ends and without empty lines at the end.
std::string textOf(std::span<const std::byte> bytes);

}  // namespace strikeplate::segy
