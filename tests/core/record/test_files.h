#pragma once

#include <cstddef>
#include <fstream>
#include <iterator>
#include <string>
#include <vector>

namespace strikeplate {

inline const std::string kTestData = STRIKEPLATE_TEST_DATA;
inline const std::string kFormats = kTestData + "/formats/";

/// A file's content; empty when it cannot be read.
inline std::vector<std::byte> fileBytes(const std::string& path) {
  std::ifstream file(path, std::ios::binary);
  std::vector<std::byte> bytes;
  for (std::istreambuf_iterator<char> at(file), end; at != end; ++at) {
    bytes.push_back(static_cast<std::byte>(*at));
  }
  return bytes;
}

}  // namespace strikeplate
