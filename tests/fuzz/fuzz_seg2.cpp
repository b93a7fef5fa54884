// Any bytes at all as a SEG-2 file, with the mark put on so that they are not turned away at the door.
#include <cstdint>
#include <cstdlib>
#include <vector>

#include "core/record/seg2_reader.h"

extern "C" int LLVMFuzzerTestOneInput(const std::uint8_t* data, std::size_t size) {
  const auto* bytes = reinterpret_cast<const std::byte*>(data);
  std::vector<std::byte> file(bytes, bytes + size);
  if (file.size() >= 2) {
    const bool little = (file[0] & std::byte{1}) != std::byte{0};
    file[0] = little ? std::byte{0x55} : std::byte{0x3A};
    file[1] = little ? std::byte{0x3A} : std::byte{0x55};
  }
  const auto record = strikeplate::readSeg2Bytes(file, "fuzz");
  if (record && record->traces.empty()) {
    std::abort();
  }
  return 0;
}
