#include "core/base/file_names.h"

namespace strikeplate {

std::string lastPart(const std::string& path) {
  const auto slash = path.find_last_of("/\\");
  return slash == std::string::npos ? path : path.substr(slash + 1);
}

}  // namespace strikeplate
