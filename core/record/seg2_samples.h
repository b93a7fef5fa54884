#pragma once

#include <cstddef>
#include <span>
#include <vector>

#include "core/base/result.h"
#include "core/record/byte_order.h"

namespace strikeplate::seg2 {

/// Turns a data block into samples, in the recorder's units. `code` is a data format code (1 to 5); `bytes` must hold
/// dataBytes(code, into.size()) bytes. 32-bit integers and 64-bit floats are rounded to the nearest float.
/// Negative mantissas of code 3 are one's complement, as the standard says and instruments write.
/// Source: Pullan, Geophysics 55 (1990) 1260-1271; the order of the exponents (first sample in the lowest four bits)
/// was confirmed on a recorder's own text export.
void decode(int code, ByteOrder order, std::span<const std::byte> bytes, std::span<float> into);

/// Turns samples into a data block. Fails, saying which sample, when one does not fit the code or is not a number;
/// codes 1, 2 and 3 round to the nearest number that they can hold.
Result<std::vector<std::byte>> encode(int code, ByteOrder order, std::span<const float> samples);

}  // namespace strikeplate::seg2
