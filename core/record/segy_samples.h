#pragma once

#include <cstddef>
#include <cstdint>
#include <vector>

#include "core/record/byte_order.h"
#include "core/record/byte_source.h"

namespace strikeplate::segy {

/// Reads `count` samples of format `code` (1, 2, 3, 5, 6 or 8) from byte `at` on; fewer when the source ends before.
/// IBM floats and integers are converted by the segyio library, 8-byte floats and integers rounded to the nearest
/// float. `scratch` is working space that may be used again for the next trace.
std::vector<float> readSamples(const ByteSource& source, std::uint64_t at, std::uint64_t count, int code,
                               ByteOrder order, std::vector<std::byte>& scratch);

}  // namespace strikeplate::segy
