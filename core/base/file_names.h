#pragma once

#include <string>

namespace strikeplate {

/// What stands behind the last slash or backslash of a path; the whole of it when there is none.
std::string lastPart(const std::string& path);

}  // namespace strikeplate
