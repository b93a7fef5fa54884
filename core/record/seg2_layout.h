#pragma once

#include <cstdint>

namespace strikeplate::seg2 {

/// Layout of a SEG-2 file.
///
/// File descriptor block: 0-1 mark 0x3A55 in the file's byte order; 2-3 revision; 4-5 size M of the table of trace
/// pointers in bytes; 6-7 number of traces; 8 size and 9-10 characters of the string terminator; 11 size and 12-13
/// characters of the line terminator; 32 to 32+M the pointers (u32, bytes from the start of the file); then strings.
/// Trace descriptor block: 0-1 mark 0x4422; 2-3 size of this block; 4-7 size of the data block behind it; 8-11 number
/// of samples; 12 data format code; from 32 strings.
/// String: u16 distance to the next string counted from this number; "KEYWORD value"; terminator. A distance of 0
/// ends the strings. Source: Pullan, Geophysics 55 (1990) 1260-1271.
inline constexpr std::uint16_t kFileMark = 0x3A55;
inline constexpr std::uint16_t kTraceMark = 0x4422;
inline constexpr std::uint32_t kBlockHead = 32;  ///< bytes before the pointers or strings of either block
inline constexpr std::uint32_t kLargestBlock = 65532;
inline constexpr int kMostTraces = 16383;

/// Data format codes.
enum Format : int {
  kInt16 = 1,
  kInt32 = 2,
  kFloat20 = 3,  ///< four 4-bit exponents of 2, then four 16-bit one's complement mantissas
  kFloat32 = 4,
  kFloat64 = 5,
};

inline bool isFormat(int code) {
  return code >= kInt16 && code <= kFloat64;
}

/// Bytes that `samples` samples take in a data block; needs isFormat(code).
inline std::uint64_t dataBytes(int code, std::uint64_t samples) {
  switch (code) {
    case kInt16:
      return 2 * samples;
    case kFloat20:
      return (samples + 3) / 4 * 10;
    case kFloat64:
      return 8 * samples;
    default:
      return 4 * samples;
  }
}

/// Whole samples that `bytes` bytes of a data block hold; needs isFormat(code).
inline std::uint64_t samplesIn(int code, std::uint64_t bytes) {
  switch (code) {
    case kInt16:
      return bytes / 2;
    case kFloat20:
      return bytes / 10 * 4;
    case kFloat64:
      return bytes / 8;
    default:
      return bytes / 4;
  }
}

}  // namespace strikeplate::seg2
