#include "core/record/segy_samples.h"

#include <bit>
#include <span>

#include <segyio/segy.h>

#include "core/record/segy_head.h"

namespace strikeplate::segy {
namespace {

// The library takes numbers with the high byte first.
template <class Unsigned>
void swapAll(std::span<std::byte> bytes) {
  for (std::size_t at = 0; at + sizeof(Unsigned) <= bytes.size(); at += sizeof(Unsigned)) {
    Unsigned value;
    std::memcpy(&value, bytes.data() + at, sizeof value);
    value = reversedBytes(value);
    std::memcpy(bytes.data() + at, &value, sizeof value);
  }
}

// value = (-1)^sign x fraction / 2^24 x 16^(exponent - 64), also where the fraction's first four bits are zero, which
// the library takes for impossible. The scale is a power of two whose exponent a double always holds.
float fromIbm(std::uint32_t bits) {
  const double fraction = static_cast<std::int32_t>(bits & 0x00FFFFFFu);
  const std::uint64_t exponent = 1023 + 4 * ((bits >> 24) & 0x7Fu) - 256 - 24;
  const double magnitude = fraction * std::bit_cast<double>(exponent << 52);
  return static_cast<float>((bits >> 31) != 0 ? -magnitude : magnitude);
}

void fromBigEndian(int code, std::span<float> samples) {
  if (code != SEGY_IBM_FLOAT_4_BYTE) {
    segy_to_native(code, static_cast<long long>(samples.size()), samples.data());
    return;
  }
  for (float& sample : samples) {
    const auto bits = std::bit_cast<std::uint32_t>(sample);
    sample = fromIbm(kNativeOrder == ByteOrder::Little ? reversedBytes(bits) : bits);
  }
}

std::vector<float> readFourBytes(const ByteSource& source, std::uint64_t at, std::uint64_t count, int code,
                                 ByteOrder order) {
  std::vector<float> samples(count);
  const std::span<std::byte> bytes = std::as_writable_bytes(std::span(samples));
  samples.resize(source.read(at, bytes) / sizeof(float));
  const std::span<std::byte> got = std::as_writable_bytes(std::span(samples));
  if (order == ByteOrder::Little) {
    swapAll<std::uint32_t>(got);
  }
  fromBigEndian(code, samples);
  if (code == SEGY_SIGNED_INTEGER_4_BYTE) {
    for (float& sample : samples) {
      sample = static_cast<float>(std::bit_cast<std::int32_t>(sample));
    }
  }
  return samples;
}

template <class Number>
std::vector<float> readAs(const ByteSource& source, std::uint64_t at, std::uint64_t count, ByteOrder order,
                          std::vector<std::byte>& scratch) {
  scratch.resize(count * sizeof(Number));
  const std::size_t got = source.read(at, scratch) / sizeof(Number);
  std::vector<float> samples(got);
  for (std::size_t i = 0; i < got; ++i) {
    samples[i] = static_cast<float>(load<Number>(scratch.data() + i * sizeof(Number), order));
  }
  return samples;
}

}  // namespace

std::vector<float> readSamples(const ByteSource& source, std::uint64_t at, std::uint64_t count, int code,
                               ByteOrder order, std::vector<std::byte>& scratch) {
  switch (sampleBytes(code)) {
    case 1:
      return readAs<std::int8_t>(source, at, count, order, scratch);
    case 2:
      return readAs<std::int16_t>(source, at, count, order, scratch);
    case 8:
      return readAs<double>(source, at, count, order, scratch);
    default:
      return readFourBytes(source, at, count, code, order);
  }
}

}  // namespace strikeplate::segy
