#include "core/record/sample_check.h"

#include <bit>
#include <cmath>
#include <cstdint>

namespace strikeplate {

std::size_t zeroNonNumbers(std::span<float> samples) {
  // First a pass without branches, as nearly every trace is clean: a float is no number when its exponent is all
  // ones.
  constexpr std::uint32_t kExponent = 0x7F800000u;
  std::uint32_t any = 0;
  for (const float sample : samples) {
    any |= static_cast<std::uint32_t>((std::bit_cast<std::uint32_t>(sample) & kExponent) == kExponent);
  }
  std::size_t count = 0;
  if (any != 0) {
    for (float& sample : samples) {
      if (!std::isfinite(sample)) {
        sample = 0.0F;
        ++count;
      }
    }
  }
  return count;
}

}  // namespace strikeplate
