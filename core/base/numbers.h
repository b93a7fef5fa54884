#pragma once

#include <optional>
#include <string>
#include <string_view>

namespace strikeplate {

/// Reads a whole text as a decimal number with a point, whatever the locale; blanks around it are ignored. Nothing
/// when any other character is left over, or the number is not finite.
std::optional<double> parseNumber(std::string_view text);

/// Reads a whole text as an integer, under the same rules.
std::optional<long long> parseInteger(std::string_view text);

/// Shortest text that reads back as the same double (full precision); empty for a number that is not finite, as a
/// missing value is written in CSV files.
std::string fullPrecision(double value);

/// `value` with `decimals` digits behind the point, whatever the locale; "n/d" (not determined) when it is not
/// finite.
std::string fixed(double value, int decimals);

/// Without the blanks, tabs and line ends at either end.
std::string_view trimmed(std::string_view text);

/// ASCII letters made small.
std::string lowered(std::string_view text);

}  // namespace strikeplate
