// Any bytes at all as the headers and traces of a SEG-Y file.
#include <cstdint>
#include <cstdlib>

#include "core/record/segy_reader.h"

extern "C" int LLVMFuzzerTestOneInput(const std::uint8_t* data, std::size_t size) {
  const auto records = strikeplate::readSegyBytes({reinterpret_cast<const std::byte*>(data), size}, "fuzz");
  if (records && records->empty()) {
    std::abort();
  }
  return 0;
}
