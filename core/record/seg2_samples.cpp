#include "core/record/seg2_samples.h"

#include <bit>
#include <cassert>
#include <cmath>
#include <cstdint>
#include <limits>
#include <string>

#include "core/base/numbers.h"
#include "core/record/seg2_layout.h"

namespace strikeplate::seg2 {
namespace {

template <class Number>
void decodeAs(ByteOrder order, std::span<const std::byte> bytes, std::span<float> into) {
  const std::byte* from = bytes.data();
  if (order == kNativeOrder) {
    for (std::size_t i = 0; i < into.size(); ++i) {
      into[i] = static_cast<float>(load<Number>(from + i * sizeof(Number), kNativeOrder));
    }
    return;
  }
  for (std::size_t i = 0; i < into.size(); ++i) {
    BitsOf<Number> bits;
    std::memcpy(&bits, from + i * sizeof(Number), sizeof bits);
    into[i] = static_cast<float>(std::bit_cast<Number>(reversedBytes(bits)));
  }
}

constexpr std::size_t kGroupBytes = 10;

void decodeFloat20(ByteOrder order, std::span<const std::byte> bytes, std::span<float> into) {
  for (std::size_t i = 0; i < into.size(); ++i) {
    const std::byte* group = bytes.data() + i / 4 * kGroupBytes;
    const unsigned exponents = load<std::uint16_t>(group, order);
    const int exponent = static_cast<int>((exponents >> (4 * (i % 4))) & 0xFu);
    int mantissa = load<std::int16_t>(group + 2 + 2 * (i % 4), order);
    if (mantissa < 0) {
      ++mantissa;  // one's complement
    }
    into[i] = static_cast<float>(mantissa * (1 << exponent));
  }
}

// Mantissa and exponent of the nearest 20-bit float; nothing when the value is too large.
struct Float20 {
  int mantissa = 0;
  int exponent = 0;
};
constexpr double kLargestMantissa = 32767.0;

bool toFloat20(double value, Float20& out) {
  for (int exponent = 0; exponent <= 15; ++exponent) {
    const double mantissa = std::nearbyint(value / (1 << exponent));
    if (std::abs(mantissa) <= kLargestMantissa) {
      out = {static_cast<int>(mantissa), exponent};
      return true;
    }
  }
  return false;
}

Failure tooLarge(std::size_t sample, float value, int code) {
  return Failure{"sample " + std::to_string(sample + 1) + " (" + fullPrecision(value) +
                 ") does not fit SEG-2 format code " + std::to_string(code) + "; scale the trace or choose code 4"};
}

template <class Integer>
Result<std::vector<std::byte>> encodeInteger(int code, ByteOrder order, std::span<const float> samples) {
  std::vector<std::byte> bytes(samples.size() * sizeof(Integer));
  for (std::size_t i = 0; i < samples.size(); ++i) {
    const double value = std::nearbyint(static_cast<double>(samples[i]));
    if (!(value >= std::numeric_limits<Integer>::min() && value <= std::numeric_limits<Integer>::max())) {
      return tooLarge(i, samples[i], code);
    }
    store(bytes.data() + i * sizeof(Integer), static_cast<Integer>(value), order);
  }
  return bytes;
}

template <class Real>
Result<std::vector<std::byte>> encodeReal(int code, ByteOrder order, std::span<const float> samples) {
  std::vector<std::byte> bytes(samples.size() * sizeof(Real));
  for (std::size_t i = 0; i < samples.size(); ++i) {
    if (!std::isfinite(samples[i])) {
      return tooLarge(i, samples[i], code);
    }
    store(bytes.data() + i * sizeof(Real), static_cast<Real>(samples[i]), order);
  }
  return bytes;
}

Result<std::vector<std::byte>> encodeFloat20(ByteOrder order, std::span<const float> samples) {
  std::vector<std::byte> bytes(dataBytes(kFloat20, samples.size()));
  for (std::size_t first = 0; first < samples.size(); first += 4) {
    std::byte* group = bytes.data() + first / 4 * kGroupBytes;
    unsigned exponents = 0;
    for (std::size_t k = 0; k < 4 && first + k < samples.size(); ++k) {
      Float20 number;
      if (!toFloat20(static_cast<double>(samples[first + k]), number)) {
        return tooLarge(first + k, samples[first + k], kFloat20);
      }
      exponents |= static_cast<unsigned>(number.exponent) << (4 * k);
      const int word = number.mantissa < 0 ? number.mantissa - 1 : number.mantissa;
      store(group + 2 + 2 * k, static_cast<std::int16_t>(word), order);
    }
    store(group, static_cast<std::uint16_t>(exponents), order);
  }
  return bytes;
}

}  // namespace

void decode(int code, ByteOrder order, std::span<const std::byte> bytes, std::span<float> into) {
  assert(isFormat(code) && bytes.size() >= dataBytes(code, into.size()));
  switch (code) {
    case kInt16:
      return decodeAs<std::int16_t>(order, bytes, into);
    case kInt32:
      return decodeAs<std::int32_t>(order, bytes, into);
    case kFloat20:
      return decodeFloat20(order, bytes, into);
    case kFloat32:
      return decodeAs<float>(order, bytes, into);
    default:
      return decodeAs<double>(order, bytes, into);
  }
}

Result<std::vector<std::byte>> encode(int code, ByteOrder order, std::span<const float> samples) {
  assert(isFormat(code));
  switch (code) {
    case kInt16:
      return encodeInteger<std::int16_t>(code, order, samples);
    case kInt32:
      return encodeInteger<std::int32_t>(code, order, samples);
    case kFloat20:
      return encodeFloat20(order, samples);
    case kFloat32:
      return encodeReal<float>(code, order, samples);
    default:
      return encodeReal<double>(code, order, samples);
  }
}

}  // namespace strikeplate::seg2
