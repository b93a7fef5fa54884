#include "core/record/segy_samples.h"

#include <algorithm>
#include <array>
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

// value = (-1)^sign x fraction x 2^(4 exponent - 280), also where the fraction's first four bits are zero, which the
// library takes for impossible. The power of two is put on in two halves, as one alone may lie beyond a float's
// range; only the second multiplication rounds.
inline float fromIbm(std::uint32_t sign, std::uint32_t exponent, std::uint32_t fraction) {
  constexpr int kLeast = -126;
  const int power = 4 * static_cast<int>(exponent) - 280;
  const int first = std::max(power >> 1, kLeast);
  const int second = std::max(power - first, kLeast);
  const auto powerOfTwo = [](int n) { return std::bit_cast<float>(static_cast<std::uint32_t>(n + 127) << 23); };
  const float magnitude =
      static_cast<float>(static_cast<std::int32_t>(fraction)) * powerOfTwo(first) * powerOfTwo(second);
  return std::bit_cast<float>(std::bit_cast<std::uint32_t>(magnitude) | sign);
}

// From a word as this machine loads it, whose bytes are in its own order or the opposite one.
template <bool kOpposite>
inline float fromIbmWord(std::uint32_t w) {
  if constexpr (kOpposite) {
    return fromIbm((w & 0x80u) << 24, w & 0x7Fu, ((w & 0xFF00u) << 8) | ((w >> 8) & 0xFF00u) | (w >> 24));
  } else {
    return fromIbm(w & 0x80000000u, (w >> 24) & 0x7Fu, w & 0x00FFFFFFu);
  }
}

// Sixty-four at a time, so that the compiler does them side by side.
template <bool kOpposite>
void allFromIbm(std::span<float> samples) {
  constexpr std::size_t kWide = 64;
  std::size_t i = 0;
  for (; i + kWide <= samples.size(); i += kWide) {
    std::array<std::uint32_t, kWide> words;
    std::array<float, kWide> values;
    std::memcpy(words.data(), samples.data() + i, sizeof words);
    for (std::size_t k = 0; k < kWide; ++k) {
      values[k] = fromIbmWord<kOpposite>(words[k]);
    }
    std::memcpy(samples.data() + i, values.data(), sizeof values);
  }
  for (; i < samples.size(); ++i) {
    samples[i] = fromIbmWord<kOpposite>(std::bit_cast<std::uint32_t>(samples[i]));
  }
}

void toNative(int code, ByteOrder order, std::span<float> samples) {
  if (code == SEGY_IBM_FLOAT_4_BYTE) {
    return order == kNativeOrder ? allFromIbm<false>(samples) : allFromIbm<true>(samples);
  }
  if (order == ByteOrder::Little) {
    swapAll<std::uint32_t>(std::as_writable_bytes(samples));
  }
  segy_to_native(code, static_cast<long long>(samples.size()), samples.data());
}

std::vector<float> readFourBytes(const ByteSource& source, std::uint64_t at, std::uint64_t count, int code,
                                 ByteOrder order) {
  std::vector<float> samples(count);
  const std::span<std::byte> bytes = std::as_writable_bytes(std::span(samples));
  samples.resize(source.read(at, bytes) / sizeof(float));
  toNative(code, order, samples);
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
