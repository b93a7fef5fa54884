#pragma once

#include <string>
#include <vector>

namespace strikeplate {

/// The program's name and version and those of the libraries it runs on, a line each.
std::string versionText(const std::string& program);

/// Names and versions of the libraries alone.
std::vector<std::string> libraryVersions();

}  // namespace strikeplate
