#pragma once

#include <bit>
#include <cstddef>
#include <cstdint>
#include <cstring>
#include <type_traits>
#include <utility>

namespace strikeplate {

/// Order in which a file stores the bytes of a number.
enum class ByteOrder { Little, Big };

/// The byte order of this machine.
inline constexpr ByteOrder kNativeOrder =
    std::endian::native == std::endian::little ? ByteOrder::Little : ByteOrder::Big;

/// The same unsigned number with its bytes in the opposite order.
template <class Unsigned>
constexpr Unsigned reversedBytes(Unsigned value) {
  static_assert(std::is_unsigned_v<Unsigned>);
  if constexpr (sizeof(Unsigned) == 2) {
    return __builtin_bswap16(value);
  } else if constexpr (sizeof(Unsigned) == 4) {
    return __builtin_bswap32(value);
  } else if constexpr (sizeof(Unsigned) == 8) {
    return __builtin_bswap64(value);
  } else {
    return value;
  }
}

/// Unsigned integer that holds as many bytes as `Number`.
template <class Number>
using BitsOf =
    std::conditional_t<sizeof(Number) == 1, std::uint8_t,
                       std::conditional_t<sizeof(Number) == 2, std::uint16_t,
                                          std::conditional_t<sizeof(Number) == 4, std::uint32_t, std::uint64_t>>>;

/// Reads a number stored at `bytes`, which need not be aligned; needs sizeof(Number) readable bytes.
template <class Number>
Number load(const std::byte* bytes, ByteOrder order) {
  BitsOf<Number> bits;
  std::memcpy(&bits, bytes, sizeof bits);
  if (order != kNativeOrder) {
    bits = reversedBytes(bits);
  }
  return std::bit_cast<Number>(bits);
}

/// Stores a number at `bytes`, which need not be aligned; needs sizeof(Number) writable bytes.
template <class Number>
void store(std::byte* bytes, Number value, ByteOrder order) {
  auto bits = std::bit_cast<BitsOf<Number>>(value);
  if (order != kNativeOrder) {
    bits = reversedBytes(bits);
  }
  std::memcpy(bytes, &bits, sizeof bits);
}

}  // namespace strikeplate
