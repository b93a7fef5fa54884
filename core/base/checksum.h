#pragma once

#include <optional>
#include <string>

namespace strikeplate {

/// CRC-32 (IEEE 802.3) of a file's bytes as 8 hex digits; nothing when it cannot be read to its end.
std::optional<std::string> fileChecksum(const std::string& path);

}  // namespace strikeplate
