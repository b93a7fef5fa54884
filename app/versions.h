#pragma once

#include <string>

namespace strikeplate {

/// The program's name and version and those of the libraries it runs on, a line each.
std::string versionText(const std::string& program);

}  // namespace strikeplate
