#pragma once

#include <cstddef>
#include <span>

namespace strikeplate {

/// Sets samples that are not numbers (NaN, infinite) to 0 and tells how many there were.
std::size_t zeroNonNumbers(std::span<float> samples);

}  // namespace strikeplate
