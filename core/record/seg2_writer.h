#pragma once

#include <cstddef>
#include <string>
#include <vector>

#include "core/base/result.h"
#include "core/record/byte_order.h"
#include "core/record/record.h"
#include "core/record/seg2_strings.h"

namespace strikeplate {

/// How a SEG-2 file is laid out.
struct Seg2WriteOptions {
  int formatCode = 4;  ///< 1 int16, 2 int32, 3 20-bit float, 4 float32, 5 float64
  ByteOrder order = ByteOrder::Little;
  seg2::Terminators terminators;  ///< the standard asks for one or two characters each; none is written too
  int pointerSlots = 0;           ///< room for trace pointers; as many as there are traces when it is less
};

/// The content of a SEG-2 file with this record, strictly after the standard: blocks on multiples of four bytes,
/// keywords in the order of the alphabet, NOTE last, positions in metres.
///
/// From the record's fields are written SAMPLE_INTERVAL, DELAY, DESCALING_FACTOR, STACK, RECEIVER_LOCATION,
/// SOURCE_LOCATION, POLARITY -1 for a reversed and TRACE_TYPE DEAD for a dead trace; other keywords as the headers
/// hold them (SKEW is part of DELAY; UNITS is METERS). Numbers are written so that they read back exactly; codes 1 to
/// 3 round samples to what they can hold.
/// Fails, naming the trace, when a sample does not fit the code or a header is larger than the format allows; needs a
/// format code from 1 to 5 and terminators of at most two characters.
/// Source: Pullan, Geophysics 55 (1990) 1260-1271.
Result<std::vector<std::byte>> seg2Bytes(const ShotRecord& record, const Seg2WriteOptions& options);

/// Writes that content to a file; fails also when the file cannot be written whole.
Outcome writeSeg2(const std::string& path, const ShotRecord& record, const Seg2WriteOptions& options);

}  // namespace strikeplate
