#include "core/base/checksum.h"

#include <array>
#include <cstdio>
#include <filesystem>
#include <fstream>

#include <boost/crc.hpp>

namespace strikeplate {

std::optional<std::string> fileChecksum(const std::string& path) {
  std::error_code none;
  if (!std::filesystem::is_regular_file(path, none)) {
    return std::nullopt;
  }
  std::ifstream file(path, std::ios::binary);
  boost::crc_32_type crc;
  std::array<char, 65536> block{};
  while (file.read(block.data(), block.size()) || file.gcount() > 0) {
    crc.process_bytes(block.data(), static_cast<std::size_t>(file.gcount()));
  }
  if (file.bad() || !file.eof()) {
    return std::nullopt;
  }
  std::array<char, 9> digits{};
  std::snprintf(digits.data(), digits.size(), "%08x", static_cast<unsigned>(crc.checksum()));
  return std::string(digits.data());
}

}  // namespace strikeplate
