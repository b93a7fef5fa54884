#pragma once

#include <cstddef>
#include <cstdint>
#include <string>
#include <vector>

#include "core/record/byte_order.h"

namespace strikeplate::testing_segy {

/// Builds SEG-Y files for tests, field by field; positions count from 1 as in the standard.
struct SegyFile {
  ByteOrder order = ByteOrder::Big;
  std::vector<std::byte> bytes = std::vector<std::byte>(3600);

  template <class Number>
  SegyFile& binary(int position, Number value) {
    store(bytes.data() + position - 1, value, order);
    return *this;
  }
  template <class Number>
  SegyFile& word(std::size_t headerAt, int position, Number value) {
    store(bytes.data() + headerAt + static_cast<std::size_t>(position) - 1, value, order);
    return *this;
  }
  /// Appends an empty trace header; returns where it starts.
  std::size_t header(std::size_t size = 240) {
    bytes.resize(bytes.size() + size);
    return bytes.size() - size;
  }
  template <class Number>
  void sample(Number value) {
    bytes.resize(bytes.size() + sizeof(Number));
    store(bytes.data() + bytes.size() - sizeof(Number), value, order);
  }
};

/// A file with its format, interval in microseconds and samples in a trace set.
inline SegyFile segyFile(int format, int micros, int samples, ByteOrder order = ByteOrder::Big) {
  SegyFile file;
  file.order = order;
  file.binary(3217, static_cast<std::int16_t>(micros)).binary(3221, static_cast<std::uint16_t>(samples));
  file.binary(3225, static_cast<std::int16_t>(format));
  return file;
}

/// IBM float of a whole number up to 2^24: fraction and exponent of 16.
inline std::uint32_t ibmBits(int value) {
  const auto magnitude = static_cast<std::uint32_t>(value < 0 ? -value : value);
  return magnitude == 0 ? 0u : (value < 0 ? 0x80000000u : 0u) | (70u << 24) | magnitude;
}

}  // namespace strikeplate::testing_segy
